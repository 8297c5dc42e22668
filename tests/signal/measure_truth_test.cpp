#include <gtest/gtest.h>

#include <cmath>
#include <iostream>
#include <string>
#include <vector>

#include "loqsmith/numerics/mean.hpp"
#include "simulated_night.hpp"
#include "template_night.hpp"

// What is measured against what was put in.

namespace loqsmith {
namespace {

using test::SimulatedNight;

struct Detector {
  const char* name;
  test::SimulatedTrace trace;
};

void PrintTo(const Detector& shown, std::ostream* out) { *out << shown.name; }

// A tailing peak of height 1 or so.
const test::SimulatedPeak kTailing{5.0, 0.05, 0.15, 0.03};

class Truth : public testing::TestWithParam<Detector> {
 protected:
  static SimulatedNight night_of(const Detector& detector) {
    return {detector.trace, kTailing, std::string("truth, ") + detector.name};
  }

  // Mean relative deviation of the area from that of the same peak without
  // noise, and its standard error.
  static void expect_small_bias(double signal_to_noise, double most) {
    SimulatedNight night = night_of(GetParam());
    const double units = signal_to_noise / night.unit_height();
    const double truth = night.without_noise(units).area;
    std::vector<double> deviations;
    for (int i = 0; i < 1000; ++i) {
      deviations.push_back(night.measure(units).area / truth - 1.0);
    }
    const double error = standard_deviation(deviations) / std::sqrt(1000.0);
    RecordProperty("bias", std::to_string(mean(deviations)));
    RecordProperty("error", std::to_string(error));
    EXPECT_LE(std::abs(mean(deviations)), most + 3.0 * error);
  }
};

TEST_P(Truth, AreasAtFiftyTimesTheNoiseAreRightToThreeInAThousand) {
  expect_small_bias(50.0, 0.003);
}

TEST_P(Truth, AreasAtTenTimesTheNoiseAreRightToOneInAHundred) {
  expect_small_bias(10.0, 0.01);
}

// Standard error of the mean: 1 / sqrt(4000) = 0.016 of the deviation.
TEST_P(Truth, BlanksLieAroundZero) {
  SimulatedNight night = night_of(GetParam());
  std::vector<double> areas;
  for (int i = 0; i < 4000; ++i) areas.push_back(night.measure(0.0).area);
  const double share = mean(areas) / standard_deviation(areas);
  RecordProperty("share", std::to_string(share));
  EXPECT_LE(std::abs(share), 0.1);
}

INSTANTIATE_TEST_SUITE_P(
    Signal, Truth,
    testing::Values(Detector{"white noise", test::white_detector()},
                    Detector{"Markov noise", test::markov_detector()},
                    Detector{"flicker noise", test::flicker_detector()},
                    Detector{"ripple", test::rippled_detector()}));

// Least standard deviation of a peak's time in white noise of deviation 1,
// with its height and shape known (Cramer and Rao):
//
//     1 / sqrt(sum over the points of f'(t)^2)
double least_time_deviation(double units) {
  constexpr double kStep = 0.005;
  constexpr double kHair = 1e-5;
  double squares = 0.0;
  for (int i = 0; i < 800; ++i) {
    const double t = 3.0 + kStep * i;
    const auto at = [&](double minutes) {
      return kTailing.area * units *
             test::modified_gaussian(minutes, kTailing.minutes, kTailing.sigma,
                                     kTailing.tau);
    };
    const double slope = (at(t + kHair) - at(t - kHair)) / (2.0 * kHair);
    squares += slope * slope;
  }
  return 1.0 / std::sqrt(squares);
}

// Above a hundred times the noise less of the peak is used, because there the
// bend of a tailing top would do more harm than noise.
class RetentionTimes : public testing::TestWithParam<double> {};

// A standard deviation from 1,000 values is itself known to 2.2 %.
TEST_P(RetentionTimes, ScatterLittleMoreThanTheyMust) {
  SimulatedNight night(test::white_detector(), kTailing, "retention times");
  const double units = GetParam() / night.unit_height();
  std::vector<double> times;
  for (int i = 0; i < 1000; ++i) {
    times.push_back(night.measure(units).retention_minutes);
  }
  const double ratio = standard_deviation(times) / least_time_deviation(units);
  RecordProperty("ratio", std::to_string(ratio));
  EXPECT_LE(ratio, 1.5 * (1.0 + 3.0 * 0.022));
  EXPECT_GE(ratio, 1.0 - 3.0 * 0.022);
}

INSTANTIATE_TEST_SUITE_P(Signal, RetentionTimes,
                         testing::Values(10.0, 30.0, 100.0));

// With the shape known from the standards the time of a high peak, too, comes
// within the bound, which rests on that knowledge. The shape's own apex is the
// mean of its five teachers', at 800 to 2,400 times the noise.
class TaughtTimes : public testing::TestWithParam<double> {};

TEST_P(TaughtTimes, ScatterLittleMoreThanTheyMust) {
  test::SimulatedTrace detector = test::white_detector();
  detector.end_minutes = 14.0;
  test::TemplateNight night(detector, "taught times", kTailing.tau);
  const double units =
      GetParam() /
      SimulatedNight(test::white_detector(), kTailing, "height").unit_height();
  std::vector<double> times;
  for (int i = 0; i < 1000; ++i) {
    const Peak peak = night.measure(kTailing.area * units);
    ASSERT_TRUE(peak.template_response);
    times.push_back(peak.retention_minutes);
  }
  const double ratio = standard_deviation(times) / least_time_deviation(units);
  RecordProperty("ratio", std::to_string(ratio));
  EXPECT_LE(ratio, 1.5 * (1.0 + 3.0 * 0.022));
  EXPECT_GE(ratio, 1.0 - 3.0 * 0.022);
}

INSTANTIATE_TEST_SUITE_P(Signal, TaughtTimes,
                         testing::Values(100.0, 300.0, 1000.0, 3000.0));

}  // namespace
}  // namespace loqsmith
