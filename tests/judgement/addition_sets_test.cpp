#include "loqsmith/judgement/addition_sets.hpp"

#include <array>
#include <stdexcept>

#include "judgement/night_builder.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;
using test::has_word;
using test::NightBuilder;
using test::NightRow;
using test::rows_of;
using test::within_condition;
using Words = std::vector<std::string>;

// Half the sensitivity of the standards, as a matrix may have it.
constexpr double kInMatrix = 1.0;

void add_addition(NightBuilder& night, const std::string& parent, double amount,
                  double response) {
  NightRow& row = night.add_level(Role::AddedStandard, amount, response);
  row.injection.sample = parent + " + " + std::to_string(amount);
  row.injection.parent = parent;
}

// Blanks 1 to 7 (standard deviation 0.1), standards 8 to 14 on the line 2 x.
NightBuilder ordinary_night() {
  NightBuilder night;
  ProcedureSettings blanks;
  blanks.name = "blank-deviation";
  night.settings.limits.procedures = {blanks};
  night.settings.limits.floor_at_lowest_standard = false;
  night.settings.acceptance.calibration.emplace();
  for (const double response : {-0.1, 0.1, -0.1, 0.1, -0.1, 0.1, 0.0}) {
    night.add(Role::SolventBlank, response, false);
  }
  for (const double x : {1.0, 2.0, 5.0, 10.0, 20.0, 50.0, 100.0}) {
    night.standard(x);
  }
  return night;
}

// Sample W with 4 in the vial at 15, additions at 16 to 18, another at 19.
NightBuilder addition_night() {
  NightBuilder night = ordinary_night();
  night.add(Role::Sample, kInMatrix * 4.0).injection.sample = "W";
  for (const double amount : {2.0, 4.0, 8.0}) {
    add_addition(night, "W", amount, kInMatrix * (4.0 + amount));
  }
  night.add(Role::Sample, 8.0).injection.sample = "Z";
  return night;
}

const ResultRow& row_of(const AnalyteJudgement& judgement, int injection) {
  for (const ResultRow& row : judgement.results) {
    if (row.injection == injection) return row;
  }
  throw std::runtime_error("no row for injection " + std::to_string(injection));
}

bool has_row(const AnalyteJudgement& judgement, int injection) {
  for (const ResultRow& row : judgement.results) {
    if (row.injection == injection) return true;
  }
  return false;
}

TEST(AdditionSets, TheSampleIsFoundWhateverItsMatrixDoes) {
  NightBuilder night = addition_night();
  const AnalyteJudgement judgement = night.judge();
  ASSERT_EQ(judgement.sets.size(), 2U);
  EXPECT_EQ(judgement.sets[1].set, "addition:W");
  const ResultRow& sample = row_of(judgement, 15);
  EXPECT_EQ(sample.set, "addition:W");
  EXPECT_TRUE(within_condition(*sample.result, 4.0, 1e3));
  EXPECT_EQ(sample.status, Status::Reportable);
  EXPECT_EQ(sample.reported, "4.00");
  // By the standards it would have been half of that.
  const ResultRow& other = row_of(judgement, 19);
  EXPECT_EQ(other.set, "1");
  EXPECT_TRUE(within_condition(*other.result, 4.0, 1e3));
}

TEST(AdditionSets, AdditionsStandAmongTheStandardsAndHaveNoResult) {
  NightBuilder night = addition_night();
  const AnalyteJudgement judgement = night.judge();
  const CalibrationSet& set = judgement.sets[1];
  ASSERT_EQ(set.standards.size(), 4U);
  EXPECT_EQ(set.standards[0].injection, 15);
  EXPECT_EQ(set.standards[0].concentration, 0.0);
  EXPECT_EQ(set.standards[3].concentration, 8.0);
  EXPECT_TRUE(within_condition(*set.standards[3].back_calculated, 8.0, 1e3));
  EXPECT_EQ(judgement.sets[0].standards.size(), 7U);
  for (const int injection : {16, 17, 18}) {
    EXPECT_FALSE(has_row(judgement, injection)) << injection;
  }
  EXPECT_TRUE(has_row(judgement, 15));
}

// A published line (see standard_addition_test.cpp), through dilution and
// preparation: vial x 10 x 25 / 2 x 0.8.
TEST(AdditionSets, PublishedAmountThroughDilutionAndPreparation) {
  NightBuilder night = ordinary_night();
  night.units = {"ug/mL", "mg/kg", 0.8, "g", "mL"};
  const std::array<double, 7> responses{0.32, 0.41, 0.52, 0.60,
                                        0.70, 0.77, 0.89};
  for (std::size_t i = 0; i < responses.size(); ++i) {
    if (i == 0) {
      night.add(Role::Sample, responses[i]).injection.sample = "W";
    } else {
      add_addition(night, "W", 5.0 * static_cast<double>(i), responses[i]);
    }
    night.rows.back().injection.dilution = 10.0;
    night.rows.back().injection.sample_amount = 2.0;
    night.rows.back().injection.final_volume = 25.0;
  }
  const ResultRow row = row_of(night.judge(), 15);
  EXPECT_TRUE(agrees_to_digits(*row.vial_concentration, 17.26053640, 10));
  EXPECT_TRUE(agrees_to_digits(*row.result, 1726.053640, 10));
  EXPECT_TRUE(agrees_to_digits(*row.calibration_uncertainty, 203.32974, 8));
  EXPECT_EQ(row.unit, "mg/kg");
  const CalibrationSet set = night.judge().sets[1];
  ASSERT_TRUE(set.addition.has_value());
  EXPECT_TRUE(agrees_to_digits(set.addition->interval->lower, 15.43695871, 10));
  ASSERT_EQ(set.calibration->notes.size(), 1U);
  EXPECT_EQ(
      set.calibration->notes[0].rfind("standard addition: a/b = 17.26", 0), 0U);
}

// 3 s / b with the line's own slope, half of the standards'.
TEST(AdditionSets, LimitsFollowTheLinesSlope) {
  NightBuilder night = addition_night();
  const AnalyteJudgement judgement = night.judge();
  EXPECT_TRUE(agrees_to_digits(judgement.sets[0].limits.governing->detection,
                               0.15, 12));
  EXPECT_TRUE(agrees_to_digits(judgement.sets[1].limits.governing->detection,
                               0.30, 12));
  EXPECT_TRUE(
      agrees_to_digits(*row_of(judgement, 15).detection_limit, 0.30, 12));
}

TEST(AdditionSets, TheFloorIsTheLowestAmountAdded) {
  NightBuilder night = addition_night();
  night.settings.limits.floor_at_lowest_standard = true;
  const AnalyteJudgement judgement = night.judge();
  const auto& governing = judgement.sets[1].limits.governing;
  ASSERT_TRUE(governing);
  EXPECT_EQ(governing->quantitation, 2.0);
  EXPECT_EQ(governing->quantitation_procedure, "lowest-standard");
}

// Heights at totals of 4, 6, 8 and 12 over their noise; the established limit
// as given; residuals of points that follow the line exactly give none.
TEST(AdditionSets, EveryProcedureSaysWhatItCan) {
  NightBuilder night = addition_night();
  ProcedureSettings noise;
  noise.name = "signal-to-noise";
  ProcedureSettings established;
  established.name = "established";
  established.detection = 0.5;
  established.quantitation = 1.5;
  ProcedureSettings residual;
  residual.name = "calibration-residual";
  night.settings.limits.procedures = {established, noise, residual};
  const AnalyteJudgement judgement = night.judge();
  const LimitsOfAnalyte& limits = judgement.sets[1].limits;
  ASSERT_EQ(limits.rows.size(), 3U);
  EXPECT_EQ(limits.rows[0].estimate->detection, 0.5);
  ASSERT_TRUE(limits.rows[1].estimate) << limits.rows[1].estimate.reason();
  // Height 10 per unit of area, noise 1: 2 H / h = 3 at 0.15.
  EXPECT_TRUE(agrees_to_digits(*limits.rows[1].estimate->detection, 0.15, 10));
  EXPECT_FALSE(limits.rows[2].estimate.has_value());
}

TEST(AdditionSets, EveryInjectionOfTheSampleIsAPointAndHasTheResult) {
  NightBuilder night = addition_night();
  night.add(Role::Sample, kInMatrix * 4.2).injection.sample = "W";
  night.add(Role::Sample, 0.8).injection.sample = "W";
  night.rows.back().injection.dilution = 5.0;
  const AnalyteJudgement judgement = night.judge();
  EXPECT_EQ(judgement.sets[1].standards.size(), 5U);
  EXPECT_EQ(*row_of(judgement, 15).result, *row_of(judgement, 20).result);
  EXPECT_GT(*row_of(judgement, 15).result, 4.0);
  EXPECT_NE(*row_of(judgement, 15).response, *row_of(judgement, 20).response);
  // At another dilution it is another vial: judged by the standards.
  EXPECT_EQ(row_of(judgement, 21).set, "1");
  EXPECT_TRUE(within_condition(*row_of(judgement, 21).result, 2.0, 1e3));
}

TEST(AdditionSets, ALevelWithoutTheAnalyteIsNoPoint) {
  NightBuilder night = addition_night();
  NightRow& row = night.add(Role::AddedStandard, 90.0);
  row.injection.parent = "W";
  row.injection.level = "another mixture";
  const AnalyteJudgement judgement = night.judge();
  EXPECT_EQ(judgement.sets[1].standards.size(), 4U);
  EXPECT_TRUE(within_condition(*row_of(judgement, 15).result, 4.0, 1e3));

  // With no other there is no line at all.
  NightBuilder plain = ordinary_night();
  plain.add(Role::Sample, 8.0).injection.sample = "W";
  NightRow& only = plain.add(Role::AddedStandard, 90.0);
  only.injection.parent = "W";
  only.injection.level = "another mixture";
  const AnalyteJudgement by_standards = plain.judge();
  EXPECT_EQ(by_standards.sets.size(), 1U);
  EXPECT_EQ(row_of(by_standards, 15).set, "1");
}

TEST(AdditionSets, TooFewAdditionsWithhold) {
  NightBuilder night = ordinary_night();
  night.add(Role::Sample, 4.0).injection.sample = "W";
  add_addition(night, "W", 4.0, 8.0);
  const AnalyteJudgement judgement = night.judge();
  const ResultRow& row = row_of(judgement, 15);
  EXPECT_EQ(row.status, Status::Withheld);
  EXPECT_EQ(row.reasons, (Words{"no-calibration", "few-additions"}));
  const auto rows = rows_of(judgement.checks, "calibration");
  EXPECT_EQ(rows.back().set, "addition:W");
  EXPECT_EQ(rows.back().passed, false);
  EXPECT_NE(rows.back().note.find("few-additions"), std::string::npos);
  EXPECT_EQ(row_of(judgement, 1).status, Status::NotDetected);
}

TEST(AdditionSets, ALineThatDoesNotRiseWithholds) {
  NightBuilder night = addition_night();
  for (const std::size_t i : {15U, 16U, 17U}) {
    night.rows[i].peak = test::peak_of(3.0);
  }
  const ResultRow row = row_of(night.judge(), 15);
  EXPECT_EQ(row.status, Status::Withheld);
  EXPECT_EQ(row.reasons, (Words{"no-calibration", "slope-not-positive"}));
}

// The dilution of the additions was forgotten in the sheet: they make a line
// without the sample, and nobody takes the one for the other.
TEST(AdditionSets, AdditionsAtAnotherDilutionLackTheSample) {
  NightBuilder night = addition_night();
  night.rows[14].injection.dilution = 10.0;
  const AnalyteJudgement judgement = night.judge();
  ASSERT_EQ(judgement.sets.size(), 2U);
  ASSERT_FALSE(judgement.sets[1].calibration);
  EXPECT_EQ(
      judgement.sets[1].calibration.reason().rfind("no-sample-response: ", 0),
      0U);
  EXPECT_EQ(row_of(judgement, 15).set, "1");
}

TEST(AdditionSets, AnInjectionWithoutResponseIsNoPointAndHasNoResult) {
  NightBuilder night = addition_night();
  night.add(Role::Sample, 4.0).injection.sample = "W";
  night.rows.back().peak = NotApplicable{"file-refused: cut off"};
  night.rows[16].peak = NotApplicable{"file-refused: cut off"};
  const AnalyteJudgement judgement = night.judge();
  EXPECT_EQ(judgement.sets[1].unmeasured.size(), 2U);
  EXPECT_TRUE(within_condition(*row_of(judgement, 15).result, 4.0, 1e3));
  EXPECT_EQ(row_of(judgement, 20).status, Status::Withheld);
  EXPECT_EQ(row_of(judgement, 20).reasons, Words{"file-refused"});
  EXPECT_FALSE(row_of(judgement, 20).result.has_value());
}

TEST(AdditionSets, ASaturatedAdditionIsLeftOut) {
  NightBuilder night = addition_night();
  night.rows[17].peak = test::peak_of(9.0);
  night.rows[17].peak.value().reasons = {"saturated"};
  const AnalyteJudgement judgement = night.judge();
  EXPECT_TRUE(within_condition(*row_of(judgement, 15).result, 4.0, 1e3));
  EXPECT_FALSE(judgement.sets[1].standards[3].used);
  EXPECT_EQ(judgement.sets[1].standards[3].note, "saturated");
}

TEST(AdditionSets, AnAmountBeyondTheAdditionsIsSaidToBe) {
  NightBuilder night = ordinary_night();
  night.add(Role::Sample, 40.0).injection.sample = "W";
  for (const double amount : {2.0, 4.0, 8.0}) {
    add_addition(night, "W", amount, 40.0 + amount);
  }
  const ResultRow row = row_of(night.judge(), 15);
  EXPECT_EQ(row.status, Status::Reportable);
  EXPECT_EQ(row.reasons, Words{"beyond-additions"});
}

TEST(AdditionSets, MinimumR2AppliesToTheLineAsWell) {
  NightBuilder night = addition_night();
  night.settings.acceptance.calibration->minimum_r2 = 0.99;
  EXPECT_EQ(row_of(night.judge(), 15).status, Status::Reportable);
  night.rows[16].peak = test::peak_of(11.0);
  const AnalyteJudgement judgement = night.judge();
  EXPECT_EQ(row_of(judgement, 15).status, Status::Withheld);
  EXPECT_EQ(row_of(judgement, 15).reasons.front(), "calibration-failed");
  // The standards passed theirs.
  EXPECT_EQ(row_of(judgement, 19).status, Status::Reportable);
}

// A failed check standard says that the standards' curve does not hold; the
// line of additions does not rest on it.
TEST(AdditionSets, CheckStandardsSpeakOfTheStandardsCurve) {
  NightBuilder night = addition_night();
  night.settings.acceptance.check_standard.emplace();
  night.add_level(Role::CheckStandard, 20.0, 100.0);
  const AnalyteJudgement judgement = night.judge();
  EXPECT_EQ(row_of(judgement, 15).status, Status::Reportable);
  EXPECT_EQ(row_of(judgement, 19).status, Status::Withheld);
}

TEST(AdditionSets, WorksInsideBrackets) {
  NightBuilder night = addition_night();
  night.settings.calibration.sets = CalibrationSettings::Sets::Bracketing;
  const AnalyteJudgement judgement = night.judge();
  EXPECT_TRUE(row_of(judgement, 15).reasons.empty());
  EXPECT_EQ(row_of(judgement, 19).reasons, Words{"no-closing-standards"});
}

}  // namespace
}  // namespace loqsmith
