#include "loqsmith/signal/emg.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <limits>
#include <vector>

#include "support/simulator.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;

struct Known {
  double minutes;
  EmgShape shape;
  double value;
};

// To 50 digits by mpmath, rounded to doubles.
constexpr Known kKnown[] = {
    {5.0, {5.0, 0.1, 0.1}, 2.6157829186512337},
    {5.2, {5.0, 0.1, 0.1}, 1.8772938793031402},
    {4.8, {5.0, 0.1, 0.1}, 0.16445124617899133},
    {5.0, {5.0, 0.1, 1e-3}, 3.98902398135681},
    {5.1, {5.0, 0.1, 1e-3}, 2.4438994313247364},
    {5.0, {5.0, 0.1, 1e-8}, 3.9894228040142869},
    {5.1, {5.0, 0.1, 1e-8}, 2.419707487162158},
    {6.0, {5.0, 0.1, 0.5}, 0.27613847462178562},
    {5.0, {5.0, 0.01, 1.0}, 0.4960354448375763},
    {8.0, {5.0, 0.01, 1.0}, 0.049789557783517209},
    {4.0, {5.0, 0.1, 0.2}, 3.6317259014323247e-23},
    {5.05, {5.0, 0.1, 10.0}, 0.068453619613293783},
};

TEST(Emg, AgreesWithValuesOfHighPrecision) {
  for (const Known& known : kKnown) {
    EXPECT_TRUE(
        agrees_to_digits(emg(known.shape, known.minutes), known.value, 12))
        << known.minutes << ' ' << known.shape.tau;
    EXPECT_TRUE(agrees_to_digits(
        emg_derivatives(known.shape, known.minutes).value, known.value, 12));
  }
}

TEST(Emg, FrontingIsTheMirrorImage) {
  const EmgShape tails{5.0, 0.1, 0.2};
  const EmgShape fronts{5.0, 0.1, -0.2};
  for (const double out : {-0.7, -0.1, 0.0, 0.05, 0.4}) {
    EXPECT_TRUE(
        agrees_to_digits(emg(fronts, 5.0 - out), emg(tails, 5.0 + out), 12));
  }
}

TEST(Emg, StaysFiniteForEveryShape) {
  const double times[] = {-1e300, -30.0, 4.0, 5.0, 5.1, 40.0, 1e300};
  const double taus[] = {0.0, 5e-324, 1e-300, 1e-12, 1e-3, 1.0, 1e6, 1e150};
  for (const double sigma : {1e-9, 0.05, 20.0, 1e9}) {
    for (const double size : taus) {
      for (const double tau : {size, -size}) {
        for (const double t : times) {
          const EmgShape shape{5.0, sigma, tau};
          EXPECT_TRUE(std::isfinite(emg(shape, t)))
              << t << ' ' << sigma << ' ' << tau;
          EXPECT_GE(emg(shape, t), 0.0);
        }
      }
    }
  }
}

// Central differences of the value, with the error of their own step.
TEST(Emg, DerivativesAreThoseOfTheValue) {
  for (const double tau :
       {-0.08, -2e-3, -1e-4, 0.0, 3e-5, 9e-4, 1.1e-3, 0.02, 0.1, 0.5}) {
    for (const double t : {4.8, 4.95, 5.0, 5.03, 5.3}) {
      const EmgShape shape{5.0, 0.1, tau};
      const EmgDerivatives found = emg_derivatives(shape, t);
      const auto slope = [&](double EmgShape::*which) {
        const double h = 2e-5;
        EmgShape less = shape;
        EmgShape more = shape;
        less.*which -= h;
        more.*which += h;
        return (emg(more, t) - emg(less, t)) / (2.0 * h);
      };
      // Step error h^2/6 times third derivatives of up to 4e4 of sigma^-4.
      const double error = 1e-5;
      EXPECT_LT(std::abs(found.by_mu - slope(&EmgShape::mu)), error) << tau;
      EXPECT_LT(std::abs(found.by_sigma - slope(&EmgShape::sigma)), error)
          << tau << ' ' << t;
      EXPECT_LT(std::abs(found.by_tau - slope(&EmgShape::tau)), error)
          << tau << ' ' << t;
    }
  }
}

// Central differences at constant mean and variance.
TEST(Emg, DerivativeByTheCubeOfTauIsThatOfTheValue) {
  const double spread = 0.1;
  const auto value = [&](double cube, double t) {
    const double tau = std::cbrt(cube);
    const double sigma = std::sqrt(spread * spread - tau * tau);
    return emg({5.0 - tau, sigma, tau}, t);
  };
  for (const double tau : {-0.06, -0.003, 0.004, 0.02, 0.08}) {
    for (const double t : {4.8, 4.93, 5.02, 5.3}) {
      const double sigma = std::sqrt(spread * spread - tau * tau);
      const auto found = emg_derivatives({5.0 - tau, sigma, tau}, t);
      const double cube = tau * tau * tau;
      const double step = 1e-3 * cube;
      const double slope =
          (value(cube + step, t) - value(cube - step, t)) / (2.0 * step);
      // Largest values are some 1e4; the step costs a millionth of that.
      EXPECT_LT(std::abs(found.by_tau_cubed - slope), 0.05) << tau << ' ' << t;
    }
  }
}

TEST(Emg, BothFormsOfTheDerivativesMeet) {
  for (const double t : {4.75, 4.9, 5.0, 5.1, 5.35}) {
    const double tau = 0.005;  // sigma / 20
    const auto below = emg_derivatives({5.0, 0.1, tau * (1.0 - 1e-12)}, t);
    const auto above = emg_derivatives({5.0, 0.1, tau * (1.0 + 1e-12)}, t);
    EXPECT_TRUE(agrees_to_digits(below.by_mu, above.by_mu, 8)) << t;
    EXPECT_TRUE(agrees_to_digits(below.by_sigma, above.by_sigma, 8)) << t;
    EXPECT_TRUE(agrees_to_digits(below.by_tau, above.by_tau, 7)) << t;
    EXPECT_TRUE(agrees_to_digits(below.by_tau_cubed, above.by_tau_cubed, 6))
        << t;
  }
}

struct Measured {
  double tau;
  double apex;
  double height;
  double width_10;
  double asymmetry;
  double tailing;
  double width_50;
};

// Exact peaks with mu 10 and sigma 0.1, computed numerically to high precision.
constexpr Measured kMeasured[] = {
    {0.05, 10.042814, 3.640036, 0.473697, 1.092879, 1.057187, 0.255886},
    {0.10, 10.069737, 3.128284, 0.566327, 1.362180, 1.228212, 0.289089},
    {0.15, 10.088094, 2.706402, 0.676260, 1.700626, 1.435443, 0.323619},
    {0.20, 10.101791, 2.376368, 0.791546, 2.055600, 1.648134, 0.358646},
    {0.30, 10.121538, 1.906116, 1.026017, 2.766003, 2.069830, 0.430029},
};

TEST(Emg, ApexHeightAndWidthsAreThoseOfExactPeaks) {
  for (const Measured& known : kMeasured) {
    const EmgShape shape{10.0, 0.1, known.tau};
    const double apex = emg_apex(shape);
    const auto front = [&](double fraction) {
      return apex - emg_fallen_to(shape, fraction, true);
    };
    const auto rear = [&](double fraction) {
      return emg_fallen_to(shape, fraction, false) - apex;
    };
    EXPECT_TRUE(agrees_to_digits(apex, known.apex, 8));
    EXPECT_TRUE(agrees_to_digits(emg(shape, apex), known.height, 7));
    EXPECT_TRUE(agrees_to_digits(front(0.1) + rear(0.1), known.width_10, 6));
    EXPECT_TRUE(agrees_to_digits(rear(0.1) / front(0.1), known.asymmetry, 7));
    EXPECT_TRUE(agrees_to_digits(
        (front(0.05) + rear(0.05)) / (2.0 * front(0.05)), known.tailing, 7));
    EXPECT_TRUE(agrees_to_digits(front(0.5) + rear(0.5), known.width_50, 6));
  }
}

TEST(Emg, ApexOfAGaussianIsItsMean) {
  EXPECT_EQ(emg_apex({5.0, 0.1, 0.0}), 5.0);
  EXPECT_LT(emg_apex({5.0, 0.1, -0.1}), 5.0);
}

// Mean mu + tau, variance sigma^2 + tau^2, skewness 2 tau^3 / variance^1.5.
// Sums over points far closer than sigma are exact to rounding.
TEST(Emg, AreaAndMomentsAreThoseOfTheShape) {
  for (const double tau : {-0.15, 0.0, 0.05, 0.2}) {
    const EmgShape shape{5.0, 0.1, tau};
    const double mean = 5.0 + tau;
    const double variance = 0.01 + tau * tau;
    const double skewness = 2.0 * tau * tau * tau / std::pow(variance, 1.5);
    const double h = 0.01;
    double area = 0.0;
    double first = 0.0;
    double second = 0.0;
    double third = 0.0;
    double until = 0.0;
    for (int i = 0; i < 2000; ++i) {
      const double t = -5.0 + h * i;
      const double f = h * emg(shape, t);
      const double out = t - mean;
      area += f;
      first += f * t;
      second += f * out * out;
      third += f * out * out * out;
      if (t < 5.1 - 0.5 * h) until += f;
    }
    EXPECT_TRUE(agrees_to_digits(area, 1.0, 10));
    EXPECT_TRUE(agrees_to_digits(first, mean, 10));
    EXPECT_TRUE(agrees_to_digits(second, variance, 9));
    EXPECT_LT(std::abs(third / std::pow(second, 1.5) - skewness), 1e-7);
    // Half a step at the end: the midpoint rule, error h^2/24 of the slope.
    EXPECT_LT(std::abs(emg_area_until(shape, 5.1 - 0.5 * h) - until), 2e-4);
  }
}

}  // namespace
}  // namespace loqsmith
