// What a strict reader does with the numbers of an AnIML document: lengths,
// indices, types and values.

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

std::string with_signal(const std::string& type, const std::string& values) {
  AnimlSeriesPlan plan;
  plan.type = type;
  plan.values = values;
  return animl_document(animl_set({animl_time(), plan}));
}

std::string with_time(const std::string& type, const std::string& values) {
  AnimlSeriesPlan plan = animl_time();
  plan.type = type;
  plan.values = values;
  return animl_document(animl_set({plan, AnimlSeriesPlan{}}));
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

class AnimlValueCase : public testing::TestWithParam<EdgeCase> {};

TEST_P(AnimlValueCase, BehavesAsWanted) {
  EdgeCase edge = GetParam();
  edge.file = "a.animl";
  expect_behaviour(edge);
}

INSTANTIATE_TEST_SUITE_P(Value, AnimlValueCase,
                         testing::ValuesIn(value_cases()), case_words);

}  // namespace
}  // namespace loqsmith::test
