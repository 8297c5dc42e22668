#include "loqsmith/calibration/curve_difference.hpp"

#include "calibration/examples.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/least_squares.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::Intercept;
using test::Model;
using test::standards;
using test::Weight;
using test::within_condition;

// Injections 1 to 5, then 6 to 10 of a detector that gives some 3 % less.
std::vector<StandardPoint> two_groups() {
  return standards({{1, 10.3},
                    {2, 20.1},
                    {4, 40.9},
                    {8, 79.7},
                    {10, 100.6},
                    {1, 9.8},
                    {2, 19.7},
                    {4, 38.6},
                    {8, 77.5},
                    {10, 97.1}});
}

const std::vector<int> kLater{6, 7, 8, 9, 10};

// The slow twin: both groups in one model with an intercept and a slope of
// its own for the later one; F for leaving these two coefficients out.
double f_by_indicators(const std::vector<StandardPoint>& points,
                       const std::vector<double>& weights) {
  std::vector<double> one, x, later, later_x, y;
  for (const StandardPoint& point : points) {
    const double is_later = point.injection > 5 ? 1.0 : 0.0;
    one.push_back(1.0);
    x.push_back(point.concentration);
    later.push_back(is_later);
    later_x.push_back(is_later * point.concentration);
    y.push_back(point.response);
  }
  const auto full = fit_columns({one, x, later, later_x}, y, weights);
  const auto small = fit_columns({one, x}, y, weights);
  return (small->weighted_residual_sum - full->weighted_residual_sum) / 2.0 /
         (full->weighted_residual_sum / full->degrees_of_freedom);
}

TEST(CurveDifference, EqualsTheTestOfIndicatorColumns) {
  const auto line = fit_calibration(two_groups(), {});
  ASSERT_TRUE(line);
  const auto found = compare_curves(*line, kLater);
  ASSERT_TRUE(found);
  EXPECT_TRUE(
      within_condition(found->f, f_by_indicators(two_groups(), {}), 1e5));
  EXPECT_EQ(found->numerator_df, 2);
  EXPECT_EQ(found->denominator_df, 6);
  // F_0.99(2, 6), table of the F distribution.
  EXPECT_TRUE(test::agrees_to_digits(found->critical, 10.92, 4));
  EXPECT_TRUE(within_condition(found->p, 1.0 - f_cdf(found->f, 2, 6), 10.0));
  EXPECT_GT(found->f, found->critical);
  EXPECT_LT(found->mean_percent, -2.5);
  EXPECT_GT(found->mean_percent, -5.0);
}

TEST(CurveDifference, TakesTheWeightsOfTheCommonCurve) {
  const auto line =
      fit_calibration(two_groups(), {.weight = Weight::InverseXSquared});
  ASSERT_TRUE(line);
  std::vector<double> weights;
  for (const StandardPoint& point : two_groups()) {
    weights.push_back(1.0 / (point.concentration * point.concentration));
  }
  const auto found = compare_curves(*line, kLater);
  ASSERT_TRUE(found);
  EXPECT_TRUE(
      within_condition(found->f, f_by_indicators(two_groups(), weights), 1e5));
}

TEST(CurveDifference, DegreesOfFreedomFollowTheModel) {
  const auto quadratic =
      fit_calibration(two_groups(), {.model = Model::Quadratic});
  ASSERT_TRUE(quadratic);
  EXPECT_EQ(compare_curves(*quadratic, kLater)->numerator_df, 3);
  EXPECT_EQ(compare_curves(*quadratic, kLater)->denominator_df, 4);
  const auto zero =
      fit_calibration(two_groups(), {.intercept = Intercept::Zero});
  EXPECT_EQ(compare_curves(*zero, kLater)->numerator_df, 1);
  EXPECT_EQ(compare_curves(*zero, kLater)->denominator_df, 8);
}

// Groups of one curve: F exceeds F_0.99 in one night of a hundred. The
// deviations are fixed and have no pattern.
TEST(CurveDifference, GroupsOfOneCurveDoNotDiffer) {
  const auto line = fit_calibration(standards({{1, 10.3},
                                               {2, 20.1},
                                               {4, 40.9},
                                               {8, 79.7},
                                               {10, 100.6},
                                               {1, 10.1},
                                               {2, 20.4},
                                               {4, 40.2},
                                               {8, 80.3},
                                               {10, 100.1}}),
                                    {});
  ASSERT_TRUE(line);
  const auto found = compare_curves(*line, kLater);
  ASSERT_TRUE(found);
  EXPECT_LT(found->f, found->critical);
  EXPECT_GT(found->p, 0.1);
}

TEST(CurveDifference, RefusesWhatCannotBeCompared) {
  const auto line = fit_calibration(two_groups(), {});
  const auto few = compare_curves(*line, {9, 10});
  ASSERT_FALSE(few);
  EXPECT_EQ(few.reason().rfind("few-standards: ", 0), 0U);
  const auto exact = fit_calibration(
      standards({{1, 2}, {2, 4}, {4, 8}, {1, 2}, {2, 4}, {4, 8}}), {});
  const auto without = compare_curves(*exact, {4, 5, 6});
  ASSERT_FALSE(without);
  EXPECT_EQ(without.reason().rfind("not-defined: ", 0), 0U);
}

}  // namespace
}  // namespace loqsmith
