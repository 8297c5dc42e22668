#include "loqsmith/signal/response_noise.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <vector>

#include "loqsmith/numerics/mean.hpp"
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
using Response = IntegrationSettings::Response;

const WindowTemplate kWindow = window_of(0.18, 0.2, 0.1177);

SimulatedTrace white_detector() {
  SimulatedTrace detector;
  detector.end_minutes = 10.4;
  detector.offset = 30.0;
  detector.drift_per_minute = 2.0;
  detector.white_noise = 1.0;
  return detector;
}

SimulatedTrace creeping_detector() {
  SimulatedTrace detector = white_detector();
  detector.white_noise = 0.5;
  detector.creeping_noise = 0.87;
  detector.creep = 0.8;
  return detector;
}

struct Case {
  const char* name;
  SimulatedTrace detector;
  Response response;
};

class Blanks : public testing::TestWithParam<Case> {};

// Each blank predicts its own spread; what 2000 of them scatter is the truth,
// itself known to 1.6 %.
TEST_P(Blanks, PredictTheirOwnSpread) {
  TargetSettings target = target_at(5.2);
  target.integration.response = GetParam().response;
  RandomStream stream(GetParam().name);
  std::vector<double> responses;
  std::vector<double> predicted;
  for (int i = 0; i < 2000; ++i) {
    const Trace trace = simulate_trace(GetParam().detector, stream);
    const auto noise = measure_noise(trace, 5.2, 0.1177, target.noise);
    const auto peak = measure_peak(trace, target, kWindow, 5.2, noise, "own");
    ASSERT_TRUE(peak && peak->response_noise);
    responses.push_back(GetParam().response == Response::Height ? peak->height
                                                                : peak->area);
    predicted.push_back(*peak->response_noise);
  }
  const double seen = standard_deviation(responses);
  const double ratio = mean(predicted) / seen;
  int close = 0;
  for (const double one : predicted) {
    close += one >= 0.8 * seen && one <= 1.2 * seen ? 1 : 0;
  }
  RecordProperty("mean_over_empirical", std::to_string(ratio));
  RecordProperty("within_20_percent", close);
  EXPECT_GT(ratio, 0.90);
  EXPECT_LT(ratio, 1.10);
  EXPECT_GE(close, 1800);
}

INSTANTIATE_TEST_SUITE_P(
    ResponseNoise, Blanks,
    testing::Values(Case{"WhiteArea", white_detector(), Response::Area},
                    Case{"CreepingArea", creeping_detector(), Response::Area},
                    Case{"CreepingHeight", creeping_detector(),
                         Response::Height}),
    [](const auto& one) { return std::string(one.param.name); });

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
