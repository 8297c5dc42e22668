#include "loqsmith/calibration/variance_function.hpp"

#include <cmath>

#include "calibration/examples.hpp"
#include "loqsmith/calibration/inverse.hpp"
#include "loqsmith/calibration/weight.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

/// Two, three or four values about a mean with that sum of squares.
ReplicateGroup level(double concentration, double squares, int degrees) {
  const double mean = 10.0 * concentration;
  ReplicateGroup group{concentration, {}, {}};
  const double off = std::sqrt(squares / (degrees == 3 ? 4.0 : 2.0));
  if (degrees == 1) group.responses = {mean - off, mean + off};
  if (degrees == 2) group.responses = {mean - off, mean, mean + off};
  if (degrees == 3)
    group.responses = {mean - off, mean - off, mean + off, mean + off};
  return group;
}

// The least of sum nu ln v + SS/v by nlm of R 4.2.2, in the logarithms.
TEST(VarianceFunction, AgainstAnIndependentComputation) {
  const auto found = pooled_variance_function(
      {level(0, .08, 2), level(1, .05, 2), level(5, 1.9, 2), level(20, 18, 3),
       level(100, 900, 2)});
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits(found->additive, 0.03097946, 6));
  EXPECT_TRUE(agrees_to_digits(found->proportional, 0.02745078, 6));
  EXPECT_EQ(found->levels, 5U);
  EXPECT_EQ(found->degrees_of_freedom, 11.0);
}

// Equal scatter: the pooled variance, and the unweighted fit.
TEST(VarianceFunction, EqualScatterIsTheUnweightedFit) {
  const auto found = pooled_variance_function(
      {level(1, 2.0, 2), level(10, 2.0, 2), level(100, 2.0, 2)});
  ASSERT_TRUE(found);
  EXPECT_TRUE(same_bits(found->proportional, 0.0));
  EXPECT_TRUE(within_condition(found->additive, 1.0, 1e3));

  std::vector<std::pair<double, double>> pairs;
  for (double x : {1.0, 5.0, 9.0})
    for (double off : {-1.0, 0.5, 0.5}) pairs.emplace_back(x, 7.0 * x + off);
  pairs[4].second += 0.25;
  pairs[5].second -= 0.25;
  const auto weighted =
      fit_calibration(standards(pairs), {.weight = Weight::InverseVariance});
  const auto plain = fit_calibration(standards(pairs), {});
  ASSERT_TRUE(weighted && plain && weighted->variance);
  EXPECT_TRUE(within_condition(weighted->slope, plain->slope, 100));
}

// Scatter in proportion: v is p x^2, and the fit that with weight 1/x2.
TEST(VarianceFunction, ProportionalScatterIsOneOverXSquared) {
  std::vector<std::pair<double, double>> pairs;
  for (double x : {1.0, 4.0, 16.0, 64.0})
    for (double off : {0.97, 1.0, 1.04}) pairs.emplace_back(x, 5.0 * x * off);
  const auto weighted =
      fit_calibration(standards(pairs), {.weight = Weight::InverseVariance});
  const auto squared =
      fit_calibration(standards(pairs), {.weight = Weight::InverseXSquared});
  ASSERT_TRUE(weighted && squared && weighted->variance);
  EXPECT_TRUE(same_bits(weighted->variance->additive, 0.0));
  EXPECT_TRUE(within_condition(weighted->slope, squared->slope, 100));
  EXPECT_TRUE(
      within_condition(weighted->intercept, squared->intercept, 1e3, 5.0));
  // The weights are variances: what remains has a deviation near 1.
  EXPECT_TRUE(within_condition(response_sd_at(*weighted, 8.0),
                               response_sd_at(*squared, 8.0), 1e3));
}

// A standard of zero concentration takes part where the scatter is additive.
TEST(VarianceFunction, ZeroLevelWithAnAdditivePart) {
  std::vector<std::pair<double, double>> pairs{
      {0, 0.1}, {0, -0.1}, {0, 0.2}, {1, 10.1}, {1, 9.8},  {1, 10.0},
      {9, 88},  {9, 92},   {9, 91},  {50, 480}, {50, 510}, {50, 500}};
  const auto fit =
      fit_calibration(standards(pairs), {.weight = Weight::InverseVariance});
  ASSERT_TRUE(fit);
  EXPECT_EQ(fit->used_points(), 12U);
  EXPECT_EQ(fit->used_levels(), 3U);
  EXPECT_GT(fit->variance->additive, 0.0);
  EXPECT_TRUE(
      within_condition(fit->points[3].weight, 1.0 / fit->variance->at(1.0), 4));
  EXPECT_TRUE(concentration_from_response(*fit, 5.0)->interval);
}

TEST(VarianceFunction, ScaleOfResponsesAndConcentrations) {
  std::vector<ReplicateGroup> groups{level(1, .05, 2), level(5, 1.9, 2),
                                     level(20, 18, 3)};
  const auto one = pooled_variance_function(groups);
  for (ReplicateGroup& group : groups) {
    group.concentration *= 1024.0;
    for (double& response : group.responses) response *= 0x1p-20;
  }
  const auto other = pooled_variance_function(groups);
  ASSERT_TRUE(one && other);
  EXPECT_TRUE(
      agrees_to_digits(other->proportional * 0x1p60, one->proportional, 6));
}

TEST(VarianceFunction, Refusals) {
  const auto word = [](const std::vector<ReplicateGroup>& groups) {
    const auto found = pooled_variance_function(groups);
    return found ? std::string("found")
                 : found.reason().substr(0, found.reason().find(':'));
  };
  EXPECT_EQ(word({}), "no-replicates");
  EXPECT_EQ(word({level(0, 1, 2), level(1, 1, 2)}), "no-replicates");
  EXPECT_EQ(word({level(1, 0, 2), level(2, 0, 2)}).substr(0, 10), "no-scatter");
  EXPECT_EQ(word({level(0, 0, 2), level(1, 1, 2), level(2, 0, 1)}), "found");
}

}  // namespace
}  // namespace loqsmith::test
