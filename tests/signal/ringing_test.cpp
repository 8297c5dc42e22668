#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <string>
#include <tuple>

#include "simulated_night.hpp"

// Beside a tall peak smoothing digs a dip, and noise beyond it looks like a
// neighbour.

namespace loqsmith {
namespace {

using test::SimulatedNight;

class TallPeaks : public testing::TestWithParam<std::tuple<double, double>> {};

TEST_P(TallPeaks, HaveNoNeighboursMadeBySmoothing) {
  const auto [tau, ratio] = GetParam();
  SimulatedNight night(test::white_detector(), {5.0, 0.05, 0.15, tau},
                       "tall " + std::to_string(ratio));
  const double units = ratio / night.unit_height();
  const double clean = night.without_noise(units).area;
  double worst = 0.0;
  for (int i = 0; i < 150; ++i) {
    const Peak peak = night.measure(units);
    EXPECT_FALSE(test::has_reason(peak, "overlapped"));
    EXPECT_EQ(peak.overlap, "");
    worst = std::max(worst, std::abs(peak.area / clean - 1.0));
  }
  // 2.4 noise standard deviations in a hundred heights, and nothing else.
  EXPECT_LE(worst * ratio, 4.0);
}

INSTANTIATE_TEST_SUITE_P(
    Signal, TallPeaks,
    testing::Combine(testing::Values(0.0, 0.01, 0.03, 0.06),
                     testing::Values(1e3, 3e3, 1e4, 1e5, 1e6)));

class LowNeighbours : public testing::TestWithParam<double> {};

// Ten thousand times the noise beside thirty times it: a real neighbour rises
// in the signal itself.
TEST_P(LowNeighbours, StayNeighbours) {
  RandomStream stream("low neighbours");
  test::SimulatedTrace wanted = test::white_detector();
  const TargetSettings target = test::target_at(5.0);
  wanted.peaks = {{5.0, 0.05, 1000.0, 0.03}};
  const WindowTemplate window =
      *test::taught_by(test::simulate_trace(wanted, stream), target);
  wanted.peaks = {{5.0, 0.05, 1700.0, 0.03},
                  {5.0 + GetParam(), 0.05, 5.0, 0.0}};
  int seen = 0;
  for (int i = 0; i < 100; ++i) {
    const Trace trace = test::simulate_trace(wanted, stream);
    const auto noise = test::no_noise();
    const Peak peak = *measure_peak(trace, target, window, 5.0, noise, "");
    seen += test::has_reason(peak, "overlapped") ||
                    test::has_reason(peak, "baseline-shortened")
                ? 1
                : 0;
  }
  EXPECT_GE(seen, 97);
}

INSTANTIATE_TEST_SUITE_P(Signal, LowNeighbours, testing::Values(-0.25, 0.45));

}  // namespace
}  // namespace loqsmith
