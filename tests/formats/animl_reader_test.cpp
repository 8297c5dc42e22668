// What is read from sound AnIML documents.

#include <gtest/gtest.h>

#include <string>
#include <vector>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/formats/chromatogram_file.hpp"
#include "support/animl_builder.hpp"
#include "support/mzml_builder.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::animl_document;
using test::animl_encoded;
using test::animl_set;
using test::animl_time;
using test::AnimlInjection;
using test::AnimlSeriesPlan;
using test::same_bits;
using test::with_change;

FileContents read(const std::string& document,
                  const std::vector<TraceSelector>* wanted = nullptr) {
  return read_chromatogram_file(document, "a.animl", {}, wanted);
}

AnimlSeriesPlan signal(const std::string& type, const std::string& values) {
  AnimlSeriesPlan plan;
  plan.type = type;
  plan.values = values;
  return plan;
}

// The one trace of a document with these two series.
Trace only_trace(const AnimlSeriesPlan& time, const AnimlSeriesPlan& values) {
  const FileContents contents = read(animl_document(animl_set({time, values})));
  for (const RefusedTrace& refused : contents.refused) {
    ADD_FAILURE() << describe(refused.problem);
  }
  if (contents.traces.size() != 1) {
    ADD_FAILURE() << contents.traces.size() << " traces";
    return {};
  }
  return contents.traces.front();
}

void expect_same(const std::vector<double>& found,
                 const std::vector<double>& wanted) {
  ASSERT_EQ(found.size(), wanted.size());
  for (std::size_t i = 0; i < found.size(); ++i) {
    EXPECT_TRUE(same_bits(found[i], wanted[i])) << "at " << i;
  }
}

TEST(AnimlReader, ReadsARunItsStepAndItsTrace) {
  const FileContents contents = read(animl_document());
  EXPECT_EQ(contents.format, "AnIML 0.90");
  ASSERT_EQ(contents.runs.size(), 1U);
  const FileRun& run = contents.runs.front();
  EXPECT_EQ(run.id, "inj-1");
  EXPECT_EQ(run.name, "Injection 1");
  EXPECT_EQ(run.sample_name, "well 3");
  EXPECT_EQ(run.start_time, "2026-03-01T08:15:00Z");
  ASSERT_EQ(run.steps.size(), 1U);
  EXPECT_EQ(run.steps[0].id, "inj-1-uv");
  ASSERT_EQ(contents.traces.size(), 1U);
  const TraceHeader& header = contents.traces[0].header;
  EXPECT_EQ(header.id, "inj-1-uv/UV/Vis Trace/Intensity");
  EXPECT_EQ(run.steps[0].traces, std::vector<std::string>{header.id});
  EXPECT_EQ(header.run, "inj-1");
  EXPECT_EQ(header.names, (std::vector<std::string>{
                              "inj-1", "Injection 1", "inj-1-uv", "UV 254 nm",
                              "UV/Vis Trace", "UV/Vis Trace", "Intensity"}));
  EXPECT_EQ(header.kind, TraceKind::Absorption);
  EXPECT_EQ(header.time_unit, "min");
  EXPECT_EQ(header.signal_unit, "mAU");
  EXPECT_EQ(header.points, 4U);
  expect_same(contents.traces[0].minutes, {0.0, 0.5, 1.0, 1.5});
  expect_same(contents.traces[0].signal, {1.0, 2.0, 4.0, 3.0});
}

TEST(AnimlReader, WidensEachTypeExactly) {
  const std::vector<double> values{-1.0, 0.0, 7.0, 2147483647.0};
  for (const std::string type : {"Int32", "Int64", "Float64"}) {
    expect_same(
        only_trace(animl_time(), signal(type, animl_encoded(values, type)))
            .signal,
        values);
  }
  const double tenth = static_cast<double>(0.1F);
  expect_same(only_trace(animl_time(),
                         signal("Float32",
                                "<IndividualValueSet><F>0.1</F><F>-2</F>"
                                "<F> 1e3 </F><F>0</F></IndividualValueSet>"))
                  .signal,
              {tenth, -2.0, 1000.0, 0.0});
  expect_same(only_trace(animl_time(),
                         signal("Int64",
                                "<IndividualValueSet><L>9007199254740992</L>"
                                "<L>-3</L><L>0</L><L>1</L>"
                                "</IndividualValueSet>"))
                  .signal,
              {9007199254740992.0, -3.0, 0.0, 1.0});
}

TEST(AnimlReader, IncrementsByMultiplication) {
  AnimlSeriesPlan time = animl_time();
  time.values =
      "<AutoIncrementedValueSet><StartValue><D>-0.1</D></StartValue>"
      "<Increment><D>0.1</D></Increment></AutoIncrementedValueSet>";
  expect_same(only_trace(time, AnimlSeriesPlan{}).minutes,
              {-0.1, -0.1 + 1.0 * 0.1, -0.1 + 2.0 * 0.1, -0.1 + 3.0 * 0.1});
}

TEST(AnimlReader, PutsSeveralValueSetsSideBySide) {
  const std::string later =
      animl_encoded({4.0, 3.0}, "Float64", "startIndex=\"2\" endIndex=\"3\"");
  const std::string earlier =
      animl_encoded({1.0, 2.0}, "Float64", "startIndex=\"0\" endIndex=\"1\"");
  expect_same(
      only_trace(animl_time(), signal("Float64", later + earlier)).signal,
      {1.0, 2.0, 4.0, 3.0});
}

TEST(AnimlReader, ConvertsTimesToMinutes) {
  struct {
    std::string unit;
    std::vector<double> minutes;
  } const cases[] = {
      {"<Unit label=\"s\"><SIUnit>s</SIUnit></Unit>",
       {0.0, 0.5 / 60.0, 1.0 / 60.0, 1.5 / 60.0}},
      {"<Unit label=\"ms\"/>",
       {0.0, 0.5 / 60000.0, 1.0 / 60000.0, 1.5 / 60000.0}},
      {"<Unit label=\"h\"><SIUnit factor=\"3600\">s</SIUnit></Unit>",
       {0.0, 30.0, 60.0, 90.0}},
      {"<Unit label=\"min.\"><SIUnit factor=\"60\">s</SIUnit></Unit>",
       {0.0, 0.5, 1.0, 1.5}},
      {"<Unit label=\"double seconds\"><SIUnit factor=\"2\">s</SIUnit></Unit>",
       {0.0, 1.0 / 60.0, 2.0 / 60.0, 3.0 / 60.0}},
  };
  for (const auto& each : cases) {
    SCOPED_TRACE(each.unit);
    AnimlSeriesPlan time = animl_time();
    time.unit = each.unit;
    expect_same(only_trace(time, AnimlSeriesPlan{}).minutes, each.minutes);
  }
}

TEST(AnimlReader, FindsSetsInCategoriesAtAnyDepth) {
  const std::string set = animl_set({animl_time(), AnimlSeriesPlan{}});
  const FileContents contents =
      read(animl_document("<Category name=\"a\"><Category name=\"b\">" + set +
                          "</Category></Category>"));
  ASSERT_EQ(contents.traces.size(), 1U);
  EXPECT_EQ(contents.traces[0].header.id, "inj-1-uv/UV/Vis Trace/Intensity");
}

TEST(AnimlReader, NumbersTracesThatAreCalledTheSame) {
  const std::string set = animl_set({animl_time(), AnimlSeriesPlan{}});
  const FileContents contents =
      read(animl_document("<Category name=\"a\">" + set + set + "</Category>"));
  ASSERT_EQ(contents.traces.size(), 2U);
  EXPECT_EQ(contents.traces[1].header.id,
            "inj-1-uv/UV/Vis Trace/Intensity (2)");
  ASSERT_EQ(contents.warnings.size(), 1U);
  EXPECT_NE(contents.warnings[0].find("several traces"), std::string::npos);
}

TEST(AnimlReader, IgnoresTemplates) {
  const std::string document = animl_document();
  const std::size_t begin = document.find("<ExperimentStep ");
  const std::size_t end = document.rfind("</ExperimentStepSet>");
  std::string copy = document.substr(begin, end - begin);
  copy = "<Template" + copy.substr(std::string("<ExperimentStep").size());
  copy.replace(copy.rfind("</ExperimentStep>"),
               std::string("</ExperimentStep>").size(), "</Template>");
  const FileContents contents =
      read(document.substr(0, begin) + copy + document.substr(begin));
  EXPECT_EQ(contents.runs.size(), 1U);
  EXPECT_EQ(contents.traces.size(), 1U);
}

TEST(AnimlReader, SkipsWhatIsNoTraceAndSaysWhy) {
  AnimlSeriesPlan words;
  words.name = "Remark";
  words.id = "r";
  words.type = "String";
  words.values =
      "<IndividualValueSet><S>a</S><S>b</S><S>c</S><S>d</S>"
      "</IndividualValueSet>";
  AnimlSeriesPlan wavelength = animl_time();
  wavelength.name = "Wavelength";
  wavelength.unit =
      "<Unit label=\"nm\"><SIUnit factor=\"1e-9\">m</SIUnit></Unit>";
  AnimlSeriesPlan number = animl_time();
  number.name = "Number";
  number.unit.clear();
  AnimlSeriesPlan second = animl_time();
  second.id = "t2";
  const FileContents contents = read(animl_document(
      "<Category name=\"a\">" +
      animl_set({animl_time(), AnimlSeriesPlan{}, words}) +
      animl_set({wavelength, AnimlSeriesPlan{}}) +
      animl_set({number, AnimlSeriesPlan{}}) + animl_set({AnimlSeriesPlan{}}) +
      animl_set({animl_time(), second, AnimlSeriesPlan{}}) + "</Category>"));
  EXPECT_EQ(contents.traces.size(), 1U);
  EXPECT_TRUE(contents.refused.empty());
  ASSERT_EQ(contents.skipped.size(), 5U);
  const std::vector<std::string> reasons{
      "\"Remark\": the type String is no number", "\"nm\" is no time",
      "has no unit of time", "no independent series", "2 independent series"};
  for (std::size_t i = 0; i < reasons.size(); ++i) {
    EXPECT_NE(contents.skipped[i].find(reasons[i]), std::string::npos)
        << contents.skipped[i];
  }
  TraceSelector selector;
  selector.name = "Remark";
  try {
    select_trace(contents, selector, "", "a.animl");
    FAIL();
  } catch (const InputError& error) {
    EXPECT_NE(std::string(error.what()).find(reasons[0]), std::string::npos);
  }
}

TEST(AnimlReader, DecodesOnlyWhatIsWanted) {
  AnimlSeriesPlan damaged;
  damaged.name = "Other";
  damaged.id = "z";
  damaged.values = "<EncodedValueSet>!</EncodedValueSet>";
  const std::string document =
      animl_document(animl_set({animl_time(), AnimlSeriesPlan{}, damaged}));
  TraceSelector selector;
  selector.name = "Intensity";
  const std::vector<TraceSelector> wanted{selector};
  const FileContents contents = read(document, &wanted);
  EXPECT_EQ(contents.traces.size(), 1U);
  EXPECT_TRUE(contents.refused.empty());
  ASSERT_EQ(contents.left_out.size(), 1U);
  EXPECT_EQ(contents.left_out[0].names.back(), "Other");
  EXPECT_EQ(read(document).refused.size(), 1U);
}

TEST(AnimlReader, TakesTheKindOfAMassChromatogramFromItsDataType) {
  const std::string set =
      animl_set({animl_time(), AnimlSeriesPlan{}}, "4", "Mass Chromatogram");
  const auto kind = [&](const std::string& type) {
    AnimlInjection injection;
    injection.result = "Mass Chromatogram";
    injection.content =
        set +
        "<Category name=\"Data Description\"><Parameter name=\"Data Type\" "
        "parameterType=\"String\"><S>" +
        type + "</S></Parameter></Category>";
    return read(animl_document(std::vector<AnimlInjection>{injection}))
        .traces.at(0)
        .header.kind;
  };
  EXPECT_EQ(kind("TIC"), TraceKind::Tic);
  EXPECT_EQ(kind("BPC"), TraceKind::BasePeak);
  EXPECT_EQ(kind("XIC"), TraceKind::SelectedIon);
  EXPECT_EQ(kind("SIM"), TraceKind::Sim);
  EXPECT_EQ(kind("MRM"), TraceKind::Srm);
  EXPECT_EQ(kind("Other"), TraceKind::Other);
  EXPECT_EQ(kind("something"), TraceKind::Unknown);
}

TEST(AnimlReader, ReadsAnyPrefix) {
  std::string document = animl_document();
  std::string prefixed;
  for (std::size_t i = 0; i < document.size(); ++i) {
    prefixed += document[i];
    if (document[i] != '<' || document[i + 1] == '?') continue;
    if (document[i + 1] == '/') prefixed += document[++i];
    prefixed += "q:";
  }
  prefixed = with_change(prefixed, "xmlns=", "xmlns:q=");
  EXPECT_EQ(read(prefixed).traces.size(), 1U);
}

std::string two_injections() {
  AnimlInjection first;
  first.content = animl_set({animl_time(), AnimlSeriesPlan{}});
  AnimlInjection second = first;
  second.id = "inj-2";
  second.name = "Injection 2";
  second.sample_id = "B-1";
  return animl_document({first, second});
}

TEST(AnimlReader, RunsAreSelectedByOuterOrInnerStep) {
  const FileContents contents = read(two_injections());
  ASSERT_EQ(contents.runs.size(), 2U);
  EXPECT_EQ(contents.runs[1].sample_name, "blank");
  const TraceSelector any;
  for (const std::string run : {"inj-2", "Injection 2", "inj-2-uv"}) {
    EXPECT_EQ(select_trace(contents, any, run, "a.animl").header.run, "inj-2")
        << run;
  }
  for (const std::string run : {"", "UV 254 nm", "inj-3", "Intensity"}) {
    EXPECT_THROW(select_trace(contents, any, run, "a.animl"), InputError)
        << run;
  }
}

}  // namespace
}  // namespace loqsmith
