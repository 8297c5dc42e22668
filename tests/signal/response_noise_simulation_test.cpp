#include <gtest/gtest.h>

#include <cmath>
#include <vector>

#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/signal/response_noise.hpp"
#include "signal_support.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::simulate_trace;
using test::SimulatedTrace;
using test::target_at;
using test::window_of;
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

// Noise of which there is as much at every pace, near enough 1/f: Markov noise
// of five memories from 1 to 500 points, on white. The model has one memory
// only and still weighs what a response gathers.
TEST(ResponseNoise, HoldsForFlickerNoise) {
  RandomStream stream("flicker");
  std::vector<double> areas;
  std::vector<double> predicted;
  for (int i = 0; i < 800; ++i) {
    Trace trace = simulate_trace(white_detector(), stream);
    for (const double creep : {0.3, 0.8, 0.95, 0.99, 0.998}) {
      SimulatedTrace part;
      part.end_minutes = white_detector().end_minutes;
      part.creeping_noise = 0.5;
      part.creep = creep;
      const Trace more = simulate_trace(part, stream);
      for (std::size_t k = 0; k < trace.signal.size(); ++k) {
        trace.signal[k] += more.signal[k];
      }
    }
    const auto noise = measure_noise(trace, 5.2, 0.1177, {});
    const auto peak =
        measure_peak(trace, target_at(5.2), kWindow, 5.2, noise, "own");
    ASSERT_TRUE(peak && peak->response_noise);
    areas.push_back(peak->area);
    predicted.push_back(*peak->response_noise);
  }
  const double ratio = mean(predicted) / standard_deviation(areas);
  RecordProperty("mean_over_empirical", std::to_string(ratio));
  EXPECT_GT(ratio, 0.90);
  EXPECT_LT(ratio, 1.10);
}

}  // namespace
}  // namespace loqsmith
