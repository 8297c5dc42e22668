#include "loqsmith/limits/critical_and_detectable.hpp"

#include "limits/line_examples.hpp"
#include "loqsmith/limits/low_range_line.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/numerics/noncentral_t.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

Outcome<LimitEstimate> limit(
    const LimitEvidence& evidence,
    const ProcedureSettings& settings = procedure("critical-and-detectable")) {
  return critical_and_detectable(evidence, {}, settings);
}

// Harris, low-current blanks (data from memory), by Currie's formulas with an
// estimated blank mean, sigma_0 = s sqrt(1 + 1/7); and with a known one.
// Computed independently, good for 10 digits.
TEST(CriticalAndDetectable, CurriesFormulasForBlanks) {
  const double sd = standard_deviation(low_current_blanks());
  const double s0 = sd * std::sqrt(8.0 / 7.0);
  const double t = student_t_quantile(0.95, 6.0);
  const double delta = detectable_noncentrality(0.05, 0.05, 6.0).value();
  EXPECT_TRUE(agrees_to_digits(t * s0, 1.2965106021, 11));
  EXPECT_TRUE(agrees_to_digits(delta * s0, 2.5031100499, 10));
  EXPECT_TRUE(agrees_to_digits(10.0 * s0, 6.6721066241, 11));
  EXPECT_TRUE(agrees_to_digits(t * s0 / kLowCurrentSlope, 5.6616183496, 10));
  EXPECT_TRUE(
      agrees_to_digits(delta * s0 / kLowCurrentSlope, 10.9306115716, 10));
  EXPECT_TRUE(
      agrees_to_digits(10.0 * s0 / kLowCurrentSlope, 29.1358367863, 12));
  EXPECT_TRUE(agrees_to_digits(t * sd, 1.2127746178, 10));
  EXPECT_TRUE(agrees_to_digits(delta * sd, 2.3414450520, 10));
}

// Miller and Miller, fluorescence line (data from memory), by ISO 11843-2;
// computed independently. `twice` is the approximation 2 t.
TEST(CriticalAndDetectable, FluorescenceLine) {
  struct Row {
    int replicates;
    double response, critical, detection, twice;
  };
  for (const Row& row : std::initializer_list<Row>{
           {1, 2.57329706, 0.54675889, 1.05006168, 1.09351777},
           {3, 2.29682289, 0.40353452, 0.77499634, 0.80706905}}) {
    const auto found = limit(
        fitted(fluorescence()),
        with_levels("critical-and-detectable", 0.05, 0.05, row.replicates));
    ASSERT_TRUE(found);
    EXPECT_TRUE(
        agrees_to_digits(*term(*found, "critical response"), row.response, 9));
    EXPECT_TRUE(agrees_to_digits(*found->critical_value, row.critical, 8));
    EXPECT_TRUE(agrees_to_digits(*found->detection, row.detection,
                                 row.detection < 1.0 ? 8 : 9));
    EXPECT_TRUE(agrees_to_digits(2.0 * *found->critical_value, row.twice,
                                 row.twice < 1.0 ? 8 : 9));
    EXPECT_EQ(found->degrees_of_freedom, 5.0);
    EXPECT_EQ(found->n, 7U);
    EXPECT_EQ(found->grade(), Grade::Valid);
  }
}

// The quantitation limit is 10 times its own standard deviation; bounds are
// those of s (5 degrees of freedom: 0.624208, 2.452614).
TEST(CriticalAndDetectable, QuantitationAndBounds) {
  const LimitEvidence evidence = fitted(fluorescence());
  const auto found = limit(evidence);
  ASSERT_TRUE(found);
  const LowRangeLine line =
      fit_low_range(*evidence.calibration, std::nullopt).value();
  const auto ten_deviations = [&](double x, double multiplier) {
    return 10.0 * multiplier * line.residual_sd / line.slope *
           std::sqrt(1.0 + line.leverage.at(x));
  };
  const double x = *found->quantitation;
  EXPECT_TRUE(within_condition(ten_deviations(x, 1.0), x, 100));
  const double upper = *found->quantitation_upper;
  EXPECT_TRUE(agrees_to_digits(ten_deviations(upper, 2.4526139), upper, 6));
  EXPECT_TRUE(agrees_to_digits(*found->detection_lower / *found->detection,
                               0.624208, 6));
  EXPECT_TRUE(agrees_to_digits(*found->detection_upper / *found->detection,
                               2.452614, 7));
}

TEST(CriticalAndDetectable, NoQuantitationLimitWhereTheSlopeIsLost) {
  const auto found =
      limit(fitted(standards({{1, 1}, {3, 9}, {5, 1}, {7, 10}, {9, 9}})));
  ASSERT_TRUE(found);
  EXPECT_TRUE(found->detection);
  EXPECT_FALSE(found->quantitation);
  EXPECT_TRUE(finding(*found, "quantitation-absent"));
}

TEST(CriticalAndDetectable, NotApplicable) {
  EXPECT_TRUE(contains(limit({}).reason(), "no-calibration: "));
  EXPECT_TRUE(contains(
      limit(fitted(seven_levels(), {.model = Model::Quadratic})).reason(),
      "quadratic-calibration: "));
  EXPECT_TRUE(contains(
      limit(fitted(standards({{0, 0.1}, {1, 1}, {2, 2.1}, {5, 5}, {100, 99}})))
          .reason(),
      "few-low-levels: 3 levels"));
  EXPECT_TRUE(contains(limit(evidence_of({}, known_line(0.0, -1.0))).reason(),
                       "slope-not-positive: a limit needs a rising line"));
  EXPECT_TRUE(contains(
      limit(fitted(standards({{1, 9}, {2, 8.2}, {4, 7}, {8, 6}, {100, 300}})))
          .reason(),
      "slope-not-positive: the low standards do not rise"));
  EXPECT_TRUE(contains(
      limit(fitted(standards({{1, 3}, {2, 6}, {4, 12}, {8, 24}}))).reason(),
      "no-scatter: "));
  EXPECT_TRUE(contains(limit(fitted(fluorescence()),
                             with_levels("critical-and-detectable", 0.6, 0.05))
                           .reason(),
                       "no-noncentrality: "));
}

// Samples are read off the calibration: a weighted one may lie elsewhere at
// zero than the line that the limit comes from.
TEST(CriticalAndDetectable, SaysWhereTheCalibrationLiesElsewhere) {
  LimitEvidence evidence = fitted(fluorescence());
  EXPECT_FALSE(finding(*limit(evidence), "low-line-differs"));
  evidence.calibration->intercept -= 1.0;  // 3.4 standard deviations
  const auto detection = limit(evidence);
  ASSERT_TRUE(finding(*detection, "low-line-differs"));
  // (b x_D - 1) / (s q) = 1.9609: P(t_5 >= that) 5.4 %
  EXPECT_EQ(finding(*detection, "low-line-differs")->grade, Grade::NotValid);
  EXPECT_TRUE(contains(finding(*detection, "low-line-differs")->text,
                       "or above the detection limit"));

  LimitSettings critical;
  critical.decision = LimitSettings::Decision::CriticalValue;
  const auto found = critical_and_detectable(
      evidence, critical, procedure("critical-and-detectable"));
  ASSERT_TRUE(finding(*found, "low-line-differs"));
  EXPECT_TRUE(contains(finding(*found, "low-line-differs")->text,
                       "or above the critical value"));
}

}  // namespace
}  // namespace loqsmith::test
