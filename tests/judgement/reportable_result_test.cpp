#include "loqsmith/judgement/reportable_result.hpp"

#include <set>
#include <string_view>

#include "judgement/sample_results.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::same_bits;
using test::SampleResults;

constexpr Status kUnseen = Status::NotDetected;
constexpr Status kLow = Status::Estimated;
constexpr Status kInRange = Status::Reportable;
constexpr Status kAbove = Status::AboveRange;
constexpr Status kWithheld = Status::Withheld;

struct One {
  Status status;
  double result;
  double dilution;
};

struct Case {
  std::string name;
  std::vector<One> injections;
  Status status;
  std::optional<double> result;
  std::string reported;
  std::vector<int> counting;
  std::string rejected;
};

// The quantitation limit is 3 x dilution, the end of the range 100 x dilution.
const std::vector<Case> kCases{
    {"Single", {{kInRange, 12.0, 1}}, kInRange, 12.0, "12.0", {1}, ""},
    {"RepeatsAreAveraged",
     {{kInRange, 12.0, 1}, {kInRange, 13.0, 1}},
     kInRange,
     12.5,
     "12.5",
     {1, 2},
     ""},
    {"LeastDilutedInRange",
     {{kInRange, 64.0, 5}, {kInRange, 60.0, 1}, {kInRange, 70.0, 20}},
     kInRange,
     60.0,
     "60.0",
     {2},
     "1:more-diluted;3:more-diluted"},
    {"InRangeOnlyWhenDiluted",
     {{kAbove, 180.0, 1}, {kInRange, 190.0, 10}, {kInRange, 196.0, 10}},
     kInRange,
     193.0,
     "193",
     {2, 3},
     "1:above-range"},
    {"ARepeatAboveTheRange",
     {{kInRange, 98.0, 1}, {kAbove, 101.0, 1}},
     kInRange,
     98.0,
     "98.0",
     {1},
     "2:above-range"},
    {"ARepeatBelowQuantitation",
     {{kLow, 2.9, 1}, {kInRange, 3.1, 1}},
     kInRange,
     3.1,
     "3.10",
     {2},
     "1:below-quantitation-limit"},
    {"DilutedTooFar",
     {{kInRange, 12.0, 1}, {kLow, 13.0, 10}, {kUnseen, 2.0, 100}},
     kInRange,
     12.0,
     "12.0",
     {1},
     "2:below-quantitation-limit;3:not-detected"},
    {"BetweenAboveAndTooFar",
     {{kAbove, 180.0, 1}, {kInRange, 190.0, 10}, {kLow, 210.0, 100}},
     kInRange,
     190.0,
     "190",
     {2},
     "1:above-range;3:below-quantitation-limit"},
    {"AboveAndDilutedBelowQuantitation",
     {{kAbove, 180.0, 1}, {kLow, 20.0, 10}},
     kWithheld,
     std::nullopt,
     "withheld",
     {},
     "1:dilutions-disagree;2:dilutions-disagree"},
    {"AboveAndDilutedNotDetected",
     {{kAbove, 180.0, 1}, {kUnseen, 0.0, 10}},
     kWithheld,
     std::nullopt,
     "withheld",
     {},
     "1:dilutions-disagree;2:dilutions-disagree"},
    // The quantitation limit equals the end of the less diluted range: with a
    // result between them they do not exclude each other.
    {"LimitAtTheEndOfTheRange",
     {{kAbove, 310.0, 3}, {kInRange, 310.0, 10}, {kLow, 290.0, 100}},
     kInRange,
     310.0,
     "310",
     {2},
     "1:above-range;3:below-quantitation-limit"},
    {"LimitBelowTheEndOfTheRange",
     {{kAbove, 310.0, 3}, {kInRange, 310.0, 10}, {kLow, 250.0, 99}},
     kWithheld,
     std::nullopt,
     "withheld",
     {},
     "1:dilutions-disagree;2:dilutions-disagree;3:dilutions-disagree"},
    {"MoreDilutedStandsHigher",
     {{kLow, 2.0, 1}, {kInRange, 40.0, 10}},
     kWithheld,
     std::nullopt,
     "withheld",
     {},
     "1:dilutions-disagree;2:dilutions-disagree"},
    {"MoreDilutedAboveTheRange",
     {{kInRange, 50.0, 1}, {kAbove, 1100.0, 10}},
     kWithheld,
     std::nullopt,
     "withheld",
     {},
     "1:dilutions-disagree;2:dilutions-disagree"},
    {"AllAbove",
     {{kAbove, 1100.0, 10}, {kAbove, 300.0, 1}},
     kAbove,
     1100.0,
     "> 1000",
     {1},
     "2:less-diluted"},
    {"NowhereInRange",
     {{kLow, 14.0, 10}, {kLow, 2.0, 1}, {kLow, 2.5, 1}, {kUnseen, 0.5, 1}},
     kLow,
     2.25,
     "2.25",
     {2, 3},
     "1:more-diluted;4:not-detected"},
    {"NowhereDetected",
     {{kUnseen, 3.0, 10}, {kUnseen, 0.25, 1}},
     kUnseen,
     0.25,
     "< 1.00",
     {2},
     "1:more-diluted"},
    {"WithheldNeverCounts",
     {{kWithheld, 500.0, 1}, {kInRange, 8.0, 5}},
     kInRange,
     8.0,
     "8.00",
     {2},
     "1:saturated"},
    {"AllWithheld",
     {{kWithheld, 7.0, 10}, {kWithheld, 5.0, 1}},
     kWithheld,
     5.0,
     "withheld",
     {2},
     "1:saturated"},
};

std::string text_of(const std::vector<RejectedRepeat>& rejected) {
  std::string text;
  for (const RejectedRepeat& one : rejected) {
    text += (text.empty() ? "" : ";") + std::to_string(one.injection) + ":" +
            one.why;
  }
  return text;
}

class ReportableResult : public testing::TestWithParam<Case> {
 protected:
  ReportableResult() {
    for (const One& one : GetParam().injections) {
      ResultRow& row = night_.add("W-1", one.status, one.result, one.dilution);
      if (one.status == kWithheld) row.reasons = {"saturated"};
      row.reported = "as in results.csv";
    }
  }

  SampleResults night_;
};

TEST_P(ReportableResult, OneASample) {
  const Case& wanted = GetParam();
  const std::vector<ReportableRow> rows = night_.reportable();
  ASSERT_EQ(rows.size(), 1U);
  const ReportableRow& row = rows.front();
  EXPECT_EQ(row.status, wanted.status);
  ASSERT_EQ(row.result.has_value(), wanted.result.has_value());
  if (wanted.result) {
    EXPECT_TRUE(same_bits(*row.result, *wanted.result));
  }
  EXPECT_EQ(row.injections, wanted.counting);
  EXPECT_EQ(row.reported, wanted.counting.size() == 1 ? "as in results.csv"
                                                      : wanted.reported);
  EXPECT_EQ(text_of(row.rejected), wanted.rejected);
  EXPECT_EQ(row.dilution.has_value(), !wanted.counting.empty());
  EXPECT_EQ(row.value.kind == ReportedValue::Kind::Withheld,
            wanted.status == kWithheld);
}

// What `reported` was rounded from, also where the text is the injection's.
TEST_P(ReportableResult, TheTextFollowsFromNumbersAndStatus) {
  const Case& wanted = GetParam();
  const ReportableRow row = night_.reportable().front();
  ReportedNumbers numbers{row.result, row.detection_limit,
                          row.quantitation_limit, std::nullopt};
  if (row.dilution) numbers.highest = 100.0 * *row.dilution;
  EXPECT_EQ(reported_text(row.status, numbers, {}), wanted.reported);
}

INSTANTIATE_TEST_SUITE_P(Cases, ReportableResult, testing::ValuesIn(kCases),
                         [](const auto& tested) { return tested.param.name; });

TEST(ReportableRules, EachDecidesSomewhere) {
  std::set<std::string_view> deciding;
  const auto decide = [&](const SampleResults& night) {
    const auto samples =
        repeats_of_samples(night.judgement.results, night.judgement.sets,
                           night.sequence, night.units);
    for (const ReportableRule& rule : reportable_rules()) {
      if (!rule.holds(samples.front().repeats)) continue;
      deciding.insert(rule.when);
      return;
    }
    ADD_FAILURE() << "no rule decides";
  };
  for (const Case& one : kCases) {
    SampleResults night;
    for (const One& injection : one.injections) {
      night.add("W-1", injection.status, injection.result, injection.dilution);
    }
    decide(night);
  }
  SampleResults far_apart;
  far_apart.add("W-1", kWithheld, 4.0).reasons = {"dilutions-disagree"};
  decide(far_apart);
  EXPECT_EQ(deciding.size(), reportable_rules().size());
}

TEST(ReportableResults, SamplesByNameAndUnitOnly) {
  SampleResults night;
  night.add("a", kInRange, 8.0, 1.0, Role::Sample, "");
  night.add("blank", kUnseen, 0.0, 1.0, Role::MethodBlank);
  night.add("b", kInRange, 9.0);
  night.add("a", kInRange, 8.5, 1.0, Role::Duplicate);
  night.add("a", kInRange, 7.0, 1.0, Role::Sample, "river");
  night.add("a", kInRange, 7.0, 1.0, Role::Sample, "wells");
  night.add("b", kInRange, 0.4).unit = "mg/kg";
  const std::vector<ReportableRow> rows = night.reportable();
  ASSERT_EQ(rows.size(), 3U);
  EXPECT_EQ(rows[0].sample, "a");
  EXPECT_EQ(rows[0].injections, (std::vector<int>{1, 5, 6}));
  EXPECT_EQ(rows[0].groups, (std::vector<std::string>{"river", "wells"}));
  EXPECT_EQ(rows[1].first_injection, 3);
  EXPECT_EQ(rows[2].unit, "mg/kg");
}

TEST(ReportableResults, LettersReasonsAndLimitsOfAllThatCount) {
  SampleResults night;
  ResultRow& first = night.add("a", kLow, 2.0);
  first.qualifier = "J";
  first.reasons = {"no-closing-check", "below-quantitation-limit"};
  ResultRow& second = night.add("a", kLow, 2.5);
  second.qualifier = "JB";
  second.reasons = {"above-range", "below-quantitation-limit"};
  second.detection_limit = 1.25;
  const ReportableRow row = night.reportable().front();
  EXPECT_EQ(row.qualifier, "JB");
  EXPECT_EQ(row.reasons,
            (std::vector<std::string>{"above-range", "no-closing-check",
                                      "below-quantitation-limit"}));
  EXPECT_TRUE(same_bits(*row.detection_limit, 1.25));
  EXPECT_TRUE(same_bits(*row.quantitation_limit, 3.0));
}

TEST(ReportableResults, WithoutOneOfTheNumbersThereIsNoMean) {
  SampleResults night;
  night.add("a", kAbove, 140.0);
  night.add("a", kAbove, 0.0).result.reset();
  const ReportableRow row = night.reportable().front();
  EXPECT_FALSE(row.result);
  EXPECT_EQ(row.reported, "> 100");
  EXPECT_EQ(row.injections, (std::vector<int>{1, 2}));
}

}  // namespace
}  // namespace loqsmith
