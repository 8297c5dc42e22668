#include "loqsmith/signal/response_noise.hpp"

#include <gtest/gtest.h>

#include <vector>

#include "signal_support.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::begins_with;
using test::simulate_trace;
using test::SimulatedTrace;
using test::target_at;
using test::window_of;
using test::within_condition;

const WindowTemplate kWindow = window_of(0.18, 0.2, 0.1177);

SimulatedTrace white_detector() {
  SimulatedTrace detector;
  detector.end_minutes = 10.4;
  detector.offset = 30.0;
  detector.drift_per_minute = 2.0;
  detector.white_noise = 1.0;
  return detector;
}

NoiseEstimate known(const NoiseModel& whole) {
  NoiseEstimate noise;
  noise.model = whole;
  noise.whole = whole;
  return noise;
}

// 21 points less 21/20 of the sum of 20 others, independent noise of 1:
// sqrt(21 + 21^2/20) = 6.561249881 (propagation of variances).
TEST(ResponseNoise, OfASumLessItsBaseline) {
  std::vector<double> weights(20, -21.0 / 20.0);
  weights.insert(weights.end(), 21, 1.0);
  const auto noise =
      predict_response_noise(weights, white_noise(1.0), known(white_noise(1)));
  ASSERT_TRUE(noise);
  EXPECT_TRUE(test::agrees_to_digits(*noise, 6.561249881, 10));
}

TEST(ResponseNoise, IsRaisedInATraceThatIsClearlyNoisier) {
  const std::vector<double> one{1.0};
  const NoiseEstimate noise = known(white_noise(2.0));
  const auto in_noise_of = [&](double here) {
    return *predict_response_noise(one, white_noise(here), noise);
  };
  EXPECT_TRUE(within_condition(in_noise_of(1.0), 2.0, 4.0));
  EXPECT_TRUE(within_condition(in_noise_of(2.5), 2.0, 4.0));
  EXPECT_TRUE(within_condition(in_noise_of(5.0), 5.0, 8.0));
  const NoiseEstimate silent = known(white_noise(0.0));
  EXPECT_TRUE(within_condition(
      *predict_response_noise(one, white_noise(3.0), silent), 3.0, 4.0));
}

TEST(ResponseNoise, OfAShortTraceIsAbsentWithItsReason) {
  SimulatedTrace detector = white_detector();
  detector.start_minutes = 3.0;
  detector.end_minutes = 7.0;
  const Trace trace = simulate_trace(detector, "short");
  const auto noise = measure_noise(trace, 5.2, 0.1177, {});
  const auto peak =
      measure_peak(trace, target_at(5.2), kWindow, 5.2, noise, "own");
  ASSERT_TRUE(peak);
  EXPECT_FALSE(peak->response_noise);
  EXPECT_TRUE(begins_with(peak->response_noise_absent, "noise-trace-short"));
  EXPECT_TRUE(peak->reasons.empty());
}

}  // namespace
}  // namespace loqsmith
