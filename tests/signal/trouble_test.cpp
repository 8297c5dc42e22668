#include <gtest/gtest.h>

#include <cmath>
#include <vector>

#include "loqsmith/signal/measure_peak.hpp"
#include "loqsmith/signal/trace_trouble.hpp"
#include "signal_support.hpp"
#include "support/tolerance.hpp"

// Each word for what is wrong with a trace or with a peak in it.

namespace loqsmith {
namespace {

using test::begins_with;
using test::gaussian_of_height;
using test::has_reason;
using test::simulate_trace;
using test::SimulatedTrace;
using test::target_at;
using test::window_of;

const WindowTemplate kWindow = window_of(0.19, 0.19, 0.1177);

SimulatedTrace sample(double height, double noise = 1.0) {
  SimulatedTrace wanted;
  wanted.white_noise = noise;
  if (height != 0.0) wanted.peaks = {gaussian_of_height(5.0, 0.05, height)};
  return wanted;
}

Outcome<Peak> measured(const Trace& trace,
                       const TargetSettings& target = target_at(5.0)) {
  const auto noise =
      measure_noise(simulate_trace(sample(0.0), "blank"), 5.0, 0.1177, {});
  return measure_peak(trace, target, kWindow, target.retention_minutes, noise,
                      "blank 1");
}

// The words this file is about, of which a clean trace has none.
const char* const kWords[] = {"saturated",     "spike",
                              "gap-in-time",   "negative-peak",
                              "flat-signal",   "window-cut-short",
                              "several-peaks", "few-points"};

TEST(Trouble, CleanTracesHaveNone) {
  for (const double height : {0.0, 5.0, 50.0, 5000.0}) {
    for (int i = 0; i < 25; ++i) {
      SimulatedTrace wanted = sample(height);
      wanted.drift_per_minute = 3.0;
      const auto peak =
          measured(simulate_trace(wanted, "clean " + std::to_string(i)));
      ASSERT_TRUE(peak);
      for (const char* word : kWords) {
        EXPECT_FALSE(has_reason(*peak, word)) << word << " " << height;
      }
    }
  }
}

TEST(Trouble, SpikesOfAnyHeightAreNeverAPeak) {
  for (const double height : {12.0, 60.0, 1e4}) {
    for (const std::size_t where : {490u, 500u, 507u}) {
      Trace trace = simulate_trace(sample(0.0), "spike");
      trace.signal[where] += height;
      const auto peak = measured(trace);
      ASSERT_TRUE(peak);
      EXPECT_FALSE(peak->found) << height;
      EXPECT_TRUE(has_reason(*peak, "spike")) << height;
    }
  }
}

TEST(Trouble, ASpikeOnAPeakDoesNotMoveIt) {
  Trace trace = simulate_trace(sample(100.0), "spike on a flank");
  trace.signal[506] += 200.0;
  const auto peak = measured(trace);
  ASSERT_TRUE(peak);
  EXPECT_TRUE(peak->found);
  EXPECT_TRUE(has_reason(*peak, "spike"));
  EXPECT_LT(std::abs(peak->retention_minutes - 5.0), 0.005);
}

TEST(Trouble, MissingPointsAreAGapInTime) {
  Trace trace = simulate_trace(sample(100.0), "gap");
  const auto cut = [&](std::size_t from, std::size_t count) {
    Trace less = trace;
    const auto first = static_cast<std::ptrdiff_t>(from);
    const auto last = static_cast<std::ptrdiff_t>(from + count);
    less.minutes.erase(less.minutes.begin() + first,
                       less.minutes.begin() + last);
    less.signal.erase(less.signal.begin() + first, less.signal.begin() + last);
    return measured(less);
  };
  EXPECT_TRUE(has_reason(*cut(505, 4), "gap-in-time"));  // on the peak
  EXPECT_TRUE(has_reason(*cut(478, 3), "gap-in-time"));  // in the baseline
  EXPECT_FALSE(has_reason(*cut(505, 1), "gap-in-time"));
  EXPECT_FALSE(has_reason(*cut(440, 4), "gap-in-time"));  // beyond both
}

TEST(Trouble, UnevenTimesAreNoGap) {
  SimulatedTrace wanted = sample(100.0);
  wanted.jitter = 0.45;
  EXPECT_FALSE(
      has_reason(*measured(simulate_trace(wanted, "uneven")), "gap-in-time"));
}

TEST(Trouble, ADipBelowTheBaselineIsANegativePeak) {
  const auto alone = measured(simulate_trace(sample(-20.0), "dip"));
  ASSERT_TRUE(alone);
  EXPECT_FALSE(alone->found);
  EXPECT_LT(alone->area, 0.0);
  EXPECT_TRUE(has_reason(*alone, "negative-peak"));
  SimulatedTrace beside = sample(100.0);
  beside.peaks.push_back(gaussian_of_height(5.14, 0.02, -40.0));
  const auto peak = measured(simulate_trace(beside, "dip beside"));
  ASSERT_TRUE(peak);
  EXPECT_TRUE(peak->found);
  EXPECT_TRUE(has_reason(*peak, "negative-peak"));
}

TEST(Trouble, APeakCutByAnEndOfTheTraceGivesNoNumber) {
  for (const double end : {5.05, 5.1, 5.185}) {
    SimulatedTrace wanted = sample(300.0);
    wanted.end_minutes = end;
    const auto peak = measured(simulate_trace(wanted, "cut"));
    ASSERT_FALSE(peak) << end;
    EXPECT_TRUE(begins_with(peak.reason(), "peak-cut")) << end;
  }
  SimulatedTrace late = sample(300.0);
  late.start_minutes = 4.9;
  const auto peak = measured(simulate_trace(late, "cut in front"));
  ASSERT_FALSE(peak);
  EXPECT_TRUE(begins_with(peak.reason(), "peak-cut"));
}

// Where the template's window around the expected time is there, but the peak
// stands nearer to the end than that.
TEST(Trouble, ALatePeakCutByTheEndIsNotMeasuredAsABlank) {
  SimulatedTrace wanted = sample(0.0);
  wanted.peaks = {gaussian_of_height(5.15, 0.05, 300.0)};
  wanted.end_minutes = 5.28;
  const auto peak = measured(simulate_trace(wanted, "late"));
  ASSERT_FALSE(peak);
  EXPECT_TRUE(begins_with(peak.reason(), "peak-cut"));
}

TEST(Trouble, AWindowThatTheTraceDoesNotHoldIsNotANegative) {
  SimulatedTrace wanted = sample(0.0);
  wanted.end_minutes = 5.4;
  const auto blank =
      measured(simulate_trace(wanted, "short"), target_at(5.0, 0.6));
  ASSERT_FALSE(blank);
  EXPECT_TRUE(begins_with(blank.reason(), "window-not-covered"));
  wanted.peaks = {gaussian_of_height(5.0, 0.05, 50.0)};
  const auto peak =
      measured(simulate_trace(wanted, "short"), target_at(5.0, 0.6));
  ASSERT_TRUE(peak);
  EXPECT_TRUE(peak->found);
  EXPECT_TRUE(has_reason(*peak, "window-cut-short"));
}

TEST(Trouble, ASignalThatNeverMovesIsSaid) {
  SimulatedTrace dead = sample(0.0, 0.0);
  dead.offset = 17.0;
  const auto peak = measured(simulate_trace(dead, "dead"));
  ASSERT_TRUE(peak);
  EXPECT_FALSE(peak->found);
  EXPECT_TRUE(has_reason(*peak, "flat-signal"));
}

// A detector that reports whole counts and nothing below them: one count up is
// rounding, three are a peak.
TEST(Trouble, WithoutNoiseTheThresholdComesFromTheRounding) {
  SimulatedTrace silent = sample(0.0, 0.0);
  const auto noise =
      measure_noise(simulate_trace(silent, "silent"), 5.0, 0.1177, {});
  const auto with_bump = [&](double counts) {
    Trace trace = simulate_trace(silent, "silent");
    for (std::size_t i = 496; i <= 504; ++i) trace.signal[i] = counts;
    // Elsewhere the detector shows what its step is.
    trace.signal[430] = trace.signal[431] = 1.0;
    return *measure_peak(trace, target_at(5.0), kWindow, 5.0, noise, "blank 1");
  };
  const Peak low = with_bump(1.0);
  EXPECT_FALSE(low.found);
  const Peak high = with_bump(3.0);
  EXPECT_TRUE(high.found);
  EXPECT_TRUE(has_reason(high, "noise-zero"));
  EXPECT_FALSE(high.signal_to_noise);
}

TEST(Trouble, SmallestStepIsTheDigitOfTheConverter) {
  const std::vector<double> digits = {0.5, 0.5, 1.25, 0.75, 0.75, 1.0};
  EXPECT_EQ(smallest_step(digits), 0.25);
  EXPECT_EQ(smallest_step(std::vector<double>(5, 2.0)), 0.0);
  EXPECT_EQ(smallest_step(std::vector<double>{}), 0.0);
}

}  // namespace
}  // namespace loqsmith
