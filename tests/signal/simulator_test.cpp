#include "support/simulator.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

// Published by W. J. Cody's definition erfcx(z) = exp(z^2) erfc(z); figures
// from 50-digit arithmetic.
TEST(Simulator, ScaledComplementaryErrorHasItsFigures) {
  const double values[][2] = {{0.0, 1.0},
                              {0.1, 0.8964569799691268},
                              {0.5, 0.6156903441929258},
                              {1.0, 0.427583576155807},
                              {2.0, 0.2553956763105058},
                              {5.0, 0.1107046377330686},
                              {10.0, 0.05614099274382259},
                              {25.0, 0.02254957243264136},
                              {30.0, 0.01879588886141675},
                              {1e3, 5.641893014533876e-4},
                              {1e8, 5.641895835477563e-9},
                              {-1.0, 5.008980080762283},
                              {-3.0, 16205.98885399959}};
  for (const auto& [z, wanted] : values) {
    // exp(z^2) multiplies the rounding of z^2 by z^2.
    EXPECT_TRUE(within_condition(scaled_complementary_error(z), wanted,
                                 4.0 + 2.0 * std::min(z * z, 625.0)))
        << z;
  }
}

// Figures from 50-digit arithmetic; x, mu, sigma, tau, density.
TEST(Simulator, ModifiedGaussianHasItsFigures) {
  const double values[][5] = {{5, 5, .1, .1, 2.6157829186512337},
                              {5.2, 5, .1, .1, 1.8772938793031402},
                              {4.8, 5, .1, .1, 0.16445124617899133},
                              {5, 5, .1, 1e-3, 3.98902398135681},
                              {5.1, 5, .1, 1e-3, 2.4438994313247364},
                              {5, 5, .1, 1e-8, 3.9894228040142869},
                              {5.1, 5, .1, 1e-8, 2.419707487162158},
                              {6, 5, .1, .5, 0.27613847462178562},
                              {5, 5, .01, 1, 0.4960354448375763},
                              {8, 5, .01, 1, 0.049789557783517209},
                              {4, 5, .1, .2, 3.6317259014323247e-23},
                              {5.05, 5, .1, 10, 0.068453619613293783}};
  for (const auto& [x, mu, sigma, tau, wanted] : values) {
    EXPECT_TRUE(
        agrees_to_digits(modified_gaussian(x, mu, sigma, tau), wanted, 12))
        << x << " " << tau;
    EXPECT_TRUE(same_bits(modified_gaussian(-x, -mu, sigma, -tau),
                          modified_gaussian(x, mu, sigma, tau)));
  }
}

TEST(Simulator, NoiseHasTheSpreadAndTheCorrelationAskedFor) {
  SimulatedTrace wanted;
  wanted.end_minutes = 400.0;
  wanted.creeping_noise = 2.0;
  wanted.creep = 0.8;
  const Trace trace = simulate_trace(wanted, "creeping noise");
  double squares = 0.0;
  double products = 0.0;
  const std::size_t n = trace.signal.size() - 1;
  for (std::size_t i = 0; i < n; ++i) {
    squares += trace.signal[i] * trace.signal[i];
    products += trace.signal[i] * trace.signal[i + 1];
  }
  const double count = static_cast<double>(n);
  // Variance of the mean square of a Markov series: 2 s^4 (1 + r^2)/(1 - r^2)
  // over n; here 2 x 16 x 4.56.
  EXPECT_TRUE(within_sampling_error(squares / count, std::sqrt(145.8), n, 4.0));
  EXPECT_TRUE(
      within_sampling_error(products / count, std::sqrt(145.8), n, 3.2));
}

TEST(Simulator, TheSameNameDrawsTheSameTrace) {
  SimulatedTrace wanted;
  wanted.white_noise = 1.0;
  wanted.jitter = 0.2;
  const Trace one = simulate_trace(wanted, "a");
  const Trace same = simulate_trace(wanted, "a");
  const Trace other = simulate_trace(wanted, "b");
  EXPECT_EQ(one.signal, same.signal);
  EXPECT_EQ(one.minutes, same.minutes);
  EXPECT_NE(one.signal, other.signal);
}

}  // namespace
}  // namespace loqsmith::test
