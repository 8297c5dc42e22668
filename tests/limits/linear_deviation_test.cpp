#include "loqsmith/limits/linear_deviation.hpp"

#include "limits/line_examples.hpp"
#include "loqsmith/limits/critical_and_detectable.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

ProcedureSettings linear(int replicates = 1) {
  ProcedureSettings settings =
      with_levels("critical-and-detectable", 0.05, 0.05, replicates);
  settings.variance_linear = true;
  settings.up_to.reset();
  return settings;
}

Outcome<LimitEstimate> limit(const LimitEvidence& evidence,
                             const ProcedureSettings& settings = linear()) {
  return critical_and_detectable(evidence, {}, settings);
}

Outcome<LinearDeviation> deviation(const std::vector<StandardPoint>& points,
                                   int iterations) {
  std::vector<double> concentrations, responses;
  for (const StandardPoint& point : points) {
    concentrations.push_back(point.concentration);
    responses.push_back(point.response);
  }
  return fit_linear_deviation(concentrations, responses, iterations);
}

// The iteration of ISO 11843-2, computed independently; its limit differs in
// the fifth digit.
TEST(LinearDeviation, IterationsOfGrowingScatter) {
  struct Row {
    int iterations;
    double constant, growth;
  };
  for (const Row& row :
       std::initializer_list<Row>{{1, 0.07793125, 0.06103845},
                                  {2, 0.07731982, 0.06256281},
                                  {3, 0.07733899, 0.06255271},
                                  {60, 0.07733877, 0.06255283}}) {
    const auto found = deviation(growing_scatter(), row.iterations);
    ASSERT_TRUE(found);
    EXPECT_TRUE(agrees_to_digits(found->constant, row.constant, 7));
    EXPECT_TRUE(agrees_to_digits(found->growth, row.growth, 7));
  }
}

// ISO 11843-2 with a standard deviation linear in the concentration, computed
// independently. First and second: steps of the iteration for x_D.
TEST(LinearDeviation, LimitsOfGrowingScatter) {
  struct Row {
    int replicates;
    double response, critical, first, second, detection;
  };
  for (const Row& row : std::initializer_list<Row>{
           {1, 1.14781002, 0.07174990, 0.14193783, 0.15603001, 0.15759603},
           {2, 1.11276335, 0.05420581, 0.10723158, 0.11429655, 0.11480019}}) {
    const auto found = limit(fitted(growing_scatter()), linear(row.replicates));
    ASSERT_TRUE(found);
    EXPECT_TRUE(agrees_to_digits(
        *term(*found, "intercept of the weighted line"), 1.00447996, 9));
    EXPECT_TRUE(agrees_to_digits(*term(*found, "slope of the weighted line"),
                                 1.99763422, 9));
    EXPECT_TRUE(agrees_to_digits(
        *term(*found, "weighted mean of the standards"), 0.68361323, 8));
    EXPECT_TRUE(agrees_to_digits(*term(*found, "weighted residual variance"),
                                 0.83905739, 8));
    EXPECT_TRUE(agrees_to_digits(*term(*found, "quantile of t for alpha"),
                                 1.717144, 7));
    EXPECT_TRUE(agrees_to_digits(
        *term(*found, "non-centrality for alpha and beta"), 3.396907, 7));
    EXPECT_TRUE(
        agrees_to_digits(*term(*found, "critical response"), row.response, 9));
    EXPECT_TRUE(agrees_to_digits(*found->critical_value, row.critical, 7));
    EXPECT_TRUE(agrees_to_digits(*found->detection, row.detection, 8));
    EXPECT_EQ(found->degrees_of_freedom, 22.0);
    EXPECT_EQ(found->n, 24U);
    EXPECT_FALSE(found->detection_lower || found->detection_upper);
    EXPECT_TRUE(finding(*found, "bounds-absent"));

    // The iteration of the source, with 1/T1 + xm^2/sxx of the example.
    const double c = *term(*found, "standard deviation of a response at zero");
    const double d = *term(*found, "growth of that standard deviation");
    const double b = *term(*found, "slope of the weighted line");
    const double of_line =
        (1.0 / 1023.45254583 + 0.68361323 * 0.68361323 / 2360.81662503) *
        0.83905739;
    const auto step = [&](double x) {
      const double one = c + d * x;
      return *term(*found, "non-centrality for alpha and beta") / b *
             std::sqrt(one * one / row.replicates + of_line);
    };
    double x = step(0.0);
    EXPECT_TRUE(agrees_to_digits(x, row.first, 8));
    x = step(x);
    EXPECT_TRUE(agrees_to_digits(x, row.second, 8));
    for (int i = 0; i < 60; ++i) x = step(x);
    EXPECT_TRUE(agrees_to_digits(x, *found->detection, 8));
  }
}

// At the quantitation limit a result is 10 times its standard deviation.
TEST(LinearDeviation, QuantitationLimit) {
  const auto found = limit(fitted(growing_scatter()));
  ASSERT_TRUE(found && found->quantitation);
  const double x = *found->quantitation;
  const double one = *term(*found, "standard deviation of a response at zero") +
                     *term(*found, "growth of that standard deviation") * x;
  const double line =
      (1.0 / 1023.45254583 + std::pow(x - 0.68361323, 2) / 2360.81662503) *
      0.83905739;
  EXPECT_TRUE(agrees_to_digits(10.0 * std::sqrt(one * one + line) /
                                   *term(*found, "slope of the weighted line"),
                               x, 7));
}

std::vector<StandardPoint> spread_levels(
    const std::vector<std::pair<double, double>>& level_and_half_spread) {
  std::vector<std::pair<double, double>> pairs;
  for (const auto& [x, half] : level_and_half_spread) {
    pairs.emplace_back(x, 2.0 * x - half);
    pairs.emplace_back(x, 2.0 * x + half);
  }
  return standards(pairs);
}

// delta d / b: with half a spread of 0.5 x, d is 0.71 and b 2, delta above 3.
TEST(LinearDeviation, NoDetectableValueWhereTheIterationDiverges) {
  const auto points =
      spread_levels({{1, 0.6}, {2, 1.1}, {3, 1.6}, {4, 2.1}, {5, 2.6}});
  const auto found = limit(fitted(points));
  ASSERT_FALSE(found);
  EXPECT_TRUE(contains(found.reason(), "no-minimum-detectable-value: "));
  // The mean of many measurements is another matter; 10 % is out of reach.
  const auto many = limit(fitted(points), linear(9));
  ASSERT_TRUE(many);
  EXPECT_TRUE(many->detection);
  EXPECT_FALSE(many->quantitation);
  EXPECT_TRUE(finding(*many, "quantitation-absent"));
}

TEST(LinearDeviation, NotApplicable) {
  EXPECT_TRUE(contains(limit(fitted(fluorescence())).reason(),
                       "few-replicates: 0 levels"));
  EXPECT_TRUE(contains(
      limit(fitted(spread_levels({{1, 0.1}, {2, 0.0}, {3, 0.2}, {4, 0.3}})))
          .reason(),
      "level-without-scatter: "));
  EXPECT_TRUE(contains(
      limit(fitted(spread_levels({{1, 0.4}, {2, 0.3}, {3, 0.2}, {4, 0.1}})))
          .reason(),
      "deviation-does-not-grow: "));
  EXPECT_TRUE(contains(
      limit(fitted(spread_levels({{1, 0.1}, {2, 0.3}, {3, 0.5}, {4, 0.7}})))
          .reason(),
      "deviation-not-above-zero: "));
  EXPECT_TRUE(contains(limit({}).reason(), "no-calibration: "));
}

// Up to 10 times the lowest level unless the method says more.
TEST(LinearDeviation, TakesTheLowStandards) {
  ProcedureSettings settings = linear();
  settings.up_to = 10.0;
  const auto found = limit(fitted(growing_scatter()), settings);
  ASSERT_TRUE(found);
  EXPECT_EQ(found->n, 20U);
  EXPECT_EQ(*term(*found, "highest standard of the line"), 8.0);
}

}  // namespace
}  // namespace loqsmith::test
