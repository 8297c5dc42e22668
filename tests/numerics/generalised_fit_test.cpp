#include "loqsmith/numerics/generalised_fit.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <vector>

#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

using Values = std::vector<double>;

// Row i of the covariance matrix, written out.
double covariance(const MarkovCovariance& c, std::size_t i, std::size_t j) {
  const double apart = i > j ? static_cast<double>(i - j) :  //
                           static_cast<double>(j - i);
  const double white = i == j ? c.white : 0.0;
  return white + c.creeping * std::pow(c.correlation, apart);
}

Values uneven(std::size_t n) {
  Values v;
  for (std::size_t i = 0; i < n; ++i) {
    v.push_back(std::sin(1.7 * static_cast<double>(i)) + 0.1);
  }
  return v;
}

class Covariances : public testing::TestWithParam<MarkovCovariance> {};

// The tridiagonal inverse of a correlation near 1 has large entries that nearly
// cancel: (1 + r) / (1 - r) is the root of its condition.
TEST_P(Covariances, SolutionTimesTheMatrixGivesTheRightSide) {
  const Values v = uneven(60);
  const Values solved = solve_covariance(GetParam(), v);
  const double r = GetParam().correlation;
  const double condition = 64.0 * (1.0 + r) / (1.0 - r);
  for (std::size_t i = 0; i < v.size(); ++i) {
    double product = 0.0;
    double size = 0.0;
    for (std::size_t j = 0; j < v.size(); ++j) {
      const double term = covariance(GetParam(), i, j) * solved[j];
      product += term;
      size += std::abs(term);
    }
    EXPECT_TRUE(within_condition(product, v[i], condition, size)) << i;
  }
}

TEST_P(Covariances, WeightsReproduceEveryCombinationOfTheColumns) {
  const std::size_t n = 40;
  Values bump;
  Values level(n, 1.0);
  Values tilt;
  Values y;
  for (std::size_t i = 0; i < n; ++i) {
    const double x = (static_cast<double>(i) - 17.3) / 6.0;
    bump.push_back(std::exp(-0.5 * x * x));
    tilt.push_back(x);
    y.push_back(3.0 * bump[i] - 2.0 + 0.25 * tilt[i]);
  }
  const auto fit = generalised_fit({bump, level, tilt}, GetParam());
  ASSERT_TRUE(fit);
  const Values found = fit->coefficients(y);
  EXPECT_TRUE(within_condition(found[0], 3.0, 1e4));
  EXPECT_TRUE(within_condition(found[1], -2.0, 1e4));
  EXPECT_TRUE(within_condition(found[2], 0.25, 1e4));
}

// Least variance: whatever is added to the weights without losing their
// unbiasedness makes a' G a larger, because G a is a mixture of the columns.
TEST_P(Covariances, WeightsHaveTheLeastVariance) {
  const Values bump = uneven(30);
  const Values level(30, 1.0);
  const auto fit = generalised_fit({bump, level}, GetParam());
  ASSERT_TRUE(fit);
  const Values& a = fit->weights[0];
  const auto ordinary = generalised_fit({bump, level}, {1.0, 0.0, 0.0});
  ASSERT_TRUE(ordinary);
  double own = 0.0;
  double crossed = 0.0;
  for (std::size_t i = 0; i < a.size(); ++i) {
    for (std::size_t j = 0; j < a.size(); ++j) {
      const double c = covariance(GetParam(), i, j);
      own += a[i] * c * a[j];
      crossed += (ordinary->weights[0][i] - a[i]) * c * a[j];
    }
  }
  EXPECT_GT(own, 0.0);
  EXPECT_TRUE(within_condition(crossed, 0.0, 1e4, own));
}

INSTANTIATE_TEST_SUITE_P(GeneralisedFit, Covariances,
                         testing::Values(MarkovCovariance{2.0, 0.0, 0.0},
                                         MarkovCovariance{0.0, 2.0, 0.9},
                                         MarkovCovariance{0.5, 1.5, 0.8},
                                         MarkovCovariance{1.0, 1e-3, 0.995},
                                         MarkovCovariance{1e-3, 1.0, 0.995},
                                         MarkovCovariance{1.0, 2.0, 0.0}));

// By hand: unit variances with correlation 1/2; r = (1, 0) gives
// (1 / (1 - 1/4)) (1, -1/2), and r' G^-1 r = 4/3.
TEST(GeneralisedFit, TwoPointsByHand) {
  const MarkovCovariance c{0.0, 1.0, 0.5};
  const Values solved = solve_covariance(c, {1.0, 0.0});
  EXPECT_TRUE(within_condition(solved[0], 4.0 / 3.0, 4.0));
  EXPECT_TRUE(within_condition(solved[1], -2.0 / 3.0, 4.0));
  EXPECT_TRUE(within_condition(covariance_form(c, {1.0, 0.0}), 4.0 / 3.0, 4.0));
}

TEST(GeneralisedFit, WhatCannotBeFittedIsSaid) {
  const Values one(10, 1.0);
  EXPECT_FALSE(generalised_fit({one, Values(10, 2.0)}, {1.0, 0.0, 0.0}));
  EXPECT_FALSE(generalised_fit({Values(10, 0.0)}, {1.0, 0.0, 0.0}));
  EXPECT_FALSE(generalised_fit({Values(1, 1.0)}, {1.0, 0.0, 0.0}));
}

}  // namespace
}  // namespace loqsmith::test
