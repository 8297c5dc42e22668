#include "loqsmith/numerics/peaked_integral.hpp"

#include <cmath>
#include <limits>
#include <numbers>

#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

double mean_under(const PeakedIntegral& integral) {
  double mean = 0.0;
  for (std::size_t i = 0; i < integral.points.size(); ++i)
    mean += integral.shares[i] * integral.points[i];
  return mean;
}

LogDensityAt normal_about(double mean, double sd) {
  return [=](double at) {
    const double z = (at - mean) / sd;
    return LogDensity{-0.5 * z * z, -z / sd, -1.0 / (sd * sd)};
  };
}

// exp(-z^2/2) over the axis is sqrt(2 pi), whatever place and width. Points
// hold mean / sd fewer digits than their distance from the mean.
TEST(PeakedIntegral, NormalDensitiesComeOutToTheLastDigits) {
  PeakedIntegral found;
  for (double mean : {0.0, -3.0, 1e4})
    for (double sd : {1e-6, 1.0, 250.0}) {
      ASSERT_TRUE(integrate_about_mode(normal_about(mean, sd), 0.5, found));
      EXPECT_TRUE(within_condition(
          found.log_integral,
          0.5 * std::log(2.0 * std::numbers::pi) + std::log(sd),
          40.0 * (1.0 + std::abs(mean) / sd), 1.0));
      EXPECT_TRUE(within_condition(mean_under(found), mean, 100.0,
                                   std::max(std::abs(mean), sd)));
    }
}

// With a = 6, the integral of exp(a x - e^x) is Gamma(6) = 120, and the mean
// of x is digamma(6) = 1 + 1/2 + 1/3 + 1/4 + 1/5 - Euler's constant: a peak
// that is not symmetric.
TEST(PeakedIntegral, SkewPeakGivesGammaAndDigamma) {
  PeakedIntegral found;
  const LogDensityAt density = [](double x) {
    const double grown = std::exp(x);
    return LogDensity{6.0 * x - grown, 6.0 - grown, -grown};
  };
  ASSERT_TRUE(integrate_about_mode(density, 0.0, found));
  EXPECT_TRUE(agrees_to_digits(std::exp(found.log_integral), 120.0, 12));
  EXPECT_TRUE(agrees_to_digits(
      mean_under(found), 137.0 / 60.0 - std::numbers::egamma_v<double>, 12));
}

TEST(PeakedIntegral, WhatHasNoPeakIsRefused) {
  PeakedIntegral found;
  const auto flat = [](double) { return LogDensity{0.0, 0.0, -1.0}; };
  EXPECT_FALSE(integrate_about_mode(flat, 0.0, found));
  const auto nowhere = [](double) {
    return LogDensity{std::numeric_limits<double>::quiet_NaN(), 0.0, -1.0};
  };
  EXPECT_FALSE(integrate_about_mode(nowhere, 0.0, found));
}

}  // namespace
}  // namespace loqsmith::test
