#include <gtest/gtest.h>

#include <cmath>
#include <vector>

#include "loqsmith/numerics/mean.hpp"
#include "curve_support.hpp"
#include "signal_support.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::gaussian_of_height;
using test::same_bits;
using test::simulate_trace;
using test::SimulatedTrace;
using test::target_at;
using test::window_of;
using test::within_condition;
using test::within_sampling_error;

const WindowTemplate kWindow = window_of(0.19, 0.19, 0.1177);

// Times on a grid of 1/128 minute, so that a shift by whole minutes is exact.
SimulatedTrace on_grid(double height) {
  SimulatedTrace wanted;
  wanted.step_minutes = 1.0 / 128.0;
  wanted.white_noise = 1.0;
  wanted.peaks = {gaussian_of_height(5.0, 0.05, height)};
  return wanted;
}

Outcome<Peak> measured_at(const Trace& trace, double expected) {
  const auto noise = measure_noise_beside(
      trace, expected - kWindow.left_minutes, expected + kWindow.right_minutes,
      kWindow.width_half_minutes, {});
  return measure_peak(trace, target_at(expected), kWindow, expected, noise,
                      "same trace");
}

class Heights : public testing::TestWithParam<double> {};

TEST_P(Heights, ScaledSignalGivesScaledNumbersToTheBit) {
  Trace trace = simulate_trace(on_grid(GetParam()), "scale");
  const auto one = measured_at(trace, 5.0);
  for (double& y : trace.signal) y *= 4.0;
  const auto four = measured_at(trace, 5.0);
  ASSERT_TRUE(one && four);
  EXPECT_EQ(one->found, four->found);
  EXPECT_EQ(one->reasons, four->reasons);
  EXPECT_TRUE(same_bits(four->retention_minutes, one->retention_minutes));
  EXPECT_TRUE(same_bits(four->area, 4.0 * one->area));
  EXPECT_TRUE(same_bits(four->height, 4.0 * one->height));
}

TEST_P(Heights, ShiftedTimesGiveTheSameArea) {
  Trace trace = simulate_trace(on_grid(GetParam()), "shift");
  const auto here = measured_at(trace, 5.0);
  for (double& t : trace.minutes) t += 32.0;
  const auto there = measured_at(trace, 37.0);
  ASSERT_TRUE(here && there);
  EXPECT_EQ(here->found, there->found);
  const double area = 0.125 * (8.0 + GetParam());
  // Times near 40 are known to 7e-15 minutes, a step is 0.0078.
  EXPECT_TRUE(within_condition(there->area, here->area, 1e5, area));
  EXPECT_TRUE(within_condition(there->retention_minutes,
                               here->retention_minutes + 32.0, 100.0));
}

TEST_P(Heights, AnAddedConstantChangesNothing) {
  Trace trace = simulate_trace(on_grid(GetParam()), "constant");
  const auto low = measured_at(trace, 5.0);
  for (double& y : trace.signal) y += 1024.0;
  const auto high = measured_at(trace, 5.0);
  ASSERT_TRUE(low && high);
  EXPECT_EQ(low->found, high->found);
  EXPECT_EQ(low->reasons, high->reasons);
  // Rounding of signals of 1024 over a window of 0.38 minutes; an apex found a
  // hair elsewhere multiplies it.
  EXPECT_TRUE(within_condition(high->area, low->area, 1000.0, 400.0));
}

INSTANTIATE_TEST_SUITE_P(MeasureProperty, Heights,
                         testing::Values(0.0, 3.0, 12.0, 400.0));

// What a night does: a standard teaches the window, blanks and samples are
// measured over it, the noise of each comes from another blank.
class Simulation {
 public:
  explicit Simulation(const SimulatedTrace& detector, const std::string& name)
      : detector_(detector), target_(target_at(5.0)), stream_(name) {
    const auto window = test::taught_by(trace_of_height(600.0), target_);
    window_ = *window;
    SimulatedTrace clean = detector_;
    clean.white_noise = 0.0;
    clean.creeping_noise = 0.0;
    clean.peaks = {gaussian_of_height(5.0, 0.05, 1.0)};
    unit_area_ = measure_peak(simulate_trace(clean, "unit"), target_, window_,
                              5.0, test::no_noise(), "")
                     ->area;
  }

  // Area of a peak of this height (0: a blank).
  Peak measure(double height) {
    const auto noise = measure_noise(trace_of_height(0.0), 5.0,
                                     window_.width_half_minutes, target_.noise);
    return *measure_peak(trace_of_height(height), target_, window_, 5.0, noise,
                         "blank 1");
  }

  std::vector<double> areas(double height, int count) {
    std::vector<double> found;
    for (int i = 0; i < count; ++i) found.push_back(measure(height).area);
    return found;
  }

  double unit_area() const { return unit_area_; }
  const WindowTemplate& window() const { return window_; }

 private:
  Trace trace_of_height(double height) {
    SimulatedTrace wanted = detector_;
    wanted.peaks.clear();
    if (height > 0.0) wanted.peaks = {gaussian_of_height(5.0, 0.05, height)};
    return simulate_trace(wanted, stream_);
  }

  SimulatedTrace detector_;
  TargetSettings target_;
  RandomStream stream_;
  WindowTemplate window_;
  double unit_area_ = 0.0;
};

SimulatedTrace white_detector() {
  SimulatedTrace detector;
  detector.end_minutes = 10.4;  // 88 widths at half height
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

class Detectors : public testing::TestWithParam<SimulatedTrace> {};

TEST_P(Detectors, BlanksLieAroundZeroAsPredictedAndShowNoPeaks) {
  Simulation night(GetParam(), "blanks");
  std::vector<double> areas;
  std::vector<double> predicted;
  int found = 0;
  for (int i = 0; i < 500; ++i) {
    const Peak peak = night.measure(0.0);
    areas.push_back(peak.area);
    predicted.push_back(*peak.response_noise);
    found += peak.found ? 1 : 0;
  }
  const double seen = standard_deviation(areas);
  EXPECT_TRUE(within_sampling_error(mean(areas), seen, areas.size(), 0.0));
  // A standard deviation from 500 values has itself one of s / sqrt(2 x 500).
  EXPECT_TRUE(within_sampling_error(mean(predicted), seen / std::sqrt(2.0),
                                    areas.size(), seen));
  EXPECT_LE(found, 7);  // 1.5 %
}

// The blanks' standard deviation taken from 500 blanks is itself known to 3 %;
// three times that, and the spread of the samples, is the simulation's error.
TEST_P(Detectors, ASampleAtThreeBlankDeviationsComesOutAtThree) {
  Simulation night(GetParam(), "low samples");
  const double blank = standard_deviation(night.areas(0.0, 500));
  const double height = 3.0 * blank / night.unit_area();
  std::vector<double> multiples;
  for (const double area : night.areas(height, 500)) {
    multiples.push_back(area / blank);
  }
  EXPECT_TRUE(within_sampling_error(
      mean(multiples), standard_deviation(multiples), multiples.size(), 3.0));
}

INSTANTIATE_TEST_SUITE_P(MeasureProperty, Detectors,
                         testing::Values(white_detector(),
                                         creeping_detector()));

// Odd traces: whatever comes, an answer with finite numbers or a reason.
TEST(MeasureProperty, AnyTraceGivesFiniteNumbersOrAReason) {
  RandomStream stream("odd traces");
  for (int i = 0; i < 1000; ++i) {
    Trace trace;
    const int points = static_cast<int>(stream.uniform() * 60.0);
    double t = 4.0 + stream.uniform();
    for (int k = 0; k < points; ++k) {
      t += stream.uniform() < 0.1 ? 0.3 * stream.uniform() : 0.02;
      trace.minutes.push_back(t);
      trace.signal.push_back(stream.uniform() < 0.2
                                 ? std::round(9.0 * stream.normal())
                                 : std::exp(3.0 * stream.normal()));
    }
    const auto seen = observe_teacher(trace, target_at(5.0), 1, Role::Standard);
    if (seen) {
      EXPECT_TRUE(std::isfinite(seen->height_over_noise));
      EXPECT_GT(seen->left_minutes, 0.0);
      EXPECT_GT(seen->right_minutes, 0.0);
      EXPECT_GT(seen->width_half_minutes, 0.0);
    }
    const auto peak = measured_at(trace, 5.0);
    if (peak) {
      EXPECT_TRUE(std::isfinite(peak->area) && std::isfinite(peak->height));
      EXPECT_TRUE(std::isfinite(peak->retention_minutes));
      EXPECT_LT(peak->start_minutes, peak->end_minutes);
      test::curve_of(trace, target_at(5.0), kWindow, 5.0, test::no_noise());
    } else {
      EXPECT_FALSE(peak.reason().empty());
    }
  }
}

}  // namespace
}  // namespace loqsmith
