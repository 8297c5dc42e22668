// What a sound document gives.

#include "loqsmith/formats/mzml_reader.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <string>
#include <vector>

#include "loqsmith/base/input_error.hpp"
#include "support/mzml_builder.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::mzml_document;
using test::MzmlDocumentPlan;
using test::MzmlTrace;
using test::same_bits;
using test::with_change;

FileContents read(const std::string& document,
                  const std::vector<TraceSelector>* wanted = nullptr) {
  return read_chromatogram_file(document, "a.mzML", {}, wanted);
}

Trace only_trace(const std::string& document) {
  const FileContents contents = read(document);
  for (const RefusedTrace& refused : contents.refused) {
    ADD_FAILURE() << describe(refused.problem);
  }
  EXPECT_EQ(contents.traces.size(), 1U);
  return contents.traces.empty() ? Trace{} : contents.traces.front();
}

void expect_values(const std::vector<double>& found,
                   const std::vector<double>& wanted) {
  ASSERT_EQ(found.size(), wanted.size());
  for (std::size_t i = 0; i < wanted.size(); ++i) {
    EXPECT_TRUE(same_bits(found[i], wanted[i])) << "index " << i;
  }
}

TEST(MzmlReader, GivesEveryNumberBackInEveryEncoding) {
  for (const bool zlib : {false, true}) {
    for (const std::string time_type : {"MS:1000521", "MS:1000523"}) {
      for (const std::string signal_type :
           {"MS:1000519", "MS:1000521", "MS:1000522", "MS:1000523"}) {
        MzmlTrace trace;
        trace.times = {-0.25, 0.5, 1.125, 2.0, 5.0};  // exact in 32 bits
        trace.signal = {-3.0, 0.0, 7.0, 65536.0, 2.0};
        trace.time_type = time_type;
        trace.signal_type = signal_type;
        trace.zlib = zlib;
        const Trace found = only_trace(mzml_document({trace}));
        expect_values(found.minutes, trace.times);
        expect_values(found.signal, trace.signal);
        EXPECT_EQ(found.header.points, 5U);
      }
    }
  }
}

TEST(MzmlReader, ConvertsTimesToMinutesAndKeepsTheUnit) {
  struct Wanted {
    std::string accession;
    std::string name;
    double time;
  };
  for (const Wanted& wanted : {Wanted{"UO:0000031", "minute", 90.0},
                               Wanted{"UO:0000010", "second", 1.5},
                               Wanted{"UO:0000028", "millisecond", 0.0015},
                               Wanted{"UO:0000032", "hour", 5400.0}}) {
    MzmlTrace trace;
    trace.time_unit = wanted.accession;
    trace.times = {0.0, 90.0};
    trace.signal = {1.0, 2.0};
    const Trace found = only_trace(mzml_document({trace}));
    EXPECT_EQ(found.header.time_unit, wanted.name);
    EXPECT_TRUE(same_bits(found.minutes.back(), wanted.time));
  }
}

TEST(MzmlReader, SaysHowNumbersAreStored) {
  MzmlTrace trace;
  EXPECT_EQ(only_trace(mzml_document({trace})).header.encoding,
            "64-bit float, uncompressed");
  trace.zlib = true;
  trace.signal_type = "MS:1000521";
  EXPECT_EQ(only_trace(mzml_document({trace})).header.encoding,
            "time 64-bit float, zlib; signal 32-bit float, zlib");
}

TEST(MzmlReader, KnowsTheKindsOfChromatogram) {
  for (const auto& [accession, kind] :
       {std::pair{"MS:1000235", TraceKind::Tic},
        std::pair{"MS:1000627", TraceKind::SelectedIon},
        std::pair{"MS:1000628", TraceKind::BasePeak},
        std::pair{"MS:1000812", TraceKind::Absorption},
        std::pair{"MS:1000813", TraceKind::Emission},
        std::pair{"MS:1001472", TraceKind::Sim},
        std::pair{"MS:1001473", TraceKind::Srm},
        std::pair{"MS:1001474", TraceKind::Other},
        std::pair{"MS:1000810", TraceKind::Other}}) {
    MzmlTrace trace;
    trace.type = accession;
    EXPECT_EQ(only_trace(mzml_document({trace})).header.kind, kind);
  }
}

TEST(MzmlReader, TakesPressureFlowAndTemperatureFromTheirOwnArrays) {
  for (const auto& [type, array, kind] :
       {std::tuple{"MS:1003019", "MS:1000821", TraceKind::Pressure},
        std::tuple{"MS:1003020", "MS:1000820", TraceKind::Flow},
        std::tuple{"MS:1002715", "MS:1000822", TraceKind::Temperature}}) {
    MzmlTrace trace;
    trace.type = type;
    trace.signal_kind = array;
    trace.signal_unit = "UO:0000110";
    const Trace found = only_trace(mzml_document({trace}));
    EXPECT_EQ(found.header.kind, kind);
    EXPECT_EQ(found.header.signal_unit, "pascal");
    expect_values(found.signal, trace.signal);
  }
}

TEST(MzmlReader, ReadsRunSampleTitleAndTransition) {
  MzmlTrace trace;
  trace.id = "Q1=233.1, \"Q3\"=72.1 <&>";
  trace.title = "diuron, quantifier";
  trace.type = "MS:1001473";
  trace.precursor_mz = 233.1;
  trace.product_mz = 72.1;
  MzmlDocumentPlan plan;
  plan.traces = {trace};
  plan.run_id = "night 7";
  plan.start_time = "2026-03-01T08:15:00Z";
  plan.sample_name = "well 3";
  plan.indexed = true;
  const FileContents contents = read(mzml_document(plan));
  EXPECT_EQ(contents.format, "indexed mzML 1.1");
  EXPECT_TRUE(contents.warnings.empty());
  ASSERT_EQ(contents.runs.size(), 1U);
  EXPECT_EQ(contents.runs[0].id, "night 7");
  EXPECT_EQ(contents.runs[0].sample_name, "well 3");
  EXPECT_EQ(contents.runs[0].start_time, "2026-03-01T08:15:00Z");
  ASSERT_EQ(contents.traces.size(), 1U);
  const TraceHeader& header = contents.traces[0].header;
  EXPECT_EQ(header.id, trace.id);
  EXPECT_EQ(header.run, "night 7");
  EXPECT_EQ(header.names, (std::vector{trace.id, trace.title}));
  EXPECT_EQ(header.precursor_mz, 233.1);
  EXPECT_EQ(header.product_mz, 72.1);
}

TEST(MzmlReader, NamesTheSampleByItsParameterWhereItHasNoName) {
  MzmlDocumentPlan plan;
  plan.sample_name = "x";
  const std::string document = with_change(
      mzml_document(plan), " name=\"x\"/>",
      "><cvParam cvRef=\"MS\" accession=\"MS:1000002\" name=\"sample name\" "
      "value=\"tap\"/></sample>");
  EXPECT_EQ(read(document).runs.at(0).sample_name, "tap");
}

TEST(MzmlReader, ResolvesParametersThroughGroups) {
  // Kind, unit, width, compression and type of the chromatogram all come from
  // groups.
  std::string document = mzml_document({MzmlTrace{}});
  const std::string uncompressed =
      "<cvParam cvRef=\"MS\" accession=\"MS:1000576\" name=\"no compression\" "
      "value=\"\"/>\n";
  const std::size_t type =
      document.find("<cvParam cvRef=\"MS\" accession=\"MS:1000235\"");
  const std::size_t time =
      document.find("<cvParam", document.find("<binaryDataArray "));
  const std::size_t end = document.find("<binary>", time);
  const std::string type_param =
      document.substr(type, document.find('\n', type) - type);
  const std::string params = document.substr(time, end - time);
  document = with_change(document, params,
                         "<referenceableParamGroupRef ref=\"times\"/>");
  document = with_change(document, type_param,
                         "<referenceableParamGroupRef ref=\"kind\"/>");
  document = with_change(document, "</referenceableParamGroup>\n",
                         "</referenceableParamGroup>\n"
                         "<referenceableParamGroup id=\"times\">" +
                             params +
                             "</referenceableParamGroup>"
                             "<referenceableParamGroup id=\"kind\">" +
                             type_param + "</referenceableParamGroup>\n");
  document = with_change(document, "referenceableParamGroupList count=\"1\"",
                         "referenceableParamGroupList count=\"3\"");
  const Trace found = only_trace(document);
  EXPECT_EQ(found.header.kind, TraceKind::Tic);
  EXPECT_EQ(found.header.time_unit, "minute");
  expect_values(found.minutes, MzmlTrace{}.times);
  EXPECT_TRUE(found.warnings.empty());
}

TEST(MzmlReader, FollowsPrefixesOfAnyName) {
  std::string document = mzml_document({MzmlTrace{}});
  std::string prefixed;
  for (std::size_t i = 0; i < document.size(); ++i) {
    prefixed += document[i];
    if (document[i] != '<' || document[i + 1] == '?') continue;
    if (document[i + 1] == '/') prefixed += document[++i];
    prefixed += "m:";
  }
  prefixed = with_change(prefixed, "xmlns=", "xmlns:m=");
  expect_values(only_trace(prefixed).signal, MzmlTrace{}.signal);
}

TEST(MzmlReader, ChecksSumAndOffsetsOfALatin1FileAsItIsOnDisk) {
  MzmlDocumentPlan plan;
  plan.indexed = true;
  plan.traces[0].title = "@";
  std::string document = mzml_document(plan);
  document =
      with_change(document, "encoding=\"UTF-8\"", "encoding=\"iso-8859-1\"");
  document = with_change(document, "fullName=\"mass spectrometry\"",
                         "fullName=\"spectrom\xE9trie\"");
  document = with_change(document, "value=\"@\"", "value=\"\xB5g\"");
  // The declaration grew by 5, the vocabulary's name shrank by 4.
  const std::size_t at = document.find("<chromatogram ");
  const std::size_t from = document.find("\">", document.find("<offset")) + 2;
  document.replace(from, document.find('<', from) - from, std::to_string(at));
  const std::size_t list = document.find("<indexList ");
  const std::size_t list_from = document.find("<indexListOffset>") + 17;
  document.replace(list_from, document.find('<', list_from) - list_from,
                   std::to_string(list));
  const FileContents contents = read(test::resealed(document));
  EXPECT_TRUE(contents.warnings.empty());
  ASSERT_EQ(contents.traces.size(), 1U);
  EXPECT_EQ(contents.traces[0].header.names.back(), "\xC2\xB5g");
}

TEST(MzmlReader, DecodesOnlyWhatIsWanted) {
  MzmlTrace one;
  MzmlTrace two;
  two.id = "UV 220";
  two.type = "MS:1000812";
  // Damaged, but nobody asks for it.
  std::string document = mzml_document({one, two});
  document = with_change(document, "<binary>", "<binary>!");
  std::vector<TraceSelector> wanted(1);
  wanted[0].kind = TraceSelector::Kind::Absorption;
  const FileContents contents = read(document, &wanted);
  ASSERT_EQ(contents.traces.size(), 1U);
  EXPECT_EQ(contents.traces[0].header.id, "UV 220");
  EXPECT_TRUE(contents.refused.empty());
  ASSERT_EQ(contents.left_out.size(), 1U);
  EXPECT_EQ(contents.left_out[0].id, "TIC");
  EXPECT_EQ(read(document).refused.size(), 1U);
}

TEST(MzmlReader, StepsOverSpectraAndSaysSo) {
  const std::string document = with_change(
      mzml_document({MzmlTrace{}}), "<chromatogramList",
      "<spectrumList count=\"2\" defaultDataProcessingRef=\"dp\">"
      "<spectrum index=\"0\" id=\"a\" defaultArrayLength=\"1\"><anything/>"
      "<binary>text</binary></spectrum>"
      "<spectrum index=\"1\" id=\"b\" defaultArrayLength=\"1\"/>"
      "</spectrumList><chromatogramList");
  const FileContents contents = read(document);
  EXPECT_EQ(contents.traces.size(), 1U);
  ASSERT_EQ(contents.skipped.size(), 1U);
  EXPECT_EQ(contents.skipped[0], "2 spectra: only chromatograms are read");
}

TEST(MzmlReader, GivesTheSelectedIonWhereNoWindowStands) {
  MzmlTrace trace;
  trace.type = "MS:1001473";
  trace.precursor_mz = 233.1;
  std::string document = mzml_document({trace});
  document = with_change(document, "<isolationWindow>",
                         "<selectedIonList count=\"1\"><selectedIon>");
  document = with_change(document, "</isolationWindow>",
                         "</selectedIon></selectedIonList>");
  document = with_change(document, "MS:1000827", "MS:1000744");
  const Trace found = only_trace(document);
  EXPECT_EQ(found.header.precursor_mz, 233.1);
  EXPECT_EQ(found.warnings.size(), 1U);
}

TEST(MzmlReader, NamesPlaceAndChromatogramOfARefusal) {
  MzmlTrace trace;
  trace.id = "bad";
  trace.signal = {1.0, 2.0, 4.0};
  const FileContents contents = read(mzml_document({MzmlTrace{}, trace}));
  ASSERT_EQ(contents.traces.size(), 1U);
  ASSERT_EQ(contents.refused.size(), 1U);
  const InputProblem& problem = contents.refused[0].problem;
  EXPECT_EQ(contents.refused[0].header.id, "bad");
  EXPECT_NE(problem.found.find("(chromatogram \"bad\")"), std::string::npos);
  // The fourth <binaryDataArray> of the document.
  const std::string document = mzml_document({MzmlTrace{}, trace});
  std::size_t at = 0;
  for (int i = 0; i < 4; ++i) at = document.find("<binaryDataArray ", at + 1);
  const auto lines =
      std::count(document.begin(),
                 document.begin() + static_cast<std::ptrdiff_t>(at), '\n');
  EXPECT_EQ(problem.line, static_cast<std::size_t>(lines) + 1);
  EXPECT_EQ(problem.column, 1U);
}

}  // namespace
}  // namespace loqsmith
