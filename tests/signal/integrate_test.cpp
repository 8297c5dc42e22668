#include "loqsmith/signal/integrate.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <vector>

#include "loqsmith/numerics/random.hpp"
#include "signal_support.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;
using test::gaussian_of_height;
using test::no_noise;
using test::simulate_trace;
using test::SimulatedTrace;
using test::target_at;
using test::window_of;
using test::within_condition;

SimulatedTrace one_gaussian() {
  SimulatedTrace wanted;
  wanted.peaks = {gaussian_of_height(5.0, 0.05, 100.0)};
  return wanted;
}

double area_of(const Trace& trace, const WindowTemplate& window,
               double expected) {
  return measure_peak(trace, target_at(5.0), window, expected, no_noise(), "")
      ->area;
}

// h sigma sqrt(2 pi) with h = 100, sigma = 0.05, points 0.01 apart; over 9
// sigma to either side the cut-off tails are below 1e-18 of it. Trapezoids of
// a Gaussian are exact to far more digits than doubles have.
TEST(Integrate, GaussianAreaIsExact) {
  const WindowTemplate window = window_of(0.45, 0.45, 0.1177);
  const double area =
      area_of(simulate_trace(one_gaussian(), "clean"), window, 5.0);
  EXPECT_TRUE(agrees_to_digits(area, 12.53314137, 10));
}

TEST(Integrate, AreaOfATailingPeakIsExact) {
  SimulatedTrace wanted;
  wanted.peaks = {{5.0, 0.05, 7.5, 0.05}};
  const WindowTemplate window = window_of(0.5, 2.5, 0.14);
  EXPECT_TRUE(agrees_to_digits(
      area_of(simulate_trace(wanted, "tail"), window, 5.0), 7.5, 9));
}

TEST(Integrate, UnevenTimesGiveTheSameArea) {
  SimulatedTrace wanted = one_gaussian();
  wanted.step_minutes = 0.002;
  wanted.jitter = 0.4;
  const WindowTemplate window = window_of(0.45, 0.45, 0.1177);
  const double area = area_of(simulate_trace(wanted, "uneven"), window, 5.0);
  // Trapezoids of uneven steps d err by d^2/12 times the curvature, whose
  // integral is zero: what is left is random, below 1e-5.
  EXPECT_TRUE(agrees_to_digits(area, 12.53314137, 5));
}

TEST(Integrate, SlopingBaselineTakesNothingAway) {
  SimulatedTrace wanted = one_gaussian();
  wanted.offset = 250.0;
  wanted.drift_per_minute = -40.0;
  const WindowTemplate window = window_of(0.45, 0.45, 0.1177);
  EXPECT_TRUE(agrees_to_digits(
      area_of(simulate_trace(wanted, "drift"), window, 5.0), 12.53314137, 10));
}

// The same peak sampled a little later: with a window that ends on points only
// the area would change by a trapezoid, here by 0.3 %.
TEST(Integrate, AreaDoesNotJumpWithThePhaseOfSampling) {
  const WindowTemplate window = window_of(0.12, 0.12, 0.1177);
  double least = 1e9;
  double most = 0.0;
  for (int phase = 0; phase < 20; ++phase) {
    SimulatedTrace wanted = one_gaussian();
    wanted.start_minutes = 0.0005 * phase;
    wanted.end_minutes = 10.0 + wanted.start_minutes;
    const auto placed = area_of(simulate_trace(wanted, "phase"), window, 5.0);
    least = std::min(least, placed);
    most = std::max(most, placed);
  }
  // The baseline's points jump by a step, which this steep flank shows; a
  // window far from the flank is exact (above).
  EXPECT_LT(most - least, 0.02 * most);
  const WindowTemplate wide = window_of(0.30, 0.30, 0.1177);
  for (int phase = 0; phase < 20; ++phase) {
    SimulatedTrace wanted = one_gaussian();
    wanted.start_minutes = 0.0005 * phase;
    wanted.end_minutes = 10.0 + wanted.start_minutes;
    EXPECT_TRUE(agrees_to_digits(
        area_of(simulate_trace(wanted, "phase"), wide, 5.0), 12.53314137, 7));
  }
}

// The slow twin: weights times signal.
TEST(Integrate, WeightsGiveTheSameAreaAndHeight) {
  SimulatedTrace wanted = one_gaussian();
  wanted.white_noise = 1.0;
  wanted.jitter = 0.3;
  const Trace trace = cut_trace(simulate_trace(wanted, "twin"), 4.0, 6.0);
  const SmoothedStretch stretch =
      smooth_stretch(trace, 11, 2, white_noise(1.0));
  const auto placed =
      place_window(stretch, {}, {5.003, 0.1777, 0.2123, 0.1177, true, 1.0});
  ASSERT_TRUE(placed);
  const auto sum = [&](const PointWeights& weights) {
    const std::vector<double> all = weights.over(stretch.minutes.size());
    double total = 0.0;
    for (std::size_t i = 0; i < all.size(); ++i) {
      total += all[i] * stretch.signal[i];
    }
    return total;
  };
  EXPECT_TRUE(within_condition(integrate_window(stretch, *placed),
                               sum(area_weights(stretch, *placed)), 100.0));
  EXPECT_TRUE(
      within_condition(signal_near(stretch, 5.003) - placed->baseline_at(5.003),
                       sum(height_weights(stretch, *placed, 5.003)), 100.0));
  EXPECT_TRUE(within_condition(
      smoothed_at(stretch, trace.minutes[100]) -
          placed->baseline_at(trace.minutes[100]),
      sum(smoothed_height_weights(stretch, *placed, trace.minutes[100])),
      1000.0));
}

TEST(Integrate, BaselineHoldsTheMeanOfPointsJustOutside) {
  Trace trace;
  for (int i = 0; i <= 256; ++i) {
    trace.minutes.push_back(i / 64.0);
    trace.signal.push_back(i % 2);
  }
  const SmoothedStretch stretch = smooth_stretch(trace, 1, 0, white_noise(0.0));
  // Half a width of 0.25 holds 8 points; feet at 1.75 and 2.25.
  const auto wide =
      place_window(stretch, {}, {2.0, 0.25, 0.25, 0.25, true, 0.0});
  ASSERT_TRUE(wide);
  EXPECT_EQ(wide->left.points(), 8u);
  EXPECT_EQ(wide->left.anchor_signal, 0.5);
  EXPECT_EQ(wide->left.last, 113u);  // the point on the foot itself
  EXPECT_EQ(wide->right.first, 144u);
  // Half a width of 1/32 would hold 2 points: 5 are taken.
  const auto narrow =
      place_window(stretch, {}, {2.0, 0.25, 0.25, 1.0 / 16.0, true, 0.0});
  ASSERT_TRUE(narrow);
  EXPECT_EQ(narrow->right.points(), 5u);
  EXPECT_FALSE(narrow->right.shortened);
}

}  // namespace
}  // namespace loqsmith
