#include "loqsmith/limits/calibration_residual.hpp"

#include <cmath>

#include "calibration/examples.hpp"
#include "limits/evidence_builders.hpp"
#include "loqsmith/limits/low_range_findings.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

LimitEvidence fitted(const std::vector<StandardPoint>& points,
                     const CalibrationSettings& settings = {}) {
  LimitEvidence evidence;
  const auto calibration = fit_calibration(points, settings);
  if (calibration) evidence.calibration = *calibration;
  return evidence;
}

Outcome<LimitEstimate> limit(const LimitEvidence& evidence,
                             const ProcedureSettings& settings = {}) {
  return calibration_residual(evidence, {}, settings);
}

ProcedureSettings whole_range() {
  ProcedureSettings settings;
  settings.up_to.reset();
  return settings;
}

// Miller and Miller, fluorescence line (from memory): 3 s_y/x / b = 0.67. With
// ICH's factors 3.3 and 10, and the chi-square bounds for 5 degrees of freedom
// (0.624208, 2.452614), computed independently.
TEST(CalibrationResidual, FluorescenceLine) {
  const LimitEvidence evidence = fitted(fluorescence());
  const auto found = limit(evidence);
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits(*found->detection, 0.67, 2));
  EXPECT_TRUE(agrees_to_digits(*found->detection, 0.6726957986, 10));
  EXPECT_TRUE(agrees_to_digits(*found->quantitation, 2.2423193285, 11));
  EXPECT_TRUE(agrees_to_digits(*found->detection_lower, 0.419902, 6));
  EXPECT_TRUE(agrees_to_digits(*found->detection_upper, 1.649863, 7));
  EXPECT_EQ(found->degrees_of_freedom, 5.0);
  EXPECT_EQ(found->n, 7U);
  EXPECT_EQ(found->grade(), Grade::Valid);

  const auto ich = limit(
      evidence, with_factors(procedure("calibration-residual"), 3.3, 10.0));
  ASSERT_TRUE(ich);
  EXPECT_TRUE(agrees_to_digits(*ich->detection, 0.7399653784, 10));
  EXPECT_TRUE(agrees_to_digits(
      *ich->detection,
      3.3 * *term(*ich, "residual standard deviation of the low line") /
          *term(*ich, "slope of the low line"),
      14));
}

TEST(CalibrationResidual, RefitsTheStandardsInTheRangeOfTheLimit) {
  const LimitEvidence evidence = fitted(seven_levels());
  const auto low = limit(evidence);  // up to 10 times 1: the first four
  ASSERT_TRUE(low);
  EXPECT_EQ(low->n, 4U);
  EXPECT_EQ(*term(*low, "highest standard of the low line"), 10.0);
  // x 1 2 5 10, y 10.8 20.1 52.5 98: Sxx 49, Sxy 477.2, Syy 4654.41.
  const double residual_sum = 4654.41 - 477.2 * 477.2 / 49.0;
  EXPECT_TRUE(agrees_to_digits(
      *low->detection, 3.0 * std::sqrt(residual_sum / 2.0) / (477.2 / 49.0),
      10));

  const auto all = limit(evidence, whole_range());
  ASSERT_TRUE(all);
  EXPECT_EQ(all->n, 7U);
  EXPECT_TRUE(
      agrees_to_digits(*all->detection, 3.0 * 5.698913195 / 10.05862779, 9));
}

// Through zero: s_y/x of the line through zero, n - 1 degrees of freedom.
TEST(CalibrationResidual, KeepsAnInterceptOfZero) {
  const auto found = limit(
      fitted(seven_levels(), {.intercept = Intercept::Zero}), whole_range());
  ASSERT_TRUE(found);
  EXPECT_TRUE(
      agrees_to_digits(*found->detection, 3.0 * 5.211999298 / 10.05322333, 9));
  EXPECT_EQ(found->degrees_of_freedom, 6.0);
}

// The zero level enters the refit but is no level.
TEST(CalibrationResidual, FourLevelsAboveZeroAreNeeded) {
  auto points = standards({{0, 0.1}, {1, 1.2}, {2, 1.9}, {5, 5.1}, {100, 99}});
  EXPECT_TRUE(contains(limit(fitted(points)).reason(),
                       "few-low-levels: 3 levels of standards up to 10, "));
  points.push_back(standard(6, 10.0, 9.8));
  const auto found = limit(fitted(points));
  ASSERT_TRUE(found);
  EXPECT_EQ(found->n, 5U);
}

TEST(CalibrationResidual, UnusedStandardsStayOut) {
  auto points = seven_levels();
  points[2].used = false;
  EXPECT_TRUE(
      contains(limit(fitted(points)).reason(), "few-low-levels: 3 levels"));
}

TEST(CalibrationResidual, NotApplicable) {
  EXPECT_TRUE(contains(limit({}).reason(), "no-calibration: "));
  EXPECT_TRUE(contains(
      limit(fitted(seven_levels(), {.model = Model::Quadratic})).reason(),
      "quadratic-calibration: "));
  EXPECT_TRUE(contains(
      limit(fitted(standards({{1, 3.1}, {2, 6.2}, {4, 12.4}, {8, 24.8}})))
          .reason(),
      "no-scatter: "));
  EXPECT_TRUE(
      contains(limit(fitted(standards({{1, 3}, {2, 6}, {4, 12}, {8, 24}}),
                            {.model = Model::ResponseFactor}))
                   .reason(),
               "no-scatter: "));
}

// Weighted: s_w / sqrt(w) at the lowest level. 1/x2, s_w 0.1, lowest level 5,
// slope 2: s 0.5, limit 3 * 0.5 / 2.
TEST(CalibrationResidual, WeightedFitsTakeTheLowestLevel) {
  LimitEvidence evidence;
  evidence.calibration = known_line(0.0, 2.0, 5.0);
  evidence.calibration->settings.weight = Weight::InverseXSquared;
  EXPECT_TRUE(within_condition(*limit(evidence)->detection, 0.75, 4));
  evidence.calibration->settings.weight = Weight::InverseX;
  EXPECT_TRUE(within_condition(*limit(evidence)->detection,
                               3.0 * 0.1 * std::sqrt(5.0) / 2.0, 4));

  const auto weighted =
      limit(fitted(seven_levels(), {.weight = Weight::InverseX}));
  ASSERT_TRUE(weighted);
  EXPECT_TRUE(agrees_to_digits(*weighted->detection,
                               3.0 * 0.9795978812 / 10.02106162, 9));
  const auto factor =
      limit(fitted(seven_levels(), {.model = Model::ResponseFactor}));
  ASSERT_TRUE(factor);
  EXPECT_TRUE(agrees_to_digits(*factor->detection,
                               3.0 * 0.3591855867 / 10.19142857, 9));
  EXPECT_EQ(factor->degrees_of_freedom, 6.0);
}

TEST(CalibrationResidual, WeightedFitsDoNotFallBelowTheBlanks) {
  LimitEvidence evidence = evidence_of({-1.0, 0.0, 1.0}, known_line(0, 2, 5));
  evidence.calibration->settings.weight = Weight::InverseXSquared;
  const auto found = limit(evidence);  // blanks: s 1; at the lowest level 0.5
  ASSERT_TRUE(found);
  EXPECT_TRUE(within_condition(*found->detection, 1.5, 4));
  EXPECT_EQ(found->degrees_of_freedom, 2.0);
  EXPECT_EQ(*term(*found, "standard deviation used (the larger)"), 1.0);

  evidence.blanks = blanks_of({-0.4, 0.0, 0.4});
  EXPECT_TRUE(within_condition(*limit(evidence)->detection, 0.75, 4));
  evidence.blanks = blanks_of({-9.0, 9.0});  // too few to say anything
  EXPECT_TRUE(within_condition(*limit(evidence)->detection, 0.75, 4));
}

LowRangeLine pairs_with_spread(double low, double high) {
  LowRangeLine line;
  line.concentrations = {1, 1, 2, 2, 5, 5, 10, 10};
  line.responses = {1 - low,  1 + low,  2 - low,   2 + low,
                    5 - high, 5 + high, 10 - high, 10 + high};
  line.highest = 10.0;
  return line;
}

// Two degrees of freedom each: P(F >= r) = 1 / (1 + r).
TEST(VarianceRatio, OfReplicates) {
  for (double factor : {1.0, 3.0, 14.0}) {
    const auto found = variance_ratio(pairs_with_spread(0.125, 0.125 * factor));
    ASSERT_TRUE(found);
    const double ratio = factor * factor;
    EXPECT_TRUE(within_condition(found->ratio, ratio, 20));
    EXPECT_TRUE(
        within_condition(found->probability, 1.0 / (1.0 + ratio), 1000));
  }
  EXPECT_FALSE(variance_ratio(pairs_with_spread(0.0, 0.5)));
}

// Single points: a line of its own through each half, 1 degree of freedom
// each, P(F >= r) = 1 - (2/pi) atan(sqrt(r)). The middle point stays out.
TEST(VarianceRatio, OfSinglePoints) {
  LowRangeLine line;
  line.concentrations = {1, 2, 3, 4, 5, 6, 7};
  line.responses = {1, 3, 1, 77, 10, 0, 10};
  const auto found = variance_ratio(line);
  ASSERT_TRUE(found);
  EXPECT_TRUE(within_condition(found->ratio, 25.0, 100));
  EXPECT_TRUE(within_condition(found->probability,
                               1.0 - std::atan(5.0) / std::acos(0.0), 1000));
  line.concentrations.resize(4);
  line.responses.resize(4);
  EXPECT_FALSE(variance_ratio(line));
}

TEST(LowRangeFindings, GradesOfGrowingVariance) {
  struct Row {
    double factor;  // of the standard deviation
    Grade grade;
  };
  for (const Row& row : std::initializer_list<Row>{{1.0, Grade::Valid},
                                                   {4.0, Grade::Valid},
                                                   {5.0, Grade::Caution},
                                                   {9.0, Grade::Caution},
                                                   {11.0, Grade::NotValid}}) {
    LimitEstimate estimate;
    judge_variance(estimate, pairs_with_spread(0.1, 0.1 * row.factor));
    EXPECT_EQ(estimate.grade(), row.grade) << row.factor;
  }
}

TEST(LowRangeFindings, GrowingVarianceMakesTheLimitNotValid) {
  const LowRangeLine line = pairs_with_spread(0.01, 0.5);
  std::vector<std::pair<double, double>> pairs;
  for (std::size_t i = 0; i < line.responses.size(); ++i)
    pairs.emplace_back(line.concentrations[i], line.responses[i]);
  const auto found = limit(fitted(standards(pairs)));
  ASSERT_TRUE(found);
  EXPECT_EQ(found->grade(), Grade::NotValid);
  EXPECT_TRUE(finding(*found, "variance-grows"));
}

TEST(LowRangeFindings, Curvature) {
  std::vector<std::pair<double, double>> pairs;
  for (double x : {1.0, 2.0, 3.0, 5.0, 7.0, 10.0})
    pairs.emplace_back(x, 10 * x - 0.3 * x * x + (x < 4 ? 0.1 : -0.1));
  const auto found = limit(fitted(standards(pairs)));
  ASSERT_TRUE(found);
  EXPECT_TRUE(finding(*found, "curvature-at-low-end"));
  EXPECT_FALSE(finding(*limit(fitted(fluorescence())), "curvature-at-low-end"));
}

// s_y/x is 0.4328 with 5 degrees of freedom; F 8.746 at 1 % for (5, 6).
TEST(LowRangeFindings, ResidualsAboveTheBlanks) {
  LimitEvidence evidence = fitted(fluorescence());
  std::vector<double> blanks = {1.4, 1.6, 1.5, 1.3, 1.7, 1.5, 1.5};
  evidence.blanks = blanks_of(blanks);  // s 0.129: ratio 3.35
  const auto found = limit(evidence);
  ASSERT_TRUE(found);
  ASSERT_TRUE(finding(*found, "residuals-exceed-blanks"));
  EXPECT_EQ(found->grade(), Grade::Caution);

  for (double& response : blanks) response = 1.5 + 2.0 * (response - 1.5);
  evidence.blanks = blanks_of(blanks);  // s 0.258: ratio 1.68
  EXPECT_FALSE(finding(*limit(evidence), "residuals-exceed-blanks"));
}

}  // namespace
}  // namespace loqsmith::test
