#include <gtest/gtest.h>

#include <algorithm>

#include "judgement/night_builder.hpp"
#include "loqsmith/judgement/amended_results.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;
using test::has_word;
using test::NightBuilder;
using Words = std::vector<std::string>;

constexpr int kOdd = 12;     // the standard of 20, read at half
constexpr int kSample = 15;  // 10
constexpr int kLow = 16;     // below every limit

NightBuilder ordinary_night() {
  NightBuilder night;
  ProcedureSettings blanks;
  blanks.name = "blank-deviation";
  night.settings.limits.procedures = {blanks};
  night.settings.limits.floor_at_lowest_standard = false;
  for (const double response : {-0.1, 0.1, -0.1, 0.1, -0.1, 0.1, 0.0}) {
    night.add(Role::SolventBlank, response, false);
  }
  for (const double x : {1.0, 2.0, 5.0, 10.0, 20.0, 50.0, 100.0}) {
    night.standard(x);
  }
  night.add(Role::Sample, 20.0);
  night.add(Role::Sample, 0.0, false);
  return night;
}

NightBuilder night_with_odd_standard() {
  NightBuilder night = ordinary_night();
  night.rows[kOdd - 1].peak = test::peak_of(20.0);
  return night;
}

const ResultRow& row_of(const AnalyteJudgement& judgement, int injection) {
  return *std::find_if(
      judgement.results.begin(), judgement.results.end(),
      [&](const ResultRow& row) { return row.injection == injection; });
}

TEST(Amended, AnExcludedStandardIsNotInTheFit) {
  NightBuilder night = night_with_odd_standard();
  const AnalyteJudgement automatic = night.judge();
  EXPECT_GT(std::abs(*row_of(automatic, kSample).result - 10.0), 0.05);
  night.settings.decisions.excluded_standards = {kOdd};
  const AnalyteJudgement amended = night.judge();
  EXPECT_TRUE(agrees_to_digits(*row_of(amended, kSample).result, 10.0, 9));
  const auto& points = amended.sets[0].calibration->points;
  ASSERT_EQ(points.size(), 7U);
  const StandardPoint& odd = points[4];
  EXPECT_EQ(odd.injection, kOdd);
  EXPECT_FALSE(odd.used);
  EXPECT_EQ(odd.note, "excluded-by-amendment");
}

TEST(Amended, AnExcludedZeroStandardIsNoBlankEither) {
  NightBuilder night = night_with_odd_standard();
  night.standard(0.0);
  EXPECT_EQ(night.judge().sets[0].blanks.size(), 8U);
  night.settings.decisions.excluded_standards = {17};
  EXPECT_EQ(night.judge().sets[0].blanks.size(), 7U);
}

TEST(Amended, AnInvalidInjectionIsWithheldAndCountsNowhere) {
  NightBuilder night = night_with_odd_standard();
  night.add(Role::SolventBlank, 0.05, false);
  night.settings.decisions.invalid_injections = {1, kOdd, kSample};
  const AnalyteJudgement amended = night.judge();
  const ResultRow& sample = row_of(amended, kSample);
  EXPECT_EQ(sample.status, Status::Withheld);
  EXPECT_EQ(sample.reasons, Words{"invalid-injection"});
  EXPECT_FALSE(sample.result);
  EXPECT_EQ(amended.sets[0].blanks.size(), 7U);
  ASSERT_EQ(amended.sets[0].unmeasured.size(), 1U);
  EXPECT_EQ(amended.sets[0].unmeasured[0].note, "invalid-injection");
}

TEST(Amended, AStatusIsOverriddenAndTheNumberStays) {
  NightBuilder night = ordinary_night();
  const ResultRow before = row_of(night.judge(), kSample);
  EXPECT_EQ(before.status, Status::Reportable);
  const std::vector<std::tuple<Status, std::string, std::string>> expected{
      // 3 s / b = 0.15 and a last bit, rounded up.
      {Status::NotDetected, "< 0.151", "U"},
      {Status::Estimated, before.reported, "J"},
      {Status::AboveRange, "> 100", "E"},
      {Status::Withheld, "withheld", "R"}};
  for (const auto& [status, reported, letter] : expected) {
    night.settings.decisions.statuses = {{kSample, status}};
    const ResultRow row = row_of(night.judge(), kSample);
    EXPECT_EQ(row.status, status);
    EXPECT_EQ(row.reported, reported);
    EXPECT_EQ(row.qualifier, letter);
    EXPECT_EQ(row.reasons, Words{"status-overridden"});
    EXPECT_TRUE(test::same_bits(*row.result, *before.result));
  }
}

TEST(Amended, AStatusThatNothingCanBePrintedForIsNotTaken) {
  NightBuilder night = ordinary_night();
  night.rows[kSample - 1].peak = NotApplicable{"file-refused: cut off"};
  night.settings.decisions.statuses = {{kSample, Status::Reportable}};
  const ResultRow row = row_of(night.judge(), kSample);
  EXPECT_EQ(row.status, Status::Withheld);
  EXPECT_EQ(row.reported, "withheld");
  EXPECT_EQ(row.reasons, (Words{"override-not-possible", "file-refused"}));
}

TEST(Amended, WhatAnAmendmentTouchesShowsBothNumbers) {
  NightBuilder night = ordinary_night();
  const std::vector<ResultRow> automatic = night.judge().results;
  night.settings.decisions.statuses = {{kSample, Status::Withheld},
                                       {kLow, Status::NotDetected}};
  std::vector<ResultRow> rows = night.judge().results;
  Amendment withheld;
  withheld.what = Amendment::What::OverrideStatus;
  withheld.injection = kSample;
  withheld.analyte = "zinol";
  Amendment same = withheld;  // changes nothing, but is in force
  same.injection = kLow;
  mark_amended(rows, automatic, {withheld, same}, "");
  for (std::size_t i = 0; i < rows.size(); ++i) {
    const bool touched =
        rows[i].injection == kSample || rows[i].injection == kLow;
    ASSERT_EQ(rows[i].automatic.has_value(), touched);
    EXPECT_EQ(has_word(rows[i].reasons, "amended-unsigned"), touched);
    if (!touched) continue;
    EXPECT_EQ(rows[i].automatic->result, automatic[i].result);
    EXPECT_EQ(rows[i].automatic->status, automatic[i].status);
    EXPECT_EQ(rows[i].automatic->reported, automatic[i].reported);
  }
  const auto first = std::find_if(
      rows.begin(), rows.end(),
      [](const ResultRow& row) { return row.injection == kSample; });
  EXPECT_EQ(first->reasons, (Words{"status-overridden", "amended-unsigned"}));
}

}  // namespace
}  // namespace loqsmith
