#include "loqsmith/limits/error_propagation.hpp"

#include "limits/line_examples.hpp"
#include "loqsmith/limits/blank_deviation.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

Outcome<LimitEstimate> limit(const LimitEvidence& evidence) {
  return error_propagation(evidence, {}, procedure("error-propagation"));
}

// Miller and Miller, fluorescence line (data from memory), with s_y/x in the
// place of the blanks' standard deviation; formula of Long and Winefordner,
// computed independently.
TEST(ErrorPropagation, FluorescenceLine) {
  LimitEvidence evidence = fitted(fluorescence());
  const double s = evidence.calibration->residual_sd;
  const double a = evidence.calibration->intercept;
  evidence.blanks = blanks_of({a - s, a, a + s});  // standard deviation s
  const auto found = limit(evidence);
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits(*found->detection, 0.8155465148, 10));
  EXPECT_TRUE(agrees_to_digits(*found->quantitation, 0.8155465148 / 0.3, 10));
  EXPECT_EQ(found->n, 3U);

  // Welch and Satterthwaite: variances s^2 with 2, the rest with 5.
  const double all = std::pow(0.8155465148 * 1.930357143 / 3.0, 2);
  const double rest = all - s * s;
  EXPECT_TRUE(agrees_to_digits(
      *found->degrees_of_freedom,
      all * all / (s * s * s * s / 2.0 + rest * rest / 5.0), 8));
  const SpreadBounds bounds =
      standard_deviation_bounds(*found->degrees_of_freedom, 0.95);
  EXPECT_TRUE(within_condition(*found->detection_lower,
                               bounds.lower * *found->detection, 4));
}

// Through zero nothing is left to propagate.
TEST(ErrorPropagation, ThroughZeroItIsTheBlanksLimit) {
  for (const CalibrationSettings& settings :
       {CalibrationSettings{.intercept = Intercept::Zero},
        CalibrationSettings{.model = Model::ResponseFactor}}) {
    LimitEvidence evidence = fitted(seven_levels(), settings);
    evidence.blanks = blanks_of({0.1, -0.2, 0.05, 0.1, 0.2, -0.1, 0.0});
    const auto found = limit(evidence);
    const auto blanks = blank_deviation(evidence, {}, {});
    ASSERT_TRUE(found && blanks);
    EXPECT_TRUE(within_condition(*found->detection, *blanks->detection, 10));
    EXPECT_TRUE(within_condition(*found->detection_upper,
                                 *blanks->detection_upper, 100));
    EXPECT_TRUE(within_condition(*found->degrees_of_freedom, 6.0, 10));
  }
}

TEST(ErrorPropagation, IsNeverBelowTheBlanksLimit) {
  LimitEvidence evidence = fitted(seven_levels(), {.weight = Weight::InverseX});
  evidence.blanks = blanks_of({0.9, 1.2, 0.5, 1.1, 0.8, 0.6, 1.0});
  EXPECT_GT(*limit(evidence)->detection,
            *blank_deviation(evidence, {}, {})->detection);
}

// The errors of a line through standards of growing scatter are not those of
// its low end.
TEST(ErrorPropagation, GrowingVarianceMakesTheLimitNotValid) {
  LimitEvidence evidence = fitted(growing_scatter());
  evidence.blanks = blanks_of({0.95, 1.02, 1.05, 0.98, 1.0, 1.1, 0.9});
  const auto found = limit(evidence);
  ASSERT_TRUE(found);
  ASSERT_TRUE(finding(*found, "variance-grows"));
  EXPECT_EQ(found->grade(), Grade::NotValid);
  // Of a weighted one nothing of that is asked.
  auto above_zero = growing_scatter();
  above_zero.erase(above_zero.begin(), above_zero.begin() + 4);
  evidence = fitted(above_zero, {.weight = Weight::InverseX});
  evidence.blanks = blanks_of({0.95, 1.02, 1.05, 0.98, 1.0, 1.1, 0.9});
  EXPECT_FALSE(finding(*limit(evidence), "variance-grows"));
}

TEST(ErrorPropagation, NotApplicable) {
  EXPECT_TRUE(contains(limit({}).reason(), "no-calibration: "));
  EXPECT_TRUE(contains(limit(fitted(fluorescence())).reason(),
                       "few-blanks: 0 solvent blanks"));
  LimitEvidence evidence = fitted(fluorescence());
  evidence.blanks = blanks_of({1.5, 1.5, 1.5});
  EXPECT_TRUE(contains(limit(evidence).reason(), "blanks-all-equal: "));
  evidence = fitted(seven_levels(), {.model = Model::Quadratic});
  evidence.blanks = blanks_of({1.5, 1.6, 1.4});
  EXPECT_TRUE(contains(limit(evidence).reason(), "quadratic-calibration: "));
  EXPECT_TRUE(
      contains(limit(evidence_of({1, 2, 3}, known_line(0.0, -1.0))).reason(),
               "slope-not-positive: "));
}

}  // namespace
}  // namespace loqsmith::test
