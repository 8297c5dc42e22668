#include <array>

#include "judgement/night_builder.hpp"
#include "loqsmith/judgement/acceptance_names.hpp"
#include "loqsmith/judgement/calibration_checks.hpp"
#include "loqsmith/judgement/check_standards.hpp"
#include "loqsmith/judgement/trace_checks.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::line;
using test::NightBuilder;
using test::rows_of;
using test::same_bits;

using Governs = CheckStandardAcceptance::Governs;

CalibrationSet set_of(Calibration calibration) {
  CalibrationSet set;
  set.set = "1";
  set.calibration = std::move(calibration);
  return set;
}

AnalyteRules asking(const CalibrationAcceptance& acceptance) {
  AnalyteRules settings;
  settings.analyte = "zinol";
  settings.acceptance.calibration = acceptance;
  return settings;
}

TEST(CalibrationChecks, NothingAskedNothingChecked) {
  const auto verdict = check_calibration({}, set_of(line(2.0, 1.0, 100.0)));
  EXPECT_FALSE(verdict.failed);
  EXPECT_TRUE(verdict.rows.empty());
}

TEST(CalibrationChecks, NoCalibrationFailsWithItsReason) {
  CalibrationSet set;
  set.calibration = NotApplicable{"slope not positive"};
  const auto verdict = check_calibration(asking({}), set);
  EXPECT_TRUE(verdict.failed);
  ASSERT_EQ(verdict.rows.size(), 1U);
  EXPECT_EQ(verdict.rows[0].passed, false);
  EXPECT_EQ(verdict.rows[0].note, "no calibration: slope not positive");
}

using Acceptance = CalibrationAcceptance;

struct CriterionCase {
  const char* name;
  void (*ask)(Acceptance&);
  bool failed;
};

CalibrationVerdict check_asking(void (*ask)(Acceptance&),
                                const CalibrationSet& set) {
  Acceptance acceptance;
  ask(acceptance);
  return check_calibration(asking(acceptance), set);
}

// line() has 7 levels, all accepted, r2 0.999 and RSE 3 %.
TEST(CalibrationChecks, EachCriterionAtItsLimitAndBeyond) {
  const std::array<CriterionCase, 9> cases{{
      {"levels at limit", [](Acceptance& a) { a.minimum_levels = 7; }, false},
      {"levels missed", [](Acceptance& a) { a.minimum_levels = 8; }, true},
      {"r2 at limit", [](Acceptance& a) { a.minimum_r2 = 0.999; }, false},
      {"r2 missed", [](Acceptance& a) { a.minimum_r2 = 0.9991; }, true},
      {"RSE at limit",
       [](Acceptance& a) { a.maximum_relative_standard_error = 3.0; }, false},
      {"RSE missed",
       [](Acceptance& a) { a.maximum_relative_standard_error = 2.99; }, true},
      {"accepted at limit",
       [](Acceptance& a) { a.minimum_accepted_percent = 100.0; }, false},
      {"accepted missed",
       [](Acceptance& a) { a.minimum_accepted_percent = 100.1; }, true},
      {"defaults alone", [](Acceptance&) {}, false},
  }};
  for (const CriterionCase& c : cases) {
    const auto verdict = check_asking(c.ask, set_of(line(2.0, 1.0, 100.0)));
    EXPECT_EQ(verdict.failed, c.failed) << c.name;
  }
}

TEST(CalibrationChecks, RelativeStandardErrorThatDoesNotExistFails) {
  Calibration calibration = line(2.0, 1.0, 100.0);
  calibration.relative_standard_error.reset();
  const auto verdict = check_asking(
      [](Acceptance& a) { a.maximum_relative_standard_error = 20.0; },
      set_of(calibration));
  EXPECT_TRUE(verdict.failed);
}

TEST(CalibrationChecks, AFailingLevelNarrowsTheRangeAndOnlyManyFail) {
  Calibration calibration = line(2.0, 1.0, 100.0);
  calibration.levels[0].mean_deviation_percent = -22.0;
  calibration.levels[0].accepted = false;
  CalibrationAcceptance acceptance;
  acceptance.back_calculation_percent = 15.0;
  acceptance.back_calculation_lowest_percent = 20.0;
  auto verdict = check_calibration(asking(acceptance), set_of(calibration));
  EXPECT_FALSE(verdict.failed);  // 6 of 7 are 86 %
  int failed = 0;
  for (const CheckRow& row : verdict.rows) failed += row.passed == false;
  EXPECT_EQ(failed, 1);
  const CheckRow& lowest = verdict.rows[1];
  EXPECT_EQ(lowest.note, "back-calculation-lowest: level at 1");
  EXPECT_TRUE(same_bits(*lowest.high, 20.0));
  EXPECT_EQ(lowest.affects, "the accepted range");
  EXPECT_EQ(lowest.action, "");

  calibration.levels[1].accepted = false;
  EXPECT_TRUE(
      check_calibration(asking(acceptance), set_of(calibration)).failed);
}

TEST(CalibrationChecks, UnmeasuredLevelsCountAsNotAccepted) {
  Calibration calibration = line(2.0, 1.0, 100.0);
  calibration.levels.resize(6);
  CalibrationSet set = set_of(calibration);
  set.unmeasured = {{7, "top", 100.0, "file-refused"},
                    {8, "top", 100.0, "file-refused"},
                    {9, "next", 110.0, "file-refused"}};
  const auto rows = check_calibration(asking({}), set).rows;
  EXPECT_TRUE(same_bits(*rows.back().value, 75.0));  // 6 of 8
  EXPECT_EQ(rows.back().passed, true);
}

TEST(CheckStandards, RecoveryAtTheLimitsPasses) {
  NightBuilder night;
  for (const double area : {170.0, 169.9, 230.0, 230.1}) {
    night.add_level(Role::CheckStandard, 100.0, area);
  }
  const auto outcomes = judge_check_standards(
      night.collect(), line(2.0, 1.0, 200.0), {85.0, 115.0});
  ASSERT_EQ(outcomes.size(), 4U);
  EXPECT_TRUE(same_bits(*outcomes[0].recovery_percent, 85.0));
  EXPECT_TRUE(outcomes[0].passed);
  EXPECT_FALSE(outcomes[1].passed);
  EXPECT_TRUE(outcomes[2].passed);
  EXPECT_FALSE(outcomes[3].passed);
}

TEST(CheckStandards, UnreadableOnesCountAsFailed) {
  NightBuilder night;
  night.add_level(Role::CheckStandard, 100.0, 200.0).peak =
      NotApplicable{"file-refused: cut off"};
  const auto outcomes = judge_check_standards(
      night.collect(), line(2.0, 1.0, 200.0), {85.0, 115.0});
  ASSERT_EQ(outcomes.size(), 1U);
  EXPECT_FALSE(outcomes[0].passed);
  EXPECT_EQ(outcomes[0].note, "file-refused: cut off");
}

TEST(CheckStandards, OnlyLevelsThatContainTheAnalyteCount) {
  NightBuilder night;
  night.add(Role::CheckStandard, 200.0).injection.level = "another";
  night.add_level(Role::CheckStandard, 0.0, 0.0);
  const auto outcomes = judge_check_standards(
      night.collect(), line(2.0, 1.0, 200.0), {85.0, 115.0});
  EXPECT_TRUE(outcomes.empty());
  const auto rows = check_standard_rows(outcomes, {}, "zinol");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_FALSE(rows[0].passed.has_value());
}

std::vector<CheckStandardOutcome> at(
    std::initializer_list<std::pair<int, bool>> places) {
  std::vector<CheckStandardOutcome> outcomes;
  for (const auto& [injection, passed] : places) {
    outcomes.push_back({injection, 100.0, passed, ""});
  }
  return outcomes;
}

/// One letter an injection from 1: '.' fine, 'F' failed, 'n' no closing check.
std::string governed_text(const std::vector<CheckStandardOutcome>& outcomes,
                          Governs governs, int last) {
  std::string text;
  for (int i = 1; i <= last; ++i) {
    const Governed governed = governed_by(outcomes, governs, i);
    text += governed.failed ? 'F' : governed.no_closing ? 'n' : '.';
  }
  return text;
}

TEST(CheckStandards, AFailedOneReachesBackToTheLastPassingOne) {
  // Places 3 and 12 pass, 6 and 9 fail.
  const auto outcomes = at({{3, true}, {6, false}, {9, false}, {12, true}});
  EXPECT_EQ(governed_text(outcomes, Governs::Both, 14), "...FFFFFFFF.nn");
  EXPECT_EQ(governed_text(outcomes, Governs::Forward, 14), ".....FFFFFF...");
}

TEST(CheckStandards, WithoutAPassingOneItReachesToTheEnds) {
  EXPECT_EQ(governed_text(at({{3, false}}), Governs::Both, 5), "FFFFF");
  EXPECT_EQ(governed_text(at({{3, false}}), Governs::Forward, 5), "..FFF");
  EXPECT_EQ(governed_text({}, Governs::Both, 3), "nnn");
  EXPECT_EQ(governed_text({}, Governs::Forward, 3), "...");
}

TEST(CheckStandards, RowsSayWhatAFailedOneAffects) {
  const auto outcomes =
      at({{3, true}, {6, false}, {9, false}, {12, true}, {15, false}});
  CheckStandardAcceptance acceptance;
  auto rows = check_standard_rows(outcomes, acceptance, "zinol");
  ASSERT_EQ(rows.size(), 5U);
  EXPECT_EQ(rows[0].affects, "");
  EXPECT_EQ(rows[1].affects, "injections after 3 until injection 12");
  EXPECT_EQ(rows[2].affects, "injections after 3 until injection 12");
  EXPECT_EQ(rows[4].affects, "injections after 12 to the end");
  EXPECT_EQ(rows[1].action, "withhold");

  acceptance.governs = Governs::Forward;
  acceptance.action = CheckAction::Flag;
  rows = check_standard_rows(at({{6, false}}), acceptance, "zinol");
  EXPECT_EQ(rows[0].affects, "injections after 6 to the end");
  EXPECT_EQ(rows[0].action, "flag");
  acceptance.governs = Governs::Both;
  rows = check_standard_rows(at({{6, false}}), acceptance, "zinol");
  EXPECT_EQ(rows[0].affects, "injections from the first to the end");
}

TEST(AcceptanceNames, AbsentChecksAreSaidToBeUnchecked) {
  AcceptanceSettings acceptance;
  EXPECT_EQ(unchecked_rows(acceptance, "zinol").size(),
            acceptance_checks().size());
  acceptance.calibration.emplace();
  acceptance.check_standard.emplace();
  const auto rows = unchecked_rows(acceptance, "zinol");
  EXPECT_EQ(rows.size(), acceptance_checks().size() - 2);
  EXPECT_TRUE(rows_of(rows, "calibration").empty());
  EXPECT_TRUE(rows_of(rows, "check-standard").empty());
  ASSERT_EQ(rows_of(rows, "method-blank").size(), 1U);
  EXPECT_FALSE(rows_of(rows, "method-blank")[0].passed.has_value());
  EXPECT_EQ(rows_of(rows, "method-blank")[0].note,
            "not checked: the method does not ask for it");
}

TEST(TraceChecks, SaturationAndMissingTraces) {
  NightBuilder night;
  night.add(Role::Sample, 1.0);
  auto rows = check_traces(night.collect());
  ASSERT_EQ(rows.size(), 2U);
  EXPECT_EQ(rows[0].passed, true);
  EXPECT_EQ(rows[1].passed, true);

  night.add(Role::Sample, 1.0).peak.value().reasons = {"saturated"};
  night.add(Role::Sample, 1.0).peak = NotApplicable{"trace-missing: none fits"};
  rows = check_traces(night.collect());
  ASSERT_EQ(rows.size(), 2U);
  EXPECT_EQ(rows[0].check, "trace-missing");
  EXPECT_EQ(rows[0].injection, 3);
  EXPECT_EQ(rows[0].passed, false);
  EXPECT_EQ(rows[0].note, "trace-missing: none fits");
  EXPECT_EQ(rows[1].check, "saturation");
  EXPECT_EQ(rows[1].injection, 2);
}

}  // namespace
}  // namespace loqsmith
