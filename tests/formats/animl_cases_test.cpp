// What a strict reader does with AnIML documents that break or bend one rule:
// each must be refused as a file, refused as a trace, warned of or accepted.

#include <gtest/gtest.h>

#include <limits>
#include <string>
#include <utility>
#include <vector>

#include "edge_case.hpp"
#include "support/animl_builder.hpp"

namespace loqsmith::test {
namespace {

std::string changed(std::string_view from, std::string_view to) {
  return with_change(animl_document(), from, to);
}

std::string with_signal(const std::string& type, const std::string& values,
                        const std::string& unit = "<Unit label=\"mAU\"/>") {
  AnimlSeriesPlan plan;
  plan.type = type;
  plan.values = values;
  plan.unit = unit;
  return animl_document(animl_set({animl_time(), plan}));
}

std::string with_time(const std::string& type, const std::string& values,
                      const std::string& unit = animl_time().unit) {
  AnimlSeriesPlan plan = animl_time();
  plan.type = type;
  plan.values = values;
  plan.unit = unit;
  return animl_document(animl_set({plan, AnimlSeriesPlan{}}));
}

std::string with_time_unit(const std::string& unit) {
  return with_time("Float64", animl_time().values, unit);
}

std::string numbers(const std::vector<std::string>& values,
                    const std::string& element = "D") {
  std::string text = "<IndividualValueSet>";
  for (const std::string& value : values) {
    text += "<" + element + ">" + value + "</" + element + ">";
  }
  return text + "</IndividualValueSet>";
}

std::string generated(const std::string& start, const std::string& increment,
                      const std::string& attributes = {}) {
  return "<AutoIncrementedValueSet " + attributes + "><StartValue><D>" + start +
         "</D></StartValue><Increment><D>" + increment +
         "</D></Increment></AutoIncrementedValueSet>";
}

std::vector<EdgeCase> document_cases() {
  using enum Behaviour;
  const std::string sound = animl_document();
  return {
      {"Sound", sound, Accept},
      {"Case01Cut", sound.substr(0, sound.size() - 10), RefuseFile,
       "incomplete"},
      {"Case01Empty", "", RefuseFile},
      {"Case02BytesBehind", sound + "x", RefuseFile},
      {"Case27Latin1", changed("UTF-8", "ISO-8859-1"), Accept},
      {"Case27Bom", "\xEF\xBB\xBF" + sound, Accept},
      {"Case28Doctype", changed("<AnIML", "<!DOCTYPE AnIML><AnIML"), RefuseFile,
       "DOCTYPE"},
      {"Case30StrangeElementOutside",
       changed("<SampleSet>", "<SampleSet><Extra/>"), Warn,
       "<Extra> inside <SampleSet>"},
      {"Case30StrangeAttributeOutside",
       changed("<Technique", "<Technique colour=\"red\""), Warn, "\"colour\""},
      {"Case30StrangeNamespaceOutside",
       changed("<SampleSet>", "<SampleSet><x:E xmlns:x=\"urn:x\"/>"), Warn,
       "<x:E> inside <SampleSet>"},
      {"Case30StrangeElementInside",
       changed("<Unit label=\"mAU\"/>", "<Unit label=\"mAU\"/><Extra/>"),
       RefuseTrace, "<Extra> inside <Series>"},
      {"Case30StrangeAttributeInside",
       changed("<SeriesSet ", "<SeriesSet colour=\"red\" "), RefuseTrace,
       "\"colour\""},
      {"Case30TextInside", changed("<Series ", "x<Series "), RefuseTrace,
       "text inside <SeriesSet>"},
      {"Case30ForeignAttribute",
       changed("version=\"0.90\"",
               "xmlns:i=\"http://www.w3.org/2001/XMLSchema-instance\" "
               "i:schemaLocation=\"a b\" version=\"0.90\""),
       Accept},
      {"Case31Namespace10", changed("draft:0.90", "draft:1.0"), RefuseFile,
       "draft:1.0"},
      {"Case31Version10", changed("version=\"0.90\"", "version=\"1.0\""),
       RefuseFile, "AnIML version \"1.0\""},
      {"Case31NoVersion", changed(" version=\"0.90\"", ""), RefuseFile,
       "no version"},
      {"Case31NoNamespace",
       changed(" xmlns=\"urn:org:astm:animl:schema:core:draft:0.90\"", ""),
       RefuseFile, "without namespace"},
      {"Case32SecondStepSet",
       changed("</AnIML>", "<ExperimentStepSet/></AnIML>"), RefuseFile,
       "a second <ExperimentStepSet>"},
      {"Case32OrderOutside",
       changed("</Infrastructure>",
               "</Infrastructure><Technique name=\"a\" uri=\"\"/>"),
       Warn, "<Technique> too late"},
      {"Case32UnitBeforeValues",
       changed("<AutoInc", "<Unit label=\"min\"/><AutoInc"), RefuseTrace,
       "<AutoIncrementedValueSet> too late inside <Series>"},
      {"Case33ReferenceToNoStep",
       changed("</SampleReferenceSet>",
               "</SampleReferenceSet><ExperimentDataReferenceSet>"
               "<ExperimentDataReference role=\"a\" dataPurpose=\"consumed\" "
               "experimentStepID=\"nope\"/></ExperimentDataReferenceSet>"),
       Warn, "\"nope\" refers to nothing"},
      {"Case37StartWithoutZone", changed("08:15:00Z", "08:15:00"), Warn,
       "zone not stated"},
      {"Case37StartIsNoDate", changed("2026-03-01T", "yesterday"), Warn,
       "is no date"},
      {"Case43SampleTwice", changed("\"B-1\"", "\" S-1 \""), RefuseFile,
       "a second sample with the sampleID \"S-1\""},
      {"Case43StepTwice", changed("\"inj-1-uv\"", "\"inj-1\""), RefuseFile,
       "a second step with the experimentStepID \"inj-1\""},
      {"Case43SeriesTwice", changed("seriesID=\"y\"", "seriesID=\"t\""),
       RefuseFile, "a second series with the seriesID \"t\""},
      {"Case43IdTwice", changed("\"B-1\"/>", "\"B-1\" id=\"s1\"/>"), RefuseFile,
       "a second element with the id \"s1\""},
      {"Case43SampleMissing",
       changed("<SampleReference sampleID=\"S-1\"",
               "<SampleReference sampleID=\"nope\""),
       RefuseTrace, "the sample \"nope\""},
      {"StepWithoutId", changed(" experimentStepID=\"inj-1-uv\"", ""),
       RefuseTrace, "without experimentStepID"},
      {"SignaturePresent",
       changed("</AnIML>",
               "<SignatureSet><s:Signature "
               "xmlns:s=\"http://www.w3.org/2000/09/xmldsig#\"/>"
               "</SignatureSet></AnIML>"),
       Warn, "signature present, not verified"},
      {"AuditTrailIsSteppedOver",
       changed("</AnIML>",
               "<AuditTrailEntrySet><AuditTrailEntry/></AuditTrailEntrySet>"
               "</AnIML>"),
       Accept},
  };
}

std::vector<EdgeCase> unit_cases() {
  using enum Behaviour;
  const auto time = with_time_unit;
  return {
      {"Case03NoUnit", time(""), RefuseTrace, "no unit on the time series"},
      {"Case03UnitFromTheMethod",
       time(""),
       Warn,
       "taken as minute",
       {"minute", true}},
      {"Case06NoSignalUnit", changed("<Unit label=\"mAU\"/>", ""), Warn,
       "unit of the signal not stated"},
      {"Case45FactorContradicts",
       time("<Unit label=\"s\"><SIUnit factor=\"60\">s</SIUnit></Unit>"),
       RefuseTrace, "\"s\" with the factor 60"},
      {"Case45OtherSiUnit",
       time("<Unit label=\"min\"><SIUnit>m</SIUnit></Unit>"), RefuseTrace,
       "no time"},
      {"Case45Exponent",
       time("<Unit label=\"s\"><SIUnit exponent=\"-1\">s</SIUnit></Unit>"),
       RefuseTrace, "no time"},
      {"Case45Offset",
       time("<Unit label=\"s\"><SIUnit offset=\"1\">s</SIUnit></Unit>"),
       RefuseTrace, "no time"},
      {"Case45TwoSiUnits",
       time("<Unit label=\"s\"><SIUnit>s</SIUnit><SIUnit>s</SIUnit></Unit>"),
       RefuseTrace, "no time"},
      {"Case45FactorZero",
       time("<Unit label=\"x\"><SIUnit factor=\"0\">s</SIUnit></Unit>"),
       RefuseTrace, "the factor 0"},
      {"Case45FactorIsNoNumber",
       time("<Unit label=\"s\"><SIUnit factor=\"1,0\">s</SIUnit></Unit>"),
       RefuseTrace, "\"1,0\""},
      {"Case45UnknownLabelAlone",
       time("<Unit label=\"minutes\" quantity=\"Time\"/>"), RefuseTrace,
       "\"minutes\" without SIUnit"},
      {"Case45LabelAlone", time("<Unit label=\"min\"/>"), Accept},
  };
}

std::vector<EdgeCase> value_cases() {
  using enum Behaviour;
  const auto listed = [](const std::vector<std::string>& values) {
    return with_signal("Float64", numbers(values));
  };
  const std::vector<double> four{1, 2, 4, 3};
  std::vector<EdgeCase> cases{
      {"Case11NoPoints",
       animl_document(animl_set(
           {{"Time", "independent", "t", "Float64", "", "<Unit label=\"s\"/>"},
            {"Y", "dependent", "y", "Float64", "", "<Unit label=\"mAU\"/>"}},
           "0")),
       Accept},
      {"Case14TimeNotIncreasing",
       with_time("Float64", numbers({"0", "1", "1", "2"})), RefuseTrace,
       "strictly increase"},
      {"Case15NaN", listed({"1", "NaN", "4", "3"}), RefuseTrace, "\"NaN\""},
      {"Case15Infinity", listed({"1", "-INF", "4", "3"}), RefuseTrace,
       "\"-INF\""},
      {"Case15EncodedNaN",
       with_signal(
           "Float32",
           animl_encoded({1, 2, std::numeric_limits<double>::quiet_NaN(), 3},
                         "Float32")),
       RefuseTrace, "not a number at index 2"},
      {"Case16NegativeTime", with_time("Float64", generated("-0.04", "0.5")),
       Accept},
      {"Case17Gap", with_time("Float64", numbers({"0", "1", "2", "9"})), Warn,
       "gap"},
      {"Case21ForeignCharacter",
       with_signal("Float64", "<EncodedValueSet>AAAA-AAA</EncodedValueSet>"),
       RefuseTrace, "in the signal series"},
      {"Case23LengthHuge", changed("length=\"4\"", "length=\"2000000000\""),
       RefuseTrace, "the length \"2000000000\""},
      {"Case23LengthNegative", changed("length=\"4\"", "length=\"-4\""),
       RefuseFile, "the length \"-4\""},
      {"Case23LengthIsNoNumber", changed("length=\"4\"", "length=\"4.0\""),
       RefuseTrace, "the length \"4.0\""},
      {"Case23NoLength", changed(" length=\"4\"", ""), RefuseTrace,
       "without length"},
      {"Case23GeneratedSignalHuge",
       animl_document(
           animl_set({{"Time", "independent", "t", "Float64",
                       generated("0", "1"), "<Unit label=\"s\"/>"},
                      {"Y", "dependent", "y", "Float64", generated("0", "1"),
                       "<Unit label=\"mAU\"/>"}},
                     "100000000")),
       RefuseTrace, "100000000 generated values"},
      {"Case41LengthTooLarge", changed("length=\"4\"", "length=\"5\""),
       RefuseTrace, "4 values in the signal series"},
      {"Case41LengthTooSmall", changed("length=\"4\"", "length=\"3\""),
       RefuseTrace, "4 values in the signal series"},
      {"Case41Hole",
       with_signal("Float64",
                   animl_encoded({1}, "Float64", "startIndex=\"0\"") +
                       animl_encoded({4, 3}, "Float64", "startIndex=\"2\"")),
       RefuseTrace, "no values from index 1 to 1"},
      {"Case41Overlap",
       with_signal("Float64",
                   animl_encoded({1, 2, 3}, "Float64", "startIndex=\"0\"") +
                       animl_encoded({4, 3}, "Float64", "startIndex=\"2\"")),
       RefuseTrace, "a second value for index 2"},
      {"Case41SeveralWithoutIndex",
       with_signal("Float64", animl_encoded({1, 2}, "Float64") +
                                  animl_encoded({4, 3}, "Float64")),
       RefuseTrace, "without startIndex"},
      {"Case41EndBeforeStart",
       with_signal("Float64", animl_encoded(four, "Float64",
                                            "startIndex=\"2\" endIndex=\"1\"")),
       RefuseTrace, "endIndex 1 before startIndex 2"},
      {"Case41EndBeyondLength",
       with_signal("Float64", animl_encoded(four, "Float64",
                                            "startIndex=\"0\" endIndex=\"4\"")),
       RefuseTrace, "endIndex \"4\""},
      {"Case41CountAgainstIndices",
       with_signal("Float64", animl_encoded({1, 2}, "Float64",
                                            "startIndex=\"0\" endIndex=\"3\"")),
       RefuseTrace, "2 values in the signal series"},
      {"Case41NoValues", with_signal("Float64", ""), RefuseTrace,
       "0 values in the signal series"},
      {"Case42OtherElement",
       with_signal("Float64", numbers({"1", "2", "4", "3"}, "F")), RefuseTrace,
       "the value element <F>"},
      {"Case42OtherElementInIncrement",
       with_time("Float32", generated("0", "1")), RefuseTrace,
       "the value element <D>"},
      {"Case42UnknownType", changed("\"Float64\"", "\"Float\""), RefuseTrace,
       "the seriesType \"Float\""},
      {"Case44IncrementZero", with_time("Float64", generated("0", "0")),
       RefuseTrace, "the increment 0"},
      {"Case44IncrementNegative", with_time("Float64", generated("0", "-1")),
       RefuseTrace, "the increment -1"},
      {"Case44BytesNoMultiple",
       with_signal("Int32",
                   "<EncodedValueSet>AAAAAAAAAAAAAAAAAAAA</EncodedValueSet>"),
       RefuseTrace, "15 bytes"},
      {"Case08IntegerBeyondDoubles",
       with_signal("Int64", numbers({"9007199254740993", "0", "0", "0"}, "L")),
       RefuseTrace, "beyond what is held exactly"},
      {"IntegerBeyondItsType",
       with_signal("Int32", numbers({"2147483648", "0", "0", "0"}, "I")),
       RefuseTrace, "beyond what is held exactly"},
      {"MixedKinds",
       with_signal("Float64",
                   animl_encoded({1, 2}, "Float64", "startIndex=\"0\"") +
                       "<IndividualValueSet startIndex=\"2\"><D>4</D><D>3</D>"
                       "</IndividualValueSet>"),
       RefuseTrace, "beside <EncodedValueSet>"},
      {"MarkupInsideAValue", listed({"1", "2<!-- . -->4", "4", "3"}),
       RefuseTrace, "markup inside a value"},
      {"ReferenceInsideAValue", listed({"1", "&#50;", "4", "3"}), Accept},
      {"NoDependency", changed(" dependency=\"dependent\"", ""), RefuseTrace,
       "the dependency \"\""},
      {"NoSeriesId", changed(" seriesID=\"y\"", ""), RefuseTrace,
       "a series without seriesID"},
  };
  const std::pair<std::string, std::string> texts[] = {
      {"Comma", "1,5"}, {"Plus", "+5"},        {"Unit", "5 mg"},
      {"Hex", "0x1p3"}, {"TooLarge", "1e999"}, {"Empty", ""}};
  for (const auto& [name, text] : texts) {
    cases.push_back({"Case38" + name, listed({"1", text, "4", "3"}),
                     RefuseTrace, "no plain decimal number"});
  }
  return cases;
}

class AnimlCase : public testing::TestWithParam<EdgeCase> {};

TEST_P(AnimlCase, BehavesAsWanted) {
  EdgeCase edge = GetParam();
  edge.file = "a.animl";
  expect_behaviour(edge);
}

INSTANTIATE_TEST_SUITE_P(Document, AnimlCase,
                         testing::ValuesIn(document_cases()), case_words);
INSTANTIATE_TEST_SUITE_P(Unit, AnimlCase, testing::ValuesIn(unit_cases()),
                         case_words);
INSTANTIATE_TEST_SUITE_P(Value, AnimlCase, testing::ValuesIn(value_cases()),
                         case_words);

TEST(AnimlContent, DecidesAndTheExtensionEarnsARemark) {
  EdgeCase edge{"Case40", animl_document(), Behaviour::Warn,
                "the content is AnIML"};
  edge.file = "a.mzML";
  expect_behaviour(edge);
}

}  // namespace
}  // namespace loqsmith::test
