#include "loqsmith/signal/moving_parabola.hpp"

#include <gtest/gtest.h>

#include <vector>

#include "loqsmith/signal/savitzky_golay.hpp"
#include "support/simulator.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::within_condition;

class Lengths : public testing::TestWithParam<int> {};

// The slow twin: the weights, place by place.
TEST_P(Lengths, MovingSumsEqualTheWeights) {
  test::SimulatedTrace wanted;
  wanted.end_minutes = 4.0;
  wanted.offset = 1000.0;
  wanted.drift_per_minute = 20.0;
  wanted.white_noise = 1.0;
  wanted.peaks = {test::gaussian_of_height(2.0, 0.05, 300.0)};
  const Trace trace = simulate_trace(wanted, "moving sums");
  const int points = GetParam();
  const auto fast = smooth_value_and_slope(trace.minutes, trace.signal, points,
                                           2, evenly_spaced(trace.minutes));
  const auto value = savitzky_golay(trace.minutes, trace.signal, points, 2, 0);
  const auto slope = savitzky_golay(trace.minutes, trace.signal, points, 2, 1);
  ASSERT_EQ(fast.value.size(), value.size());
  for (std::size_t i = 0; i < value.size(); ++i) {
    EXPECT_TRUE(within_condition(fast.value[i], value[i], 40.0)) << i;
    // A slope is a difference of signals of 1300 over steps of 0.01 minutes.
    EXPECT_TRUE(within_condition(fast.slope[i], slope[i], 20.0, 1.3e5)) << i;
  }
}

INSTANTIATE_TEST_SUITE_P(MovingParabola, Lengths,
                         testing::Values(3, 5, 13, 61, 201, 399, 401));

TEST(MovingParabola, APlateauHasNoSlopeAtAll) {
  std::vector<double> minutes;
  for (int i = 0; i < 100; ++i) minutes.push_back(0.01 * i);
  const std::vector<double> level(100, 0.1);
  const auto fast = smooth_value_and_slope(minutes, level, 11, 2, true);
  for (std::size_t i = 5; i < 95; ++i) {
    EXPECT_EQ(fast.slope[i], 0.0);
    EXPECT_EQ(fast.value[i], 0.1);
  }
}

TEST(MovingParabola, UnevenTimesAndOtherOrdersTakeTheWeights) {
  test::SimulatedTrace wanted;
  wanted.end_minutes = 1.0;
  wanted.white_noise = 1.0;
  wanted.jitter = 0.3;
  const Trace trace = simulate_trace(wanted, "uneven");
  for (const int order : {2, 4}) {
    const auto fast = smooth_value_and_slope(
        trace.minutes, trace.signal, 9, order, evenly_spaced(trace.minutes));
    EXPECT_EQ(fast.value,
              savitzky_golay(trace.minutes, trace.signal, 9, order, 0));
    EXPECT_EQ(fast.slope,
              savitzky_golay(trace.minutes, trace.signal, 9, order, 1));
  }
}

}  // namespace
}  // namespace loqsmith
