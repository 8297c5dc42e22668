#include "loqsmith/numerics/levenberg_marquardt.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <limits>

#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;

// NIST StRD, nonlinear regression, data set Misra1a (lower difficulty).
const std::vector<double> kVolume{77.6,  114.9, 141.1, 190.8, 239.9,
                                  289.0, 332.8, 378.4, 434.8, 477.3,
                                  536.8, 593.1, 689.1, 760.0};
const std::vector<double> kPressure{10.07, 14.73, 17.94, 23.93, 29.61,
                                    35.18, 40.02, 44.82, 50.76, 55.05,
                                    61.01, 66.40, 75.47, 81.78};

// y = b1 (1 - exp(-b2 x))
NonlinearProblem misra() {
  NonlinearProblem problem;
  problem.residuals = kVolume.size();
  problem.residuals_at = [](std::span<const double> b, std::span<double> r) {
    for (std::size_t i = 0; i < r.size(); ++i) {
      r[i] = b[0] * -std::expm1(-b[1] * kVolume[i]) - kPressure[i];
    }
  };
  problem.derivatives_at = [](std::span<const double> b, std::span<double> j) {
    const std::size_t n = kVolume.size();
    for (std::size_t i = 0; i < n; ++i) {
      j[i] = -std::expm1(-b[1] * kVolume[i]);
      j[n + i] = b[0] * kVolume[i] * std::exp(-b[1] * kVolume[i]);
    }
  };
  return problem;
}

TEST(LevenbergMarquardt, AgreesWithCertifiedValuesFromBothStarts) {
  for (const std::vector<double>& start :
       {std::vector{500.0, 0.0001}, std::vector{250.0, 0.0005}}) {
    const auto fit = minimise_squares(misra(), start);
    ASSERT_TRUE(fit) << fit.reason();
    // NIST StRD Misra1a, certified.
    EXPECT_TRUE(agrees_to_digits(fit->parameters[0], 2.3894212918e+02, 8));
    EXPECT_TRUE(agrees_to_digits(fit->parameters[1], 5.5015643181e-04, 8));
    EXPECT_TRUE(agrees_to_digits(fit->residual_sum, 1.2455138894e-01, 10));
    const double variance = fit->residual_sum / 12.0;
    EXPECT_TRUE(agrees_to_digits(std::sqrt(variance * fit->inverse[0]),
                                 2.7070075241e+00, 7));
    EXPECT_TRUE(agrees_to_digits(std::sqrt(variance * fit->inverse[3]),
                                 7.2668688436e-06, 7));
    EXPECT_GT(fit->evaluations, 1);
  }
}

TEST(LevenbergMarquardt, SaysWhenEvaluationsAreUsedUp) {
  const auto fit = minimise_squares(misra(), {500.0, 0.0001}, 3);
  ASSERT_FALSE(fit);
  EXPECT_EQ(fit.reason(), "the fit still moves after all its evaluations");
}

TEST(LevenbergMarquardt, SaysWhenTheModelIsNotFiniteAtTheStart) {
  const auto fit = minimise_squares(misra(), {500.0, -1e6});
  ASSERT_FALSE(fit);
  EXPECT_EQ(fit.reason(), "the model is not finite at the start");
}

TEST(LevenbergMarquardt, StepsBackFromWhereTheModelIsNotFinite) {
  // ln(p) against 0, from where the full step would lead below zero.
  NonlinearProblem problem;
  problem.residuals = 2;
  problem.residuals_at = [](std::span<const double> p, std::span<double> r) {
    r[0] =
        p[0] > 0.0 ? std::log(p[0]) : std::numeric_limits<double>::quiet_NaN();
    r[1] = r[0];
  };
  problem.derivatives_at = [](std::span<const double> p, std::span<double> j) {
    j[0] = j[1] = 1.0 / p[0];
  };
  const auto fit = minimise_squares(problem, {20.0});
  ASSERT_TRUE(fit) << fit.reason();
  EXPECT_TRUE(agrees_to_digits(fit->parameters[0], 1.0, 9));
}

TEST(LevenbergMarquardt, SaysWhenThePointsDoNotDetermineTheParameters) {
  // Only the sum of the two enters.
  NonlinearProblem problem;
  problem.residuals = 3;
  problem.residuals_at = [](std::span<const double> p, std::span<double> r) {
    for (std::size_t i = 0; i < 3; ++i) {
      r[i] = (p[0] + p[1]) * static_cast<double>(i) - 1.0;
    }
  };
  problem.derivatives_at = [](std::span<const double>, std::span<double> j) {
    for (std::size_t i = 0; i < 6; ++i) j[i] = static_cast<double>(i % 3);
  };
  const auto fit = minimise_squares(problem, {1.0, 2.0});
  ASSERT_FALSE(fit);
  EXPECT_EQ(fit.reason(), "the points do not determine the parameters");
}

TEST(LevenbergMarquardt, NeedsMorePointsThanParameters) {
  NonlinearProblem problem = misra();
  problem.residuals = 2;
  EXPECT_FALSE(minimise_squares(problem, {500.0, 0.0001}));
}

}  // namespace
}  // namespace loqsmith
