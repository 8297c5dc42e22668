#include "loqsmith/judgement/judge_analyte.hpp"

#include <array>

#include "judgement/night_builder.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;
using test::has_word;
using test::NightBuilder;
using test::NightRow;
using test::peak_of;
using test::rows_of;
using test::same_bits;

using Words = std::vector<std::string>;

/// Standards 1 to 100 on the line 2x; blanks with standard deviation 0.1, so
/// that 3 s / b = 0.15 and 10 s / b = 0.5; checks around the samples.
NightBuilder ordinary_night() {
  NightBuilder night;
  ProcedureSettings blanks;
  blanks.name = "blank-deviation";
  night.settings.limits.procedures = {blanks};
  night.settings.limits.floor_at_lowest_standard = false;
  night.settings.acceptance.calibration.emplace();
  night.settings.acceptance.calibration->back_calculation_percent = 15.0;
  night.settings.acceptance.check_standard.emplace();
  // Seven values with mean 0 and standard deviation 0.1.
  for (const double response : {-0.1, 0.1, -0.1, 0.1, -0.1, 0.1, 0.0}) {
    night.add(Role::SolventBlank, response, false);
  }
  for (const double x : {1.0, 2.0, 5.0, 10.0, 20.0, 50.0, 100.0}) {
    night.standard(x);
  }
  night.add_level(Role::CheckStandard, 20.0, 40.0);
  return night;
}

void close(NightBuilder& night) {
  night.add_level(Role::CheckStandard, 20.0, 40.0);
}

const ResultRow& row_of(const AnalyteJudgement& judgement, int injection) {
  for (const ResultRow& row : judgement.results) {
    if (row.injection == injection) return row;
  }
  throw std::runtime_error("no row for injection " + std::to_string(injection));
}

TEST(JudgeAnalyte, FromResponsesToReportedTexts) {
  NightBuilder night = ordinary_night();
  night.settings.limits.procedures[0].detection_factor = 3.333;  // 0.16665
  struct Expected {
    double area;
    bool found;
    Status status;
    const char* reported;
    const char* qualifier;
  };
  const std::array<Expected, 6> expected{{
      {0.02, false, Status::NotDetected, "< 0.167", "U"},
      {0.60, true, Status::Estimated, "0.300", "J"},
      {24.6, true, Status::Reportable, "12.3", ""},
      {300.0, true, Status::AboveRange, "> 100", "E"},
      {0.60, false, Status::Withheld, "withheld", "R"},
      {-0.2, false, Status::NotDetected, "< 0.167", "U"},
  }};
  const auto first = static_cast<int>(night.rows.size()) + 1;
  for (const Expected& e : expected) night.add(Role::Sample, e.area, e.found);
  close(night);
  const AnalyteJudgement judgement = night.judge();
  EXPECT_EQ(judgement.analyte, "zinol");
  EXPECT_EQ(judgement.concentration_unit, "ug/L");
  int injection = first;
  for (const Expected& e : expected) {
    const ResultRow& row = row_of(judgement, injection++);
    EXPECT_EQ(row.status, e.status) << e.area;
    EXPECT_EQ(row.reported, e.reported) << e.area;
    EXPECT_EQ(row.qualifier, e.qualifier) << e.area;
    EXPECT_EQ(row.set, "1");
    EXPECT_EQ(row.detection_procedure, "blank-deviation");
  }
}

TEST(JudgeAnalyte, LimitsComeFromTheBlanks) {
  NightBuilder night = ordinary_night();
  close(night);
  const AnalyteJudgement judgement = night.judge();
  ASSERT_EQ(judgement.sets.size(), 1U);
  const LimitsOfAnalyte& limits = judgement.sets[0].limits;
  ASSERT_TRUE(limits.governing.has_value());
  EXPECT_TRUE(agrees_to_digits(limits.governing->detection, 0.15, 12));
  EXPECT_TRUE(agrees_to_digits(limits.governing->quantitation, 0.5, 12));
  EXPECT_EQ(judgement.sets[0].standards.size(), 7U);
}

// Intervals of a weighted fit widen near zero by what blanks scatter; between
// found feet their scatter says nothing.
TEST(JudgeAnalyte, ACalibrationIsDiagnosedAndKnowsItsBlanks) {
  NightBuilder night = ordinary_night();
  night.settings.calibration.weight =
      CalibrationSettings::Weight::InverseXSquared;
  night.add(Role::Sample, 3.0, true);
  close(night);
  const AnalyteJudgement judgement = night.judge();
  const CalibrationSet& set = judgement.sets.at(0);
  ASSERT_TRUE(set.calibration && set.diagnostics && set.calibration->blanks);
  EXPECT_TRUE(agrees_to_digits(set.calibration->blanks->sd, 0.1, 12));
  EXPECT_TRUE(same_bits(set.calibration->blanks->degrees_of_freedom, 6.0));
  EXPECT_EQ(set.diagnostics->tests.front().name, "lack-of-fit");
  for (const ResultRow& row : judgement.results) {
    if (row.role != Role::Sample) continue;
    ASSERT_TRUE(row.calibration_interval && row.calibration_uncertainty);
    EXPECT_LT(row.calibration_interval->lower, *row.result);
    EXPECT_GT(row.calibration_interval->upper, *row.result);
    EXPECT_GT(*row.calibration_uncertainty, 0.0);
  }

  night.settings.bounds_own = true;
  EXPECT_FALSE(night.judge().sets.at(0).calibration->blanks);
}

TEST(JudgeAnalyte, ARowForEveryQuantifiedInjectionInRunOrder) {
  NightBuilder night = ordinary_night();
  night.add(Role::Conditioning, 1.0);
  night.add(Role::MethodBlank, 0.0, false);
  night.add_level(Role::LowSpike, 1.0, 2.0);
  night.add(Role::Sample, 3.0).peak = NotApplicable{"file-refused: cut off"};
  close(night);
  const AnalyteJudgement judgement = night.judge();
  std::vector<int> injections;
  for (const ResultRow& row : judgement.results) {
    injections.push_back(row.injection);
  }
  EXPECT_EQ(injections,
            (std::vector<int>{1, 2, 3, 4, 5, 6, 7, 15, 17, 18, 19, 20}));
}

TEST(JudgeAnalyte, EveryAcceptanceChildHasARow) {
  NightBuilder night = ordinary_night();
  close(night);
  const std::vector<CheckRow> checks = night.judge().checks;
  for (const char* name :
       {"calibration", "second-source", "check-standard", "solvent-blank",
        "method-blank", "control", "fortified", "duplicate", "surrogate",
        "internal-standard", "retention-time", "suitability", "carry-over",
        "second-trace", "established-limit", "confirmation", "closeness",
        "trace-missing", "saturation"}) {
    EXPECT_FALSE(rows_of(checks, name).empty()) << name;
  }
  for (const CheckRow& row : checks) {
    EXPECT_EQ(row.analyte, "zinol");
    EXPECT_NE(row.passed, false) << row.check << ": " << row.note;
  }
  EXPECT_EQ(rows_of(checks, "check-standard").size(), 2U);
  EXPECT_EQ(rows_of(checks, "calibration").size(), 9U);  // 7 levels, 2 more
}

TEST(JudgeAnalyte, AFailedClosingCheckReachesBack) {
  NightBuilder night = ordinary_night();  // check standard at 15
  night.add(Role::Sample, 24.6);          // 16
  close(night);                           // 17
  night.add(Role::Sample, 24.6);          // 18
  night.add_level(Role::CheckStandard, 20.0, 0.0).peak =
      NotApplicable{"file-refused: cut off"};  // 19
  night.add(Role::Sample, 24.6);               // 20
  const AnalyteJudgement judgement = night.judge();
  EXPECT_EQ(row_of(judgement, 16).status, Status::Reportable);
  EXPECT_EQ(row_of(judgement, 17).status, Status::Reportable);
  EXPECT_EQ(row_of(judgement, 18).status, Status::Withheld);
  EXPECT_EQ(row_of(judgement, 18).reasons, Words{"check-standard-failed"});
  EXPECT_EQ(row_of(judgement, 19).reasons,
            (Words{"file-refused", "check-standard-failed"}));
  EXPECT_EQ(row_of(judgement, 20).reasons,
            (Words{"check-standard-failed", "no-closing-check"}));
  EXPECT_EQ(rows_of(judgement.checks, "check-standard")[2].affects,
            "injections after 17 to the end");
}

TEST(JudgeAnalyte, FailedCalibrationWithholdsAllAndKeepsTheRows) {
  NightBuilder night = ordinary_night();
  night.add(Role::Sample, 24.6);
  close(night);
  const std::size_t rows = night.judge().results.size();
  night.settings.acceptance.calibration->minimum_levels = 8;
  const AnalyteJudgement withheld = night.judge();
  ASSERT_EQ(withheld.results.size(), rows);
  for (const ResultRow& row : withheld.results) {
    EXPECT_EQ(row.status, Status::Withheld);
    EXPECT_EQ(row.reasons.front(), "calibration-failed");
    EXPECT_TRUE(row.result.has_value());
  }
  night.settings.acceptance.calibration->action = CheckAction::Flag;
  const ResultRow flagged = row_of(night.judge(), 16);
  EXPECT_EQ(flagged.status, Status::Reportable);
  EXPECT_EQ(flagged.reasons, Words{"calibration-failed"});
}

TEST(JudgeAnalyte, NoUsableStandardsWithholdAllAndKeepTheRows) {
  NightBuilder night = ordinary_night();
  night.add(Role::Sample, 24.6);
  close(night);
  const std::size_t rows = night.judge().results.size();
  for (NightRow& row : night.rows) {
    if (row.injection.role == Role::Standard) {
      row.peak = NotApplicable{"file-refused: cut off"};
    }
  }
  const AnalyteJudgement judgement = night.judge();
  ASSERT_EQ(judgement.results.size(), rows);
  for (const ResultRow& row : judgement.results) {
    EXPECT_EQ(row.status, Status::Withheld);
    EXPECT_EQ(row.reasons, Words{"no-calibration"});
  }
  EXPECT_FALSE(judgement.sets[0].calibration.has_value());
  EXPECT_EQ(judgement.sets[0].unmeasured.size(), 7U);
  EXPECT_EQ(rows_of(judgement.checks, "calibration")[0].passed, false);
  EXPECT_FALSE(
      rows_of(judgement.checks, "check-standard")[0].passed.has_value());
}

TEST(JudgeAnalyte, UnlearnedAnalyteIsWithheldWithItsReason) {
  NightBuilder night = ordinary_night();
  night.add(Role::Sample, 24.6);
  for (NightRow& row : night.rows) {
    row.peak = NotApplicable{"not-learned: no peak fit to teach"};
  }
  const AnalyteJudgement judgement = night.judge("no peak fit to teach");
  EXPECT_EQ(judgement.results.size(), 9U);
  for (const ResultRow& row : judgement.results) {
    EXPECT_EQ(row.status, Status::Withheld);
    EXPECT_EQ(row.reasons, (Words{"not-learned", "no-calibration"}));
  }
  EXPECT_EQ(judgement.sets[0].calibration.reason(), "no peak fit to teach");
}

TEST(JudgeAnalyte, NoValidLimitWithholds) {
  NightBuilder night = ordinary_night();
  night.add(Role::Sample, 24.6);
  close(night);
  night.settings.limits.procedures.clear();
  const ResultRow row = row_of(night.judge(), 16);
  EXPECT_EQ(row.status, Status::Withheld);
  EXPECT_EQ(row.reasons, Words{"no-valid-limit"});
  EXPECT_TRUE(same_bits(*row.vial_concentration, *row.result));
}

TEST(JudgeAnalyte, NoAcceptedLevelWithholdsEvenWhereFlagged) {
  NightBuilder night = ordinary_night();
  // Levels all over the place: no mean back-calculation within 0.1 %.
  const std::array<double, 7> areas{2.5, 3.5, 11.0, 18.0, 43.0, 95.0, 203.0};
  for (std::size_t i = 0; i < areas.size(); ++i) {
    night.rows[7 + i].peak = peak_of(areas[i]);
  }
  night.add(Role::Sample, 24.6);
  night.settings.acceptance.calibration->action = CheckAction::Flag;
  night.settings.acceptance.calibration->back_calculation_percent = 0.1;
  night.settings.acceptance.check_standard.reset();
  const ResultRow row = row_of(night.judge(), 16);
  EXPECT_EQ(row.status, Status::Withheld);
  EXPECT_EQ(row.reasons, (Words{"no-accepted-level", "no-valid-limit",
                                "calibration-failed"}));
}

TEST(JudgeAnalyte, NarrowedRangeEndsAtTheHighestAcceptedLevel) {
  NightBuilder night = ordinary_night();
  night.rows[13].peak.value().reasons = {"saturated"};  // standard 100
  night.add(Role::Sample, 102.0);
  night.settings.acceptance.check_standard.reset();
  const AnalyteJudgement judgement = night.judge();
  EXPECT_EQ(row_of(judgement, 16).status, Status::AboveRange);
  EXPECT_EQ(row_of(judgement, 16).reported, "> 50.0");
  EXPECT_EQ(rows_of(judgement.checks, "saturation")[0].injection, 14);
}

TEST(JudgeAnalyte, InternalStandardFromEndToEnd) {
  NightBuilder night = ordinary_night();
  night.settings.internal_standard = "is1";
  for (NightRow& row : night.rows) {
    const bool blank = row.injection.role == Role::SolventBlank;
    row.internal_standard = peak_of(blank ? 0.0 : 100.0, !blank);
  }
  // Twice as much injected, in a vial diluted fivefold with its standard.
  NightRow& diluted = night.add(Role::Sample, 2.0 * 2.0 * 20.0);
  diluted.injection.dilution = 5.0;
  diluted.injection.internal_standard_dilution = 5.0;
  diluted.internal_standard = peak_of(2.0 * 100.0 / 5.0);
  night.add(Role::Sample, 24.6).internal_standard = peak_of(0.0, false);
  night.add_level(Role::CheckStandard, 20.0, 40.0).internal_standard =
      peak_of(100.0);
  const AnalyteJudgement judgement = night.judge();

  const ResultRow& sample = row_of(judgement, 16);
  EXPECT_TRUE(agrees_to_digits(*sample.vial_concentration, 20.0, 12));
  EXPECT_TRUE(agrees_to_digits(*sample.result, 100.0, 12));
  EXPECT_EQ(sample.status, Status::Reportable);
  const ResultRow& without = row_of(judgement, 17);
  EXPECT_EQ(without.status, Status::Withheld);
  EXPECT_EQ(without.reasons, Words{"internal-standard-missing"});
  EXPECT_FALSE(without.response.has_value());
  // Blanks without internal standard still give the limits.
  EXPECT_TRUE(agrees_to_digits(judgement.sets[0].limits.governing->detection,
                               0.15, 12));
  EXPECT_TRUE(has_word(row_of(judgement, 1).reasons, "mean-internal-standard"));
}

TEST(JudgeAnalyte, ABlankAfterTheHighestStandardIsLeftOut) {
  NightBuilder night = ordinary_night();
  night.settings.acceptance.check_standard.reset();
  // Injection 15 is the check standard at 20; put a high sample before a blank
  // that carries over.
  night.add(Role::Sample, 150.0);
  night.add(Role::SolventBlank, 5.0, false);
  const AnalyteJudgement judgement = night.judge();
  EXPECT_TRUE(agrees_to_digits(judgement.sets[0].limits.governing->detection,
                               0.15, 12));
}

}  // namespace
}  // namespace loqsmith
