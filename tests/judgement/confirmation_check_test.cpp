#include "loqsmith/judgement/confirmation_check.hpp"

#include <array>
#include <string>
#include <vector>

#include "judgement/night_builder.hpp"
#include "loqsmith/numerics/mean.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;
using test::line;

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

}  // namespace
}  // namespace loqsmith
