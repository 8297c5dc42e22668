#include "loqsmith/signal/trace_noise.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <vector>

#include "loqsmith/numerics/mean.hpp"
#include "signal_support.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::begins_with;
using test::gaussian_of_height;
using test::simulate_trace;
using test::SimulatedTrace;
using test::within_condition;
using test::within_sampling_error;

constexpr double kWidth = 0.1;

SimulatedTrace white() {
  SimulatedTrace wanted;
  wanted.white_noise = 2.0;
  return wanted;
}

SimulatedTrace creeping() {
  SimulatedTrace wanted = white();
  wanted.white_noise = 1.0;
  wanted.creeping_noise = 2.0;
  wanted.creep = 0.8;
  return wanted;
}

Outcome<NoiseModel> model_of(const Trace& trace) {
  return whole_trace_noise(peak_free_trace(trace, 5.0, 5.0, kWidth), kWidth);
}

// Standard deviation of the mean of 20 points: what a response gathers.
double of_a_mean(const NoiseModel& noise) {
  return weighted_noise(std::vector<double>(20, 0.05), noise);
}

struct Found {
  std::vector<double> variance;
  std::vector<double> of_mean;
  int white = 0;
};

Found found_in(const SimulatedTrace& wanted, int traces) {
  Found found;
  for (int i = 0; i < traces; ++i) {
    const auto model =
        model_of(simulate_trace(wanted, "trace " + std::to_string(i)));
    if (!model) continue;
    found.variance.push_back(model->variance());
    found.of_mean.push_back(of_a_mean(*model));
    found.white += model->creeping_variance == 0.0 ? 1 : 0;
  }
  return found;
}

TEST(TraceNoise, ParabolasAreTakenOffExactly) {
  Trace trace;
  for (int i = 0; i < 1024; ++i) {
    const double t = i / 128.0;
    trace.minutes.push_back(t);
    trace.signal.push_back(40.0 + 8.0 * t + 0.25 * t * t);
  }
  const PeakFreeTrace free = peak_free_trace(trace, 5.0, 5.0, kWidth);
  for (const double r : free.residuals.values) EXPECT_LT(std::abs(r), 1e-10);
}

TEST(TraceNoise, WhiteNoiseIsFoundWhite) {
  const Found found = found_in(white(), 200);
  ASSERT_EQ(found.variance.size(), 200U);
  EXPECT_TRUE(within_sampling_error(mean(found.variance),
                                    standard_deviation(found.variance), 200,
                                    4.0 * 0.993));  // the cut at 3.5
  EXPECT_GE(found.white, 186);  // 5 % of 200 and two deviations more
}

TEST(TraceNoise, CreepingNoiseIsFound) {
  const Found found = found_in(creeping(), 200);
  ASSERT_EQ(found.variance.size(), 200U);
  const NoiseModel truth{1.0, 4.0, 0.8};
  EXPECT_EQ(found.white, 0);
  EXPECT_GT(mean(found.of_mean), 0.97 * of_a_mean(truth));
  EXPECT_LT(mean(found.of_mean), 1.03 * of_a_mean(truth));
  int close = 0;
  for (const double one : found.of_mean) {
    close += std::abs(one - of_a_mean(truth)) < 0.2 * of_a_mean(truth) ? 1 : 0;
  }
  EXPECT_GE(close, 180);
}

// The same noise on a bent and drifting baseline with peaks on it: what was
// found without them is found again, to a few percent.
TEST(TraceNoise, BaselineAndPeaksHardlyEnter) {
  SimulatedTrace wanted = creeping();
  wanted.end_minutes = 12.0;
  const Found bare = found_in(wanted, 60);
  wanted.drift_per_minute = 6.0;
  wanted.bend_per_minute2 = 2.0;
  wanted.peaks = {gaussian_of_height(1.1, 0.04, 4000.0),
                  gaussian_of_height(3.2, 0.045, 60.0),
                  {5.0, 0.04, 30.0, 0.15},
                  gaussian_of_height(8.6, 0.04, 20.0)};
  const Found crowded = found_in(wanted, 60);
  ASSERT_EQ(crowded.of_mean.size(), 60U);
  EXPECT_GT(mean(crowded.of_mean), 0.95 * mean(bare.of_mean));
  EXPECT_LT(mean(crowded.of_mean), 1.05 * mean(bare.of_mean));
}

TEST(TraceNoise, ShorterThanEightyWidthsIsSaid) {
  SimulatedTrace wanted = white();
  wanted.end_minutes = 8.2;
  EXPECT_TRUE(model_of(simulate_trace(wanted, "82 widths")));
  wanted.end_minutes = 7.9;
  const auto model = model_of(simulate_trace(wanted, "79 widths"));
  ASSERT_FALSE(model);
  EXPECT_TRUE(begins_with(model.reason(), "noise-trace-short: 7"));
  EXPECT_FALSE(model_of(Trace{}));
  // Long enough, but for what its peaks take.
  wanted.end_minutes = 8.2;
  wanted.peaks = {gaussian_of_height(4.0, 0.04, 500.0)};
  EXPECT_FALSE(model_of(simulate_trace(wanted, "82 widths with a peak")));
}

TEST(TraceNoise, AThresholdedTraceHasNone) {
  const auto model = model_of(simulate_trace({}, "flat"));
  ASSERT_TRUE(model);
  EXPECT_EQ(model->variance(), 0.0);
}

TEST(TraceNoise, ScaledSignalGivesTheScaledModel) {
  Trace trace = simulate_trace(creeping(), "scaled");
  const auto one = model_of(trace);
  for (double& y : trace.signal) y *= 4.0;
  const auto four = model_of(trace);
  ASSERT_TRUE(one && four);
  EXPECT_EQ(four->correlation, one->correlation);
  EXPECT_TRUE(within_condition(four->variance(), 16.0 * one->variance(), 10));
}

}  // namespace
}  // namespace loqsmith
