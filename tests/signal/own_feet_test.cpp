#include <gtest/gtest.h>

#include <cmath>
#include <vector>

#include "loqsmith/numerics/mean.hpp"
#include "simulated_night.hpp"

// integration bounds="own": every peak over the feet it shows itself.

namespace loqsmith {
namespace {

struct Night {
  TargetSettings target = test::target_at(5.0);
  WindowTemplate window;

  Night() {
    test::SimulatedTrace calm = test::plain_detector();
    calm.white_noise = 1.0;
    calm.peaks = {{5.0, 0.05, 90.0, 0.03}};
    window = *test::taught_by(test::simulate_trace(calm, "teacher"), target);
    target.integration.bounds = IntegrationSettings::Bounds::Own;
  }

  Peak measure(const test::SimulatedTrace& wanted,
               const std::string& name) const {
    const auto noise = test::no_noise();
    return *measure_peak(test::simulate_trace(wanted, name), target, window,
                         5.0, noise, "");
  }
};

test::SimulatedTrace with_peak(double area, double sigma, double noise) {
  test::SimulatedTrace wanted = test::plain_detector();
  wanted.white_noise = noise;
  wanted.peaks = {{5.0, sigma, area, 0.03}};
  return wanted;
}

// A peak twice as wide as the standards': the template's feet cut it.
TEST(OwnFeet, FollowAPeakWiderThanTheStandards) {
  Night night;
  const auto wide = with_peak(90.0, 0.10, 0.0);
  const Peak own = night.measure(wide, "wide");
  night.target.integration.bounds = IntegrationSettings::Bounds::Template;
  const Peak over_template = night.measure(wide, "wide");
  EXPECT_LT(own.start_minutes, over_template.start_minutes - 0.1);
  EXPECT_GT(own.end_minutes, over_template.end_minutes + 0.05);
  // Feet where a thousandth of the height is left.
  EXPECT_GT(own.area / 90.0, 0.99);
  EXPECT_LT(own.area / 90.0, 1.0);
  EXPECT_LT(over_template.area / 90.0, 0.95);
}

// The feet of a low peak lie where it comes down to the noise: nearer.
TEST(OwnFeet, DrawNearAsThePeakGetsLower) {
  const Night night;
  std::vector<double> high;
  std::vector<double> low;
  for (int i = 0; i < 50; ++i) {
    const std::string name = "height " + std::to_string(i);
    const Peak tall = night.measure(with_peak(900.0, 0.05, 1.0), name);
    const Peak small = night.measure(with_peak(2.0, 0.05, 1.0), name);
    high.push_back(tall.end_minutes - tall.start_minutes);
    if (small.found) low.push_back(small.end_minutes - small.start_minutes);
  }
  ASSERT_GE(low.size(), 40U);
  EXPECT_LT(mean(low), 0.85 * mean(high));
}

TEST(OwnFeet, AreTheTemplatesWhereNoPeakIsSeen) {
  Night night;
  test::SimulatedTrace blank = test::plain_detector();
  blank.white_noise = 1.0;
  const Peak own = night.measure(blank, "blank");
  ASSERT_FALSE(own.found);
  night.target.integration.bounds = IntegrationSettings::Bounds::Template;
  const Peak over_template = night.measure(blank, "blank");
  EXPECT_EQ(own.area, over_template.area);
  EXPECT_EQ(own.start_minutes, over_template.start_minutes);
}

TEST(OwnFeet, EndAtANeighboursValley) {
  const Night night;
  test::SimulatedTrace pair = with_peak(90.0, 0.05, 0.0);
  pair.peaks.push_back({5.22, 0.05, 90.0, 0.03});
  const Peak peak = night.measure(pair, "pair");
  EXPECT_EQ(peak.overlap, "drop");
  EXPECT_TRUE(test::has_reason(peak, "overlapped"));
  EXPECT_LT(peak.end_minutes, 5.2);
  EXPECT_GT(peak.end_minutes, 5.05);
}

TEST(OwnFeet, DoNotGoWithALearnedShape) {
  Night night;
  night.target.integration.response = IntegrationSettings::Response::Template;
  const auto noise = test::no_noise();
  const auto peak =
      measure_peak(test::simulate_trace(with_peak(90.0, 0.05, 0.0), "shape"),
                   night.target, night.window, 5.0, noise, "");
  ASSERT_FALSE(peak);
  EXPECT_EQ(peak.reason().rfind("not-available", 0), 0U);
}

}  // namespace
}  // namespace loqsmith
