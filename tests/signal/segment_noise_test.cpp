#include "loqsmith/signal/segment_noise.hpp"

#include <gtest/gtest.h>

#include <string>
#include <vector>

#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/numerics/random.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::within_condition;
using test::within_sampling_error;

struct Points {
  std::vector<double> minutes;
  std::vector<double> signal;
};

constexpr double kStep = 1.0 / 128.0;

Outcome<SegmentNoise> noise_of(const Points& points) {
  return segment_noise(points.minutes, points.signal, kStep);
}

// Minute m: a triangle wave of range 2 (m + 1) about a line of slope 3.
Points rising_waves(int minutes) {
  Points points;
  for (int i = 0; i < 128 * minutes; ++i) {
    const double t = i * kStep;
    const double wave[] = {0.0, 1.0, 0.0, -1.0, 0.0, -1.0, 0.0, 1.0};
    points.minutes.push_back(t);
    points.signal.push_back(3.0 * t + (i / 128 + 1.0) * wave[i % 8]);
  }
  return points;
}

// Ranges 2, 4, 6, 8 of segments of one minute: mean 5 by construction (the
// wave has neither level nor slope worth mentioning in 16 periods).
TEST(SegmentNoise, MeanRangeOfMinutesAboutTheirLines) {
  const auto noise = noise_of(rising_waves(4));
  ASSERT_TRUE(noise);
  EXPECT_EQ(noise->segments, 4U);
  EXPECT_EQ(noise->segment_minutes, 1.0);
  EXPECT_GT(noise->peak_to_peak, 4.99);
  EXPECT_LT(noise->peak_to_peak, 5.01);
  EXPECT_GT(noise->drift_per_hour, 179.0);
  EXPECT_LT(noise->drift_per_hour, 181.0);
}

TEST(SegmentNoise, DriftOfALineIsItsSlope) {
  Points points = rising_waves(3);
  for (std::size_t i = 0; i < points.signal.size(); ++i) {
    points.signal[i] = 5.0 - 0.25 * points.minutes[i];
  }
  const auto noise = noise_of(points);
  ASSERT_TRUE(noise);
  EXPECT_TRUE(within_condition(noise->drift_per_hour, -15.0, 100.0));
  EXPECT_LT(noise->peak_to_peak, 1e-14);
}

// 2.5 minutes are three segments of 50 seconds.
TEST(SegmentNoise, SegmentsAreEqualAndAtMostAMinute) {
  Points points = rising_waves(3);
  points.minutes.resize(320);
  points.signal.resize(320);
  const auto noise = noise_of(points);
  ASSERT_TRUE(noise);
  EXPECT_EQ(noise->segments, 3U);
  EXPECT_TRUE(within_condition(noise->segment_minutes, 2.5 / 3.0, 4.0));
}

// A peak cut out of the second minute leaves less than half of it.
TEST(SegmentNoise, HalfEmptySegmentsArePassedOver) {
  Points points = rising_waves(4);
  const auto gap = [](auto& values) {
    values.erase(values.begin() + 150, values.begin() + 230);
  };
  gap(points.minutes);
  gap(points.signal);
  const auto noise = noise_of(points);
  ASSERT_TRUE(noise);
  EXPECT_EQ(noise->segments, 3U);
  EXPECT_GT(noise->peak_to_peak, 5.33 - 0.02);  // (2 + 6 + 8) / 3
  EXPECT_LT(noise->peak_to_peak, 5.33 + 0.02);
}

TEST(SegmentNoise, TooFewPointsGiveNone) {
  EXPECT_FALSE(noise_of({}));
  EXPECT_FALSE(noise_of({{0.0, kStep, 2 * kStep}, {1.0, 2.0, 1.0}}));
  // Five points scattered over two minutes.
  EXPECT_FALSE(noise_of({{0.0, 0.5, 1.0, 1.5, 2.0}, {1, 2, 1, 2, 1}}));
}

// Expected range of 100 independent normal values, d2 = 5.015187; a line
// taken off leaves 98 degrees of freedom of 100.
TEST(SegmentNoise, WhiteNoiseHasTheExpectedRange) {
  RandomStream stream("segments");
  std::vector<double> found;
  for (int i = 0; i < 60; ++i) {
    Points points;
    for (int k = 0; k < 1000; ++k) {
      points.minutes.push_back(0.01 * k);
      points.signal.push_back(stream.normal());
    }
    const auto noise = segment_noise(points.minutes, points.signal, 0.01);
    ASSERT_TRUE(noise);
    ASSERT_EQ(noise->segments, 10U);
    found.push_back(noise->peak_to_peak);
  }
  EXPECT_TRUE(within_sampling_error(mean(found), standard_deviation(found), 60,
                                    5.015187 * 0.98994949));  // sqrt(98/100)
}

}  // namespace
}  // namespace loqsmith
