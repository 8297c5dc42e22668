#include "loqsmith/signal/measure_peak.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <vector>

#include "curve_support.hpp"
#include "one_peak.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;
using test::begins_with;
using test::blank_noise;
using test::gaussian_of_height;
using test::has_reason;
using test::kWindow;
using test::measured;
using test::no_noise;
using test::sample;
using test::simulate_trace;
using test::SimulatedTrace;
using test::target_at;
using test::window_of;
using test::within_condition;

TEST(MeasurePeak, FindsAndMeasuresAPeak) {
  const auto peak = measured(sample(400.0), "peak");
  ASSERT_TRUE(peak);
  EXPECT_TRUE(peak->found);
  EXPECT_TRUE(agrees_to_digits(peak->retention_minutes, 5.0, 3));
  EXPECT_TRUE(agrees_to_digits(peak->area, 50.13, 2));
  EXPECT_TRUE(peak->width_half_minutes && peak->plates && peak->tailing);
  EXPECT_EQ(peak->noise_source, "blank 2");
  EXPECT_EQ(peak->overlap, "");
  ASSERT_TRUE(peak->signal_to_noise && peak->noise);
  EXPECT_TRUE(within_condition(*peak->signal_to_noise,
                               2.0 * peak->height / *peak->noise, 4.0));
  EXPECT_TRUE(peak->reasons.empty());
}

TEST(MeasurePeak, ABlankIsMeasuredAtTheExpectedTime) {
  const auto peak = measured(sample(0.0), "blank");
  ASSERT_TRUE(peak);
  EXPECT_FALSE(peak->found);
  EXPECT_EQ(peak->retention_minutes, 5.0);
  EXPECT_TRUE(within_condition(peak->start_minutes, 4.81, 4.0));
  EXPECT_TRUE(within_condition(peak->end_minutes, 5.19, 4.0));
  EXPECT_FALSE(peak->width_half_minutes);
  EXPECT_FALSE(peak->signal_to_noise);
  EXPECT_TRUE(peak->response_noise);
}

TEST(MeasurePeak, TheWindowIsAsLongForEveryHeight) {
  for (const double height : {0.0, 2.0, 4.0, 30.0, 1000.0}) {
    const auto peak = measured(sample(height), "any height");
    ASSERT_TRUE(peak);
    EXPECT_TRUE(
        within_condition(peak->end_minutes - peak->start_minutes, 0.38, 40.0));
    EXPECT_TRUE(within_condition(peak->retention_minutes - peak->start_minutes,
                                 0.19, 100.0));
  }
}

TEST(MeasurePeak, OfTwoTheNearestIsTakenWithAReason) {
  SimulatedTrace wanted = sample(40.0);
  wanted.peaks.push_back(gaussian_of_height(5.5, 0.05, 400.0));
  const auto peak =
      measured(simulate_trace(wanted, "two"), target_at(5.05, 0.6));
  ASSERT_TRUE(peak);
  EXPECT_TRUE(has_reason(*peak, "several-peaks"));
  EXPECT_LT(std::abs(peak->retention_minutes - 5.0), 0.02);
}

TEST(MeasurePeak, ASpikeIsNoPeakButIsSaid) {
  Trace trace = simulate_trace(sample(0.0), "spike");
  trace.signal[500] += 60.0;
  const auto peak = measured(trace);
  ASSERT_TRUE(peak);
  EXPECT_FALSE(peak->found);
  EXPECT_TRUE(has_reason(*peak, "spike"));
}

TEST(MeasurePeak, AFlatTopIsSaturated) {
  SimulatedTrace wanted = sample(300.0);
  wanted.ceiling = 240.0;
  const auto peak = measured(wanted, "clipped");
  ASSERT_TRUE(peak);
  EXPECT_TRUE(peak->found);
  EXPECT_TRUE(has_reason(*peak, "saturated"));
  EXPECT_FALSE(has_reason(*measured(sample(300.0), "whole"), "saturated"));
}

TEST(MeasurePeak, FewPointsAreSaidAndTooFewGiveNoNumber) {
  SimulatedTrace wanted = sample(300.0);
  wanted.step_minutes = 0.05;  // 7 or 8 points in 0.38 minutes
  const auto few = measured(wanted, "few");
  ASSERT_TRUE(few);
  EXPECT_TRUE(few->found);
  EXPECT_TRUE(has_reason(*few, "few-points"));
  wanted.step_minutes = 0.1;
  const auto too_few = measured(wanted, "too few");
  ASSERT_FALSE(too_few);
  EXPECT_TRUE(begins_with(too_few.reason(), "too-few-points"));
}

TEST(MeasurePeak, AWindowThatTheTraceDoesNotCover) {
  for (const double end : {4.0, 4.9}) {
    SimulatedTrace wanted = sample(300.0);
    wanted.end_minutes = end;
    const auto peak = measured(wanted, "cut short");
    ASSERT_FALSE(peak) << end;
    EXPECT_TRUE(begins_with(peak.reason(), "window-not-covered"));
  }
  SimulatedTrace late = sample(300.0);
  late.start_minutes = 4.9;
  ASSERT_FALSE(measured(late, "late"));
}

TEST(MeasurePeak, ATraceThatEndsSoonAfterTheWindowShortensTheBaseline) {
  SimulatedTrace wanted = sample(300.0);
  wanted.end_minutes = 5.22;
  const auto peak = measured(wanted, "nearly cut");
  ASSERT_TRUE(peak);
  EXPECT_TRUE(has_reason(*peak, "baseline-shortened"));
}

TEST(MeasurePeak, NoSignal) {
  const auto peak = measured(Trace{});
  ASSERT_FALSE(peak);
  EXPECT_TRUE(begins_with(peak.reason(), "no-signal"));
}

TEST(MeasurePeak, NarrowThingsAreNoPeaksWhereAWidthIsAskedFor) {
  TargetSettings target = target_at(5.0);
  target.integration.minimum_width_minutes = 0.1;
  const Trace trace = simulate_trace(sample(100.0), "width");
  EXPECT_TRUE(measured(trace, target)->found);
  target.integration.minimum_width_minutes = 0.15;
  EXPECT_FALSE(measured(trace, target)->found);
}

TEST(MeasurePeak, TheThresholdDecidesWhatIsFound) {
  TargetSettings target = target_at(5.0);
  // Height 5 of noise 1 is some 9 deviations of the smoothed height.
  const Trace trace = simulate_trace(sample(5.0), "threshold");
  EXPECT_TRUE(measured(trace, target)->found);
  target.integration.threshold = 30.0;
  EXPECT_FALSE(measured(trace, target)->found);
}

TEST(MeasurePeak, NoiseReasonsAndWeakTemplatesArePassedOn) {
  WindowTemplate weak = kWindow;
  weak.weak = true;
  Outcome<NoiseEstimate> noise = blank_noise();
  noise.value().reasons = {"noise-from-same-trace", "noise-stretch-short"};
  const auto peak =
      measure_peak(simulate_trace(sample(300.0), "weak"), target_at(5.0), weak,
                   5.0, noise, "same trace");
  ASSERT_TRUE(peak);
  EXPECT_TRUE(has_reason(*peak, "weak-template"));
  EXPECT_TRUE(has_reason(*peak, "noise-from-same-trace"));
  EXPECT_TRUE(has_reason(*peak, "noise-stretch-short"));
}

TEST(MeasurePeak, WithoutNoiseThereIsNoRatio) {
  const auto peak = measure_peak(simulate_trace(sample(300.0), "no noise"),
                                 target_at(5.0), kWindow, 5.0, no_noise(), "");
  ASSERT_TRUE(peak);
  EXPECT_TRUE(peak->found);
  EXPECT_TRUE(has_reason(*peak, "no-noise"));
  EXPECT_FALSE(peak->signal_to_noise);
  EXPECT_FALSE(peak->noise);
  EXPECT_EQ(peak->noise_source, "");
}

TEST(MeasurePeak, ZeroNoiseIsLegal) {
  const auto noise =
      measure_noise(simulate_trace(sample(0.0, 0.0), "silent"), 5.0, 0.1, {});
  const auto blank =
      measure_peak(simulate_trace(sample(0.0, 0.0), "silent"), target_at(5.0),
                   kWindow, 5.0, noise, "blank 1");
  ASSERT_TRUE(blank);
  EXPECT_FALSE(blank->found);
  EXPECT_EQ(blank->area, 0.0);
  const auto peak =
      measure_peak(simulate_trace(sample(3.0, 0.0), "silent"), target_at(5.0),
                   kWindow, 5.0, noise, "blank 1");
  ASSERT_TRUE(peak);
  EXPECT_TRUE(peak->found);
  EXPECT_TRUE(has_reason(*peak, "noise-zero"));
  EXPECT_FALSE(peak->signal_to_noise);
}

TEST(MeasurePeak, CurveShowsTheStretchAndItsBaseline) {
  SimulatedTrace wanted = sample(300.0, 0.0);
  wanted.offset = 20.0;
  wanted.drift_per_minute = 4.0;
  const Trace trace = simulate_trace(wanted, "curve");
  const WindowTemplate wide = window_of(0.3, 0.3, 0.1177);
  const auto peak = measured(trace, target_at(5.0), wide);
  ASSERT_TRUE(peak);
  const PeakCurve curve =
      test::curve_of(trace, target_at(5.0), wide, 5.0, test::blank_noise());
  EXPECT_EQ(curve.minutes.size(), curve.signal.size());
  ASSERT_EQ(curve.minutes.size(), curve.smoothed.size());
  // Smoothed over its width a peak loses some of its height, never all.
  EXPECT_GT(*std::max_element(curve.smoothed.begin(), curve.smoothed.end()),
            0.9 * 320.0);
  EXPECT_NE(curve.smoothed, curve.signal);
  EXPECT_LT(curve.minutes.front(), peak->start_minutes - 4.0 * 0.1177 + 0.01);
  EXPECT_GT(curve.minutes.back(), peak->end_minutes + 4.0 * 0.1177 - 0.01);
  EXPECT_TRUE(agrees_to_digits(curve.baseline_start,
                               20.0 + 4.0 * (peak->start_minutes - 5.0), 3));
  EXPECT_TRUE(agrees_to_digits(curve.baseline_end,
                               20.0 + 4.0 * (peak->end_minutes - 5.0), 3));
}

}  // namespace
}  // namespace loqsmith
