#include "loqsmith/limits/prediction_band.hpp"

#include "limits/line_examples.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

Outcome<LimitEstimate> limit(
    const LimitEvidence& evidence,
    const ProcedureSettings& settings = procedure("prediction-band")) {
  return prediction_band(evidence, {}, settings);
}

// Miller and Miller, fluorescence line (data from memory); limits by the
// formulas of Hubaux and Vos, computed independently by root finding, by the
// closed form, and as prediction limits of R.
TEST(PredictionBand, FluorescenceLine) {
  struct Row {
    double alpha, beta, response, critical, detection;
  };
  for (const Row& row : std::initializer_list<Row>{
           {0.05, 0.05, 2.57329706, 0.54675889, 1.07360073},
           {0.01, 0.01, 3.28033664, 0.91303286, 1.77408634},
           {0.01, 0.05, 3.28033664, 0.91303286, 1.43392398}}) {
    const auto found =
        limit(fitted(fluorescence()),
              with_levels("prediction-band", row.alpha, row.beta));
    ASSERT_TRUE(found);
    EXPECT_TRUE(
        agrees_to_digits(*term(*found, "critical response"), row.response, 9));
    EXPECT_TRUE(agrees_to_digits(*found->critical_value, row.critical, 8));
    EXPECT_TRUE(agrees_to_digits(*found->detection, row.detection, 9));
    EXPECT_TRUE(agrees_to_digits(*found->quantitation, 2.2423193285, 11));
    EXPECT_EQ(found->degrees_of_freedom, 5.0);
    EXPECT_EQ(found->n, 7U);
    EXPECT_EQ(found->grade(), Grade::Valid);
  }
}

// The lower line at x, by sums over the points.
double lower_line(const std::vector<StandardPoint>& points, double x, double t,
                  double replicates) {
  double n = 0, sx = 0, sy = 0;
  for (const StandardPoint& point : points) {
    n += 1.0;
    sx += point.concentration;
    sy += point.response;
  }
  const double mx = sx / n, my = sy / n;
  double sxx = 0, sxy = 0, syy = 0;
  for (const StandardPoint& point : points) {
    const double dx = point.concentration - mx, dy = point.response - my;
    sxx += dx * dx;
    sxy += dx * dy;
    syy += dy * dy;
  }
  const double b = sxy / sxx;
  const double s = std::sqrt((syy - b * sxy) / (n - 2.0));
  return my + b * (x - mx) -
         t * s *
             std::sqrt(1.0 / replicates + 1.0 / n + (x - mx) * (x - mx) / sxx);
}

// Whatever alpha, beta and the number averaged: the lower line reaches the
// critical response at the detection limit, from below, by bisection.
TEST(PredictionBand, LowerLineMeetsTheCriticalResponse) {
  const auto points = fluorescence();
  for (double alpha : {0.001, 0.05, 0.4})
    for (double beta : {0.001, 0.05, 0.4})
      for (int replicates : {1, 3}) {
        const auto found =
            limit(fitted(points),
                  with_levels("prediction-band", alpha, beta, replicates));
        ASSERT_TRUE(found);
        const double t = student_t_quantile(1.0 - beta, 5.0);
        const double critical = *term(*found, "critical response");
        double low = *found->critical_value, high = 100.0;
        for (int i = 0; i < 60; ++i) {
          const double middle = 0.5 * (low + high);
          (lower_line(points, middle, t, replicates) < critical ? low : high) =
              middle;
        }
        EXPECT_TRUE(agrees_to_digits(*found->detection, high, 11))
            << alpha << ' ' << beta << ' ' << replicates;
      }
}

// The bounds are the limits of lines with the bounds of s (5 degrees of
// freedom: 0.624208, 2.452614) in the place of s.
TEST(PredictionBand, Bounds) {
  const auto found = limit(fitted(fluorescence()));
  ASSERT_TRUE(found);
  const LowRangeLine line =
      fit_low_range(*fitted(fluorescence()).calibration, std::nullopt).value();
  EXPECT_TRUE(agrees_to_digits(
      *found->detection_lower,
      *band_detection_limit(line, 0.6242078 * line.residual_sd, {}), 6));
  EXPECT_TRUE(agrees_to_digits(
      *found->detection_upper,
      *band_detection_limit(line, 2.4526139 * line.residual_sd, {}), 6));
  EXPECT_LT(*found->detection_lower, *found->detection);
  EXPECT_GT(*found->detection_upper, *found->detection);
}

// b = 1, s about 4.7, Sxx 40: beta 0.01 asks for 4.54 standard deviations of
// the slope.
TEST(PredictionBand, NoLimitWhereTheSlopeIsLost) {
  const auto points = standards({{1, 1}, {3, 9}, {5, 1}, {7, 10}, {9, 9}});
  const auto found =
      limit(fitted(points), with_levels("prediction-band", 0.01, 0.01));
  ASSERT_FALSE(found);
  EXPECT_TRUE(contains(found.reason(), "no-detection-limit: the slope, 0.85"));
  EXPECT_TRUE(contains(found.reason(), "does not exceed 4.541 times"));
  // With a beta that asks for less there is one, but no upper bound.
  const auto some =
      limit(fitted(points), with_levels("prediction-band", 0.01, 0.2));
  ASSERT_TRUE(some);
  EXPECT_FALSE(some->detection_upper);
  EXPECT_TRUE(finding(*some, "no-upper-bound"));
  EXPECT_TRUE(finding(*some, "above-low-range"));
}

// Through zero the line has no uncertainty at zero: x_C = t s / b with
// n - 1 degrees of freedom.
TEST(PredictionBand, ThroughZero) {
  const auto found =
      limit(fitted(fluorescence(), {.intercept = Intercept::Zero}));
  ASSERT_TRUE(found);
  EXPECT_EQ(found->degrees_of_freedom, 6.0);
  EXPECT_TRUE(within_condition(
      *found->critical_value,
      student_t_quantile(0.95, 6.0) *
          *term(*found, "residual standard deviation of the low line") /
          *term(*found, "slope of the low line"),
      10));
  EXPECT_TRUE(finding(*found, "line-through-zero"));
}

TEST(PredictionBand, NotApplicable) {
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
}

}  // namespace
}  // namespace loqsmith::test
