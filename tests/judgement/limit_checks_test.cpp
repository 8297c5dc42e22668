#include <array>
#include <string>

#include "judgement/night_builder.hpp"
#include "loqsmith/judgement/confirmation_check.hpp"
#include "loqsmith/judgement/established_limit_check.hpp"
#include "loqsmith/numerics/mean.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;
using test::has_word;
using test::line;
using test::NightBuilder;
using test::rows_of;
using test::same_bits;
using test::within_condition;

// US EPA 815-R-05-006 (2004), formula from memory; 3.963 for 7 results is
// printed there, the others were computed with another library.
TEST(HalfRange, Factors) {
  struct Row {
    std::size_t n;
    double factor;
  };
  for (const Row& row : std::array<Row, 7>{{{4, 6.530335},
                                            {5, 5.043533},
                                            {6, 4.355212},
                                            {7, 3.963407},
                                            {8, 3.711763},
                                            {9, 3.536889},
                                            {10, 3.408456}}}) {
    EXPECT_TRUE(agrees_to_digits(half_range_factor(row.n), row.factor, 7));
  }
  EXPECT_TRUE(agrees_to_digits(half_range_factor(7), 3.963, 4));
}

const std::vector<double> kFailing = {.45, .55, .62, .40, .52, .47, .50};
const std::vector<double> kPassing = {.47, .52, .55, .46, .52, .47, .50};
constexpr double kPrinted = 3.963;

// Seven spikes at a reporting level of 0.5, with the printed factor.
TEST(HalfRange, TwoExamples) {
  const double sd = standard_deviation(kFailing);
  EXPECT_TRUE(agrees_to_digits(mean(kFailing), 0.50142857, 8));
  EXPECT_TRUE(agrees_to_digits(sd, 0.07151423, 7));
  EXPECT_TRUE(agrees_to_digits(kPrinted * sd, 0.28341091, 8));
  const auto wide = half_range_interval(mean(kFailing), sd, kPrinted);
  EXPECT_TRUE(agrees_to_digits(200.0 * wide.upper, 156.967896, 9));
  EXPECT_TRUE(agrees_to_digits(200.0 * wide.lower, 43.603532, 8));

  const double less = standard_deviation(kPassing);
  EXPECT_TRUE(agrees_to_digits(mean(kPassing), 0.49857143, 8));
  EXPECT_TRUE(agrees_to_digits(less, 0.03338092, 7));
  EXPECT_TRUE(agrees_to_digits(kPrinted * less, 0.13228858, 8));
  const auto narrow = half_range_interval(mean(kPassing), less, kPrinted);
  EXPECT_TRUE(agrees_to_digits(200.0 * narrow.upper, 126.172002, 9));
  EXPECT_TRUE(agrees_to_digits(200.0 * narrow.lower, 73.256570, 8));
}

AnalyteRules confirming() {
  AnalyteRules settings;
  settings.analyte = "zinol";
  settings.acceptance.confirmation.emplace();
  return settings;
}

/// A set whose governing quantitation limit is 0.5.
CalibrationSet set_with(double nominal, const std::vector<double>& found) {
  CalibrationSet set;
  set.calibration = line(2.0, 0.5, 100.0);
  GoverningLimits limits;
  limits.detection = 0.15;
  limits.quantitation = 0.5;
  set.limits.governing = limits;
  for (double one : found) {
    SpikeResult spike;
    spike.nominal_vial = nominal;
    spike.found_vial = one;
    set.low_spikes.push_back(spike);
  }
  return set;
}

TEST(Confirmation, Passes) {
  const LimitCheck check =
      check_confirmation(confirming(), set_with(0.5, kPassing));
  EXPECT_FALSE(check.failed);
  ASSERT_EQ(check.rows.size(), 4U);
  for (const CheckRow& row : check.rows) {
    EXPECT_EQ(row.passed, true) << row.note;
    EXPECT_EQ(row.action, "flag");
    EXPECT_EQ(row.unit, "%");
  }
  EXPECT_EQ(check.rows[0].note,
            "precision: relative standard deviation of 7 low spikes at 0.5, 1 "
            "times the quantitation limit");
  EXPECT_TRUE(
      agrees_to_digits(*check.rows[0].value, 100 * 0.03338092 / 0.49857143, 7));
  EXPECT_TRUE(agrees_to_digits(*check.rows[1].value, 99.714286, 8));
  EXPECT_TRUE(agrees_to_digits(*check.rows[2].value, 73.2539, 6));
  EXPECT_TRUE(agrees_to_digits(*check.rows[3].value, 126.1747, 7));
}

TEST(Confirmation, FailsByThePredictionIntervalAlone) {
  const LimitCheck check =
      check_confirmation(confirming(), set_with(0.5, kFailing));
  EXPECT_TRUE(check.failed);
  ASSERT_EQ(check.rows.size(), 4U);
  EXPECT_EQ(check.rows[0].passed, true);
  EXPECT_EQ(check.rows[1].passed, true);
  EXPECT_EQ(check.rows[2].passed, false);
  EXPECT_EQ(check.rows[3].passed, false);
}

TEST(Confirmation, FailsByPrecisionOrRecovery) {
  AnalyteRules settings = confirming();
  settings.acceptance.confirmation->maximum_rsd = 6.0;
  LimitCheck check = check_confirmation(settings, set_with(0.5, kPassing));
  EXPECT_EQ(check.rows[0].passed, false);
  EXPECT_TRUE(check.failed);

  check = check_confirmation(confirming(), set_with(0.65, kPassing));
  EXPECT_EQ(check.rows[1].passed, false);  // 77 %
  EXPECT_TRUE(check.failed);
}

// What was added cannot be seen at all: no relative standard deviation.
TEST(Confirmation, AMeanBelowZeroFails) {
  const LimitCheck check = check_confirmation(
      confirming(), set_with(0.5, {-0.1, 0.05, -0.02, 0.01, -0.03}));
  EXPECT_TRUE(check.failed);
  EXPECT_EQ(check.rows[0].passed, false);
  EXPECT_FALSE(check.rows[0].value);
}

TEST(Confirmation, TheLevelNearestToTheQuantitationLimitCounts) {
  CalibrationSet set = set_with(0.9, kPassing);
  const CalibrationSet nearer = set_with(0.4, kPassing);
  set.low_spikes.insert(set.low_spikes.end(), nearer.low_spikes.begin(),
                        nearer.low_spikes.end());
  const LimitCheck check = check_confirmation(confirming(), set);
  EXPECT_NE(check.rows[0].note.find("at 0.4, 0.8 times"), std::string::npos);
}

std::string why_not(const CalibrationSet& set) {
  const LimitCheck check = check_confirmation(confirming(), set);
  EXPECT_EQ(check.rows.size(), 1U);
  EXPECT_FALSE(check.failed);
  EXPECT_FALSE(check.rows[0].passed.has_value());
  return check.rows[0].note;
}

TEST(Confirmation, NotChecked) {
  EXPECT_TRUE(check_confirmation({}, set_with(0.5, kPassing)).rows.empty());
  EXPECT_EQ(why_not(set_with(0.5, {})),
            "not checked: no low spikes within a factor of 2 of the "
            "quantitation limit (0.5 in the vial)");
  EXPECT_NE(why_not(set_with(1.01, kPassing)).find("factor of 2"),
            std::string::npos);
  EXPECT_NE(why_not(set_with(0.24, kPassing)).find("factor of 2"),
            std::string::npos);
  EXPECT_NE(why_not(set_with(0.5, {.5, .4, .6})).find("fewer than 4"),
            std::string::npos);
  CalibrationSet set = set_with(0.5, kPassing);
  set.limits.governing = NotApplicable{"no-valid-limit"};
  EXPECT_EQ(why_not(set), "not checked: no valid limit governs");
  set.calibration = NotApplicable{"slope"};
  EXPECT_EQ(why_not(set), "not checked: no calibration");
}

// At the ends of the factor of two.
TEST(Confirmation, HalfAndTwiceTheLimitStillCount) {
  for (double nominal : {0.25, 1.0}) {
    EXPECT_EQ(check_confirmation(confirming(), set_with(nominal, kPassing))
                  .rows.size(),
              4U);
  }
}

LimitRow limit_row(const std::string& procedure, double detection,
                   double quantitation) {
  LimitEstimate estimate;
  estimate.detection = detection;
  estimate.quantitation = quantitation;
  LimitRow row;
  row.procedure = procedure;
  row.estimate = estimate;
  return row;
}

AnalyteRules comparing(const std::string& procedure) {
  AnalyteRules settings;
  settings.analyte = "zinol";
  settings.acceptance.established_limit.emplace();
  settings.acceptance.established_limit->procedure = procedure;
  return settings;
}

CalibrationSet set_of_limits(const LimitRow& tonight) {
  CalibrationSet set;
  set.calibration = line(2.0, 0.5, 100.0);
  set.limits.rows = {limit_row("established", 0.68, 2.0), tonight};
  return set;
}

LimitCheck compare(double detection, double quantitation) {
  return check_established_limit(
      comparing("blank-deviation"),
      set_of_limits(limit_row("blank-deviation", detection, quantitation)));
}

// US EPA 40 CFR 136 Appendix B, Revision 2 (2016), II 4, from memory: from 0.5
// to 2.0, ends included.
TEST(EstablishedLimit, RatioOfTonightsLimits) {
  LimitCheck check = compare(1.36, 1.0);
  EXPECT_FALSE(check.failed);
  ASSERT_EQ(check.rows.size(), 2U);
  EXPECT_TRUE(same_bits(*check.rows[0].value, 2.0));
  EXPECT_TRUE(same_bits(*check.rows[1].value, 0.5));
  EXPECT_EQ(check.rows[0].passed, true);
  EXPECT_EQ(check.rows[1].passed, true);

  check = compare(1.3601, 1.0);
  EXPECT_TRUE(check.failed);
  EXPECT_EQ(check.rows[0].passed, false);
  EXPECT_EQ(check.rows[0].affects, "all results of the analyte");
  EXPECT_EQ(check.rows[0].note,
            "detection limit by blank-deviation over the established one");
  EXPECT_TRUE(compare(0.68, 0.9999).failed);
}

TEST(EstablishedLimit, OneLimitIsEnough) {
  LimitRow tonight = limit_row("accuracy-profile", 1.0, 1.9);
  tonight.estimate.value().detection.reset();
  const LimitCheck check = check_established_limit(
      comparing("accuracy-profile"), set_of_limits(tonight));
  ASSERT_EQ(check.rows.size(), 1U);
  EXPECT_TRUE(within_condition(*check.rows[0].value, 0.95, 4));
}

// Strictly fewer than 3 %.
TEST(EstablishedLimit, ShareOfBlanksAbove) {
  EXPECT_TRUE(few_blanks_above(2, 70));    // 2.857 %
  EXPECT_FALSE(few_blanks_above(3, 100));  // 3.0 %
  EXPECT_TRUE(few_blanks_above(1, 34));
  EXPECT_FALSE(few_blanks_above(1, 33));
  EXPECT_FALSE(few_blanks_above(0, 0));
}

LimitCheck compare_blanks(std::size_t n, std::size_t above) {
  CalibrationSet set = set_of_limits(limit_row("spike-replicates", 0.7, 2.0));
  for (std::size_t i = 0; i < n; ++i) {
    BlankResponse blank;
    blank.kind = BlankKind::Method;
    // Slope 2: the established limit 0.68 has the response 1.36.
    blank.response = i < above ? 1.37 : 0.01 * static_cast<double>(i);
    set.blanks.push_back(blank);
    blank.kind = BlankKind::Solvent;
    blank.response = 9.0;
    set.blanks.push_back(blank);
  }
  return check_established_limit(comparing("spike-replicates"), set);
}

TEST(EstablishedLimit, MethodBlanksAboveIt) {
  LimitCheck check = compare_blanks(70, 2);
  EXPECT_FALSE(check.failed);
  ASSERT_EQ(check.rows.size(), 3U);
  EXPECT_TRUE(within_condition(*check.rows[2].value, 200.0 / 70.0, 4));
  EXPECT_EQ(check.rows[2].passed, true);
  EXPECT_TRUE(compare_blanks(100, 3).failed);

  check = compare_blanks(33, 1);
  EXPECT_FALSE(check.failed);
  EXPECT_FALSE(check.rows[2].passed.has_value());
  EXPECT_NE(check.rows[2].note.find("34 are needed"), std::string::npos);
}

std::string why_not_compared(const CalibrationSet& set) {
  const LimitCheck check =
      check_established_limit(comparing("blank-deviation"), set);
  EXPECT_EQ(check.rows.size(), 1U);
  EXPECT_FALSE(check.failed);
  EXPECT_FALSE(check.rows[0].passed.has_value());
  return check.rows[0].note;
}

TEST(EstablishedLimit, NotChecked) {
  EXPECT_TRUE(check_established_limit({}, set_of_limits(limit_row("x", 1, 1)))
                  .rows.empty());
  LimitRow tonight = limit_row("blank-deviation", 0.7, 2.0);
  tonight.estimate.value().findings = {{Grade::NotValid, "few-blanks", ""}};
  EXPECT_EQ(why_not_compared(set_of_limits(tonight)),
            "not checked: blank-deviation is not valid tonight: few-blanks");
  tonight.estimate = NotApplicable{"few-blanks: 2 solvent blanks"};
  EXPECT_EQ(why_not_compared(set_of_limits(tonight)),
            "not checked: blank-deviation: few-blanks: 2 solvent blanks");
  CalibrationSet set = set_of_limits(limit_row("another", 0.7, 2.0));
  EXPECT_EQ(why_not_compared(set),
            "not checked: blank-deviation is not among the limits");
  set.limits.rows.erase(set.limits.rows.begin());
  EXPECT_EQ(why_not_compared(set),
            "not checked: established is not among the limits");
  set.calibration = NotApplicable{"slope"};
  EXPECT_EQ(why_not_compared(set), "not checked: no calibration");
}

/// Standards, blanks and seven low spikes at the lowest standard.
NightBuilder whole_night(const std::vector<double>& spikes) {
  NightBuilder night;
  for (double x : {0.5, 1.0, 2.0, 5.0, 10.0, 20.0}) night.standard(x);
  // The first blank, after the highest standard, is left out.
  for (double blank : {0.0, 0.1, -0.1, 0.05, -0.05, 0.02, -0.02, 0.08})
    night.add(Role::SolventBlank, blank, false);
  for (double spike : spikes) night.add_level(Role::LowSpike, 0.5, 2.0 * spike);
  night.add(Role::Sample, 10.0);
  ProcedureSettings deviation;
  deviation.name = "blank-deviation";
  ProcedureSettings established;
  established.name = "established";
  established.detection = 0.2;
  established.quantitation = 0.5;
  night.settings.limits.procedures = {deviation, established};
  night.settings.limits.governing = "established";
  return night;
}

TEST(LimitChecks, FlagOrWithholdTheResults) {
  NightBuilder night = whole_night(kFailing);
  night.settings.acceptance.confirmation.emplace();
  AnalyteJudgement judged = night.judge();
  EXPECT_EQ(rows_of(judged.checks, "confirmation").size(), 4U);
  EXPECT_EQ(judged.results.back().status, Status::Reportable);
  EXPECT_TRUE(has_word(judged.results.back().reasons, "confirmation-failed"));

  night.settings.acceptance.confirmation->action = CheckAction::Withhold;
  judged = night.judge();
  EXPECT_EQ(judged.results.back().status, Status::Withheld);
  EXPECT_EQ(judged.results.back().reasons.front(), "confirmation-failed");

  night = whole_night(kPassing);
  night.settings.acceptance.confirmation.emplace();
  judged = night.judge();
  EXPECT_FALSE(has_word(judged.results.back().reasons, "confirmation-failed"));
}

// The blanks' deviation is 0.036 in concentration: detection 0.107,
// quantitation 0.36.
TEST(LimitChecks, EstablishedLimitOfAWholeNight) {
  NightBuilder night = whole_night(kPassing);
  night.settings.acceptance.established_limit.emplace();
  night.settings.acceptance.established_limit->procedure = "blank-deviation";
  AnalyteJudgement judged = night.judge();
  ASSERT_EQ(rows_of(judged.checks, "established-limit").size(), 2U);
  EXPECT_FALSE(
      has_word(judged.results.back().reasons, "established-limit-failed"));

  night.settings.acceptance.established_limit->ratio_low = 0.8;
  judged = night.judge();
  EXPECT_EQ(rows_of(judged.checks, "established-limit")[0].passed, false);
  EXPECT_TRUE(
      has_word(judged.results.back().reasons, "established-limit-failed"));
  EXPECT_EQ(judged.results.back().status, Status::Reportable);
}

TEST(LimitChecks, NotAskedForIsSaid) {
  const AnalyteJudgement judged = whole_night(kPassing).judge();
  for (const char* check : {"established-limit", "confirmation"}) {
    const auto rows = rows_of(judged.checks, check);
    ASSERT_EQ(rows.size(), 1U);
    EXPECT_EQ(rows[0].note, "not checked: the method does not ask for it");
  }
}

}  // namespace
}  // namespace loqsmith
