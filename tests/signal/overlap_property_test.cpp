#include <gtest/gtest.h>

#include <cmath>
#include <string>

#include "overlap_support.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::has_reason;
using test::noise_of_blank;
using test::Pair;
using test::simulate_trace;
using test::SimulatedPeak;
using test::SimulatedTrace;
using test::target_with;
using test::taught_alone;
using Overlap = IntegrationSettings::Overlap;

// A crowd of up to six peaks of any shape and height around the target, with
// or without noise, clipped or not.
SimulatedTrace crowd(RandomStream& stream) {
  SimulatedTrace wanted;
  wanted.start_minutes = 3.0;
  wanted.end_minutes = 3.0 + 2.2 + 3.0 * stream.uniform();
  wanted.step_minutes = 0.004 + 0.02 * stream.uniform();
  wanted.offset = 100.0 * stream.normal();
  wanted.drift_per_minute = 10.0 * stream.normal();
  wanted.white_noise = stream.uniform() < 0.2 ? 0.0 : 1.0;
  const int peaks = static_cast<int>(7.0 * stream.uniform());
  for (int k = 0; k < peaks; ++k) {
    SimulatedPeak peak;
    peak.minutes = 5.0 + 0.4 * (stream.uniform() - 0.5);
    peak.sigma = 0.02 + 0.1 * stream.uniform();
    peak.tau = 0.2 * (stream.uniform() - 0.3);
    peak.area = std::pow(10.0, 5.0 * stream.uniform() - 1.0);
    wanted.peaks.push_back(peak);
  }
  if (stream.uniform() < 0.2) wanted.ceiling = wanted.offset + 300.0;
  return wanted;
}

void expect_numbers(const Peak& peak, const std::string& which) {
  const auto is_number = [&](const std::optional<double>& value) {
    return !value || std::isfinite(*value);
  };
  EXPECT_TRUE(std::isfinite(peak.area)) << which;
  EXPECT_TRUE(std::isfinite(peak.height)) << which;
  EXPECT_TRUE(std::isfinite(peak.retention_minutes)) << which;
  EXPECT_LT(peak.start_minutes, peak.end_minutes) << which;
  EXPECT_TRUE(is_number(peak.response_noise)) << which;
  EXPECT_TRUE(is_number(peak.width_half_minutes)) << which;
  EXPECT_TRUE(is_number(peak.tailing)) << which;
  EXPECT_TRUE(is_number(peak.asymmetry)) << which;
  EXPECT_TRUE(is_number(peak.plates)) << which;
}

TEST(OverlapProperty, WhateverStandsThereNumbersComeOutOrReasons) {
  const Pair pair;
  const WindowTemplate window = taught_alone(pair, Overlap::Model);
  const auto noise = noise_of_blank(pair, window.width_half_minutes);
  RandomStream stream("crowds");
  int modelled = 0;
  int failed = 0;
  int skimmed = 0;
  for (int i = 0; i < 400; ++i) {
    const Trace trace = simulate_trace(crowd(stream), stream);
    for (const Overlap overlap : {Overlap::Skim, Overlap::Model}) {
      const auto peak = measure_peak(trace, target_with(overlap, 5.0), window,
                                     5.0, noise, "blank 1");
      if (!peak) {
        EXPECT_FALSE(peak.reason().empty());
        continue;
      }
      expect_numbers(*peak, "crowd " + std::to_string(i));
      if (peak->overlap == "model") ++modelled;
      if (peak->overlap == "skim") ++skimmed;
      if (has_reason(*peak, "model-not-converged")) {
        ++failed;
        EXPECT_EQ(peak->overlap, "drop");
      }
    }
  }
  // All three ways were gone.
  EXPECT_GT(modelled, 20);
  EXPECT_GT(failed, 5);
  EXPECT_GT(skimmed, 5);
}

TEST(OverlapProperty, ScaleAndShiftGoThroughTheModel) {
  Pair pair;
  pair.resolution = 0.8;
  const WindowTemplate window = taught_alone(pair, Overlap::Model);
  const auto noise = noise_of_blank(pair, window.width_half_minutes);
  const Trace trace = simulate_trace(trace_of(pair), "pair");
  const auto measured = [&](const Trace& one) {
    return measure_peak(one, target_with(Overlap::Model, 5.0), window, 5.0,
                        noise, "blank 1");
  };
  Trace changed = trace;
  // The fit stops at 1e-10 of its parameters' size.
  for (double& signal : changed.signal) signal = 64.0 * signal;
  const auto before = measured(trace);
  const auto after = measured(changed);
  ASSERT_TRUE(before && after);
  EXPECT_EQ(after->overlap, "model");
  EXPECT_TRUE(test::agrees_to_digits(after->area, 64.0 * before->area, 6));
  for (double& signal : changed.signal) signal = signal / 64.0 + 5000.0;
  const auto raised = measured(changed);
  ASSERT_TRUE(raised);
  EXPECT_TRUE(test::agrees_to_digits(raised->area, before->area, 6));
}

}  // namespace
}  // namespace loqsmith
