#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

#include "one_peak.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;

Outcome<Peak> by_hand(const test::SimulatedTrace& wanted, ManualBounds bounds,
                      const TargetSettings& target = test::target_at(5.0)) {
  return measure_peak(test::simulate_trace(wanted, "by hand"), target,
                      test::kWindow, 5.0, NotApplicable{"none"}, "", bounds);
}

double gaussian_share(double from, double to) {
  const auto until = [](double minutes) {
    return 0.5 * std::erfc(-(minutes - 5.0) / (0.05 * std::sqrt(2.0)));
  };
  return until(to) - until(from);
}

// Level trace beside the peak: the baseline is zero, and the area that of the
// Gaussian between the bounds.
TEST(ManualBounds, AreTheFeetOfTheArea) {
  test::SimulatedTrace wanted;
  wanted.peaks = {{5.0, 0.05, 90.0}};
  const Outcome<Peak> peak = by_hand(wanted, {4.6, 5.35});
  ASSERT_TRUE(peak) << peak.reason();
  EXPECT_TRUE(peak->manual);
  EXPECT_TRUE(peak->found);
  EXPECT_EQ(peak->start_minutes, 4.6);
  EXPECT_EQ(peak->end_minutes, 5.35);
  EXPECT_TRUE(
      agrees_to_digits(peak->area, 90.0 * gaussian_share(4.6, 5.35), 7));
  EXPECT_EQ(
      std::count(peak->reasons.begin(), peak->reasons.end(), "manual-bounds"),
      1);
}

// A neighbour between the bounds belongs to the area: no drop, no reason.
TEST(ManualBounds, AreNotMovedByNeighbours) {
  test::SimulatedTrace wanted;
  wanted.peaks = {{5.0, 0.05, 90.0}, {5.25, 0.05, 60.0}};
  const Outcome<Peak> peak = by_hand(wanted, {4.6, 5.7});
  ASSERT_TRUE(peak) << peak.reason();
  EXPECT_EQ(peak->overlap, "");
  EXPECT_TRUE(agrees_to_digits(peak->area, 150.0, 7));
}

// The method's own window is at 5 minutes; the hand says 7.
TEST(ManualBounds, SayWhereToLook) {
  test::SimulatedTrace wanted;
  wanted.peaks = {{5.0, 0.05, 90.0}, {7.0, 0.05, 30.0}};
  const Outcome<Peak> peak = by_hand(wanted, {6.6, 7.4});
  ASSERT_TRUE(peak) << peak.reason();
  EXPECT_TRUE(agrees_to_digits(peak->retention_minutes, 7.0, 4));
  EXPECT_TRUE(agrees_to_digits(peak->area, 30.0, 7));
}

TEST(ManualBounds, TakeTheAreaInPlaceOfALearnedShape) {
  test::SimulatedTrace wanted;
  wanted.peaks = {{5.0, 0.05, 90.0}};
  TargetSettings target = test::target_at(5.0);
  target.integration.response = IntegrationSettings::Response::Template;
  const Outcome<Peak> peak = by_hand(wanted, {4.6, 5.4}, target);
  ASSERT_TRUE(peak) << peak.reason();
  EXPECT_TRUE(peak->area_instead);
  EXPECT_FALSE(peak->template_response);
}

TEST(ManualBounds, BeyondTheTraceGiveNoNumber) {
  test::SimulatedTrace wanted;
  wanted.peaks = {{5.0, 0.05, 90.0}};
  const Outcome<Peak> peak = by_hand(wanted, {50.0, 51.0});
  ASSERT_FALSE(peak);
  EXPECT_TRUE(peak.reason().starts_with("window-not-covered"));
}

}  // namespace
}  // namespace loqsmith
