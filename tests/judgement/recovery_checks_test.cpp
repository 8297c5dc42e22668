// Standards of another source, and laboratory control samples.

#include <cmath>

#include "judgement/quality_night.hpp"
#include "loqsmith/judgement/recovery.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::add_found;
using test::add_known;
using test::NightBuilder;
using test::quality_night;
using test::rows_of;
using test::same_bits;
using test::with_word;
using test::within_condition;

using Numbers = std::vector<int>;

RecoveryAcceptance between(double low, double high) {
  return {CheckAction::Withhold, {low, high}};
}

TEST(Recovery, Formulas) {
  EXPECT_TRUE(same_bits(recovery_percent(9.0, 10.0), 90.0));
  EXPECT_TRUE(same_bits(added_recovery_percent(14.0, 5.0, 10.0), 90.0));
  EXPECT_TRUE(same_bits(added_recovery_percent(9.0, -1.0, 10.0), 100.0));
}

TEST(SecondSource, PassesWithinItsRange) {
  NightBuilder night = quality_night();
  night.settings.acceptance.second_source = between(70.0, 130.0);
  add_known(night, Role::SecondSource, 10.0, 9.0);
  add_found(night, Role::Sample, 4.0, "W1");
  const AnalyteJudgement judged = night.judge();
  const auto rows = rows_of(judged.checks, "second-source");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_TRUE(within_condition(*rows[0].value, 90.0, 1e3));
  EXPECT_EQ(rows[0].injection, 14);
  EXPECT_TRUE(same_bits(*rows[0].low, 70.0));
  EXPECT_TRUE(same_bits(*rows[0].high, 130.0));
  EXPECT_EQ(rows[0].unit, "%");
  EXPECT_EQ(rows[0].passed, true);
  EXPECT_EQ(rows[0].action, "withhold");
  EXPECT_EQ(with_word(judged, "second-source-failed"), Numbers{});
  EXPECT_EQ(judged.results.back().status, Status::Reportable);
}

TEST(SecondSource, AFailedOneAffectsTheWholeAnalyte) {
  NightBuilder night = quality_night();
  night.settings.acceptance.second_source = between(95.0, 105.0);
  add_known(night, Role::SecondSource, 10.0, 10.0);
  add_known(night, Role::SecondSource, 20.0, 18.0);
  add_found(night, Role::Sample, 4.0, "W1");
  AnalyteJudgement judged = night.judge();
  const auto rows = rows_of(judged.checks, "second-source");
  ASSERT_EQ(rows.size(), 2U);
  EXPECT_EQ(rows[0].passed, true);
  EXPECT_EQ(rows[1].passed, false);
  EXPECT_EQ(rows[1].affects, "all results of the analyte");
  EXPECT_EQ(with_word(judged, "second-source-failed").size(),
            judged.results.size());
  EXPECT_EQ(judged.results.back().status, Status::Withheld);

  night.settings.acceptance.second_source->action = CheckAction::Flag;
  judged = night.judge();
  EXPECT_EQ(judged.results.back().status, Status::Reportable);
  EXPECT_EQ(judged.results.back().reasons,
            std::vector<std::string>{"second-source-failed"});
}

// The number decides that is published: at a limit counts as within.
TEST(SecondSource, EndsOfTheRangeBelongToIt) {
  NightBuilder night = quality_night();
  night.settings.acceptance.second_source = between(0.0, 200.0);
  add_known(night, Role::SecondSource, 10.0, 9.0);
  const auto verdict = [&](double low, double high) {
    night.settings.acceptance.second_source = between(low, high);
    return rows_of(night.judge().checks, "second-source").at(0).passed;
  };
  const double value =
      *rows_of(night.judge().checks, "second-source").at(0).value;
  EXPECT_EQ(verdict(value, 130.0), true);
  EXPECT_EQ(verdict(70.0, value), true);
  EXPECT_EQ(verdict(std::nextafter(value, 200.0), 130.0), false);
  EXPECT_EQ(verdict(70.0, std::nextafter(value, 0.0)), false);
}

TEST(SecondSource, WithoutANumberNothingShowsThatItHeld) {
  NightBuilder night = quality_night();
  night.settings.acceptance.second_source = between(70.0, 130.0);
  add_known(night, Role::SecondSource, 10.0, 9.0).peak =
      NotApplicable{"file-refused: cut off"};
  const AnalyteJudgement judged = night.judge();
  const auto rows = rows_of(judged.checks, "second-source");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_FALSE(rows[0].value);
  EXPECT_EQ(rows[0].passed, false);
  EXPECT_EQ(rows[0].note, "file-refused: cut off");
  EXPECT_FALSE(with_word(judged, "second-source-failed").empty());
}

TEST(SecondSource, AbsentOrUncalibratedIsUnchecked) {
  NightBuilder night = quality_night();
  night.settings.acceptance.second_source = between(70.0, 130.0);
  night.add(Role::SecondSource, 9.0);  // its level lacks the analyte
  auto rows = rows_of(night.judge().checks, "second-source");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_FALSE(rows[0].passed);
  EXPECT_EQ(rows[0].note, "not checked: no second source contains the analyte");

  add_known(night, Role::SecondSource, 10.0, 9.0);
  rows =
      rows_of(night.judge("no peak in any standard").checks, "second-source");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_FALSE(rows[0].passed);
  EXPECT_EQ(rows[0].note, "not checked: no calibration");

  night.settings.acceptance.second_source.reset();
  rows = rows_of(night.judge().checks, "second-source");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_EQ(rows[0].note, "not checked: the method does not ask for it");
}

// Injections 14 and 15 stand in batch A, 16 and 17 in none, 18 in batch B; 19
// was never prepared.
NightBuilder batches() {
  NightBuilder night = quality_night();
  night.settings.acceptance.control = between(80.0, 120.0);
  add_known(night, Role::Control, 10.0, 10.0).injection.prep = "A";
  add_found(night, Role::Sample, 4.0, "W1").injection.prep = "A";
  add_known(night, Role::Control, 10.0, 10.0);
  add_found(night, Role::Sample, 4.0, "W2");
  add_found(night, Role::Sample, 4.0, "W3").injection.prep = "B";
  add_known(night, Role::CheckStandard, 10.0, 10.0);
  return night;
}

TEST(Control, AFailedOneAffectsItsBatch) {
  NightBuilder night = batches();
  EXPECT_EQ(with_word(night.judge(), "control-failed"), Numbers{});

  night.rows[13].peak = test::peak_of(15.0);
  AnalyteJudgement judged = night.judge();
  const auto rows = rows_of(judged.checks, "control");
  ASSERT_EQ(rows.size(), 2U);
  EXPECT_TRUE(within_condition(*rows[0].value, 75.0, 1e3));
  EXPECT_EQ(rows[0].passed, false);
  EXPECT_EQ(rows[0].affects, "batch A");
  EXPECT_EQ(rows[1].passed, true);
  EXPECT_EQ(rows[1].affects, "all prepared injections without a batch");
  EXPECT_EQ(with_word(judged, "control-failed"), (Numbers{14, 15}));

  night.rows[13].peak = test::peak_of(20.0);
  night.rows[15].peak = NotApplicable{"trace-missing: no chromatogram fits"};
  judged = night.judge();
  EXPECT_EQ(rows_of(judged.checks, "control").at(1).note,
            "trace-missing: no chromatogram fits");
  EXPECT_EQ(with_word(judged, "control-failed"), (Numbers{16, 17}));
}

// What its level states is in the sample: dilution and preparation count.
TEST(Control, IsJudgedInTheSample) {
  NightBuilder night = batches();
  night.units.sample_amount = "g";
  night.units.final_volume = "mL";
  night.units.factor = 0.5;
  Injection& control = night.rows[13].injection;
  control.dilution = 2.0;
  control.sample_amount = 5.0;
  control.final_volume = 10.0;
  const auto rows = rows_of(night.judge().checks, "control");
  EXPECT_TRUE(within_condition(*rows.at(0).value, 200.0, 1e3));
}

TEST(Control, AbsentIsUnchecked) {
  NightBuilder night = quality_night();
  night.settings.acceptance.control = between(80.0, 120.0);
  const auto rows = rows_of(night.judge().checks, "control");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_EQ(rows[0].note, "not checked: no control contains the analyte");
}

}  // namespace
}  // namespace loqsmith
