#include "loqsmith/signal/estimated_baseline.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <string>
#include <vector>

#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/signal/baseline_bias.hpp"
#include "curve_support.hpp"
#include "signal_support.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::gaussian_of_height;
using test::has_reason;
using test::same_bits;
using test::simulate_trace;
using test::SimulatedTrace;
using test::target_at;
using test::window_of;
using test::within_condition;
using test::within_sampling_error;

using Baseline = IntegrationSettings::Baseline;

const WindowTemplate kWindow = window_of(0.19, 0.19, 0.1177);

TargetSettings target_with(Baseline baseline) {
  TargetSettings target = target_at(5.0);
  target.integration.baseline = baseline;
  return target;
}

// A peak of sigma 0.05 at 5 minutes, 100 points a minute.
SimulatedTrace trace_of(double height, double white_noise) {
  SimulatedTrace wanted;
  wanted.offset = 100.0;
  wanted.white_noise = white_noise;
  if (height > 0.0) wanted.peaks = {gaussian_of_height(5.0, 0.05, height)};
  return wanted;
}

// All of the peak but 0.014 % lies in the window.
double area_of(double height) {
  return height * 0.05 * std::sqrt(2.0 * std::acos(-1.0)) *
         std::erf(0.19 / 0.05 / std::sqrt(2.0));
}

Outcome<NoiseEstimate> noise_for(const Trace& trace,
                                 const TargetSettings& target) {
  Outcome<NoiseEstimate> noise = measure_noise_beside(
      trace, 4.81, 5.19, kWindow.width_half_minutes, target.noise);
  if (!noise) return noise;
  add_whole_trace_noise(noise.value(), trace, 4.81, 5.19,
                        kWindow.width_half_minutes);
  add_simulated_baseline(noise.value(), trace, target, kWindow, 5.0);
  return noise;
}

double area_with(const SimulatedTrace& wanted, const std::string& name,
                 Baseline baseline) {
  const TargetSettings target = target_with(baseline);
  const auto peak = measure_peak(simulate_trace(wanted, name), target, kWindow,
                                 5.0, test::no_noise(), "");
  EXPECT_TRUE(peak);
  EXPECT_EQ(peak->baseline, baseline_name(baseline));
  return peak->area;
}

class Estimated : public testing::TestWithParam<Baseline> {};

struct Ground {
  const char* name;
  double drift;
  double bend;
};

// The baseline's course may not cost a peak of 500 times the noise more than
// 0.5 % of its area, and no more than half a standard deviation of a blank's
// area of the valley baseline (0.11) on top of what a level one costs.
TEST_P(Estimated, CleanPeaksOnCurvedAndDriftingBaselines) {
  const double truth = area_of(500.0);
  const auto mean_area = [&](const Ground& ground) {
    SimulatedTrace wanted = trace_of(500.0, 1.0);
    wanted.drift_per_minute = ground.drift;
    wanted.bend_per_minute2 = ground.bend;
    std::vector<double> areas;
    for (int i = 0; i < 20; ++i) {
      areas.push_back(
          area_with(wanted, "ground " + std::to_string(i), GetParam()));
    }
    return mean(areas);
  };
  const double level = mean_area({"level", 0.0, 0.0});
  EXPECT_LT(std::abs(level - truth), 0.005 * truth);
  for (const Ground& ground :
       {Ground{"drift", 50.0, 0.0}, Ground{"up", 5.0, 20.0},
        Ground{"down", -5.0, -20.0}}) {
    const double area = mean_area(ground);
    RecordProperty(ground.name, std::to_string((area - truth) / truth));
    EXPECT_LT(std::abs(area - truth), 0.005 * truth) << ground.name;
    EXPECT_LT(std::abs(area - level), 0.055) << ground.name;
  }
}

// A straight line through the feet cannot follow such a baseline: this is what
// the estimated ones are for.
TEST_P(Estimated, FollowABentBaselineThatAStraightLineCuts) {
  SimulatedTrace wanted = trace_of(500.0, 1.0);
  wanted.bend_per_minute2 = 20.0;
  double straight = 0.0;
  double estimated = 0.0;
  for (int i = 0; i < 20; ++i) {
    const std::string name = "bent " + std::to_string(i);
    SimulatedTrace level = wanted;
    level.bend_per_minute2 = 0.0;
    straight += area_with(wanted, name, Baseline::Valley) -
                area_with(level, name, Baseline::Valley);
    estimated += area_with(wanted, name, GetParam()) -
                 area_with(level, name, GetParam());
  }
  EXPECT_LT(std::abs(estimated), 0.25 * std::abs(straight));
}

TEST_P(Estimated, ScaleWithTheSignalAndMoveWithItsOffset) {
  Trace trace = simulate_trace(trace_of(40.0, 1.0), "scale");
  const TargetSettings target = target_with(GetParam());
  const auto measured = [&] {
    return *measure_peak(trace, target, kWindow, 5.0, test::no_noise(), "");
  };
  const Peak one = measured();
  for (double& y : trace.signal) y *= 4.0;
  const Peak four = measured();
  EXPECT_TRUE(within_condition(four.area, 4.0 * one.area, 1e6));
  EXPECT_TRUE(within_condition(four.height, 4.0 * one.height, 1e6));
  for (double& y : trace.signal) y += 1024.0;
  EXPECT_TRUE(within_condition(measured().area, four.area, 1e8));
}

TEST_P(Estimated, UnevenTimesGiveTheSameArea) {
  SimulatedTrace wanted = trace_of(500.0, 1.0);
  wanted.bend_per_minute2 = 10.0;
  wanted.jitter = 0.4;
  std::vector<double> areas;
  for (int i = 0; i < 20; ++i) {
    areas.push_back(
        area_with(wanted, "uneven " + std::to_string(i), GetParam()));
  }
  EXPECT_LT(std::abs(mean(areas) - area_of(500.0)), 0.005 * area_of(500.0));
}

TEST_P(Estimated, SaturationIsSeenInTheDetectorsOwnSignal) {
  SimulatedTrace wanted = trace_of(500.0, 0.5);
  wanted.drift_per_minute = 5.0;
  wanted.ceiling = 450.0;
  const auto peak =
      measure_peak(simulate_trace(wanted, "flat top"), target_with(GetParam()),
                   kWindow, 5.0, test::no_noise(), "");
  ASSERT_TRUE(peak);
  EXPECT_TRUE(has_reason(*peak, "saturated"));
}

TEST_P(Estimated, TeachersFeetAreThoseOfACleanTrace) {
  SimulatedTrace wanted = trace_of(500.0, 1.0);
  wanted.bend_per_minute2 = 20.0;
  const auto window = test::taught_by(simulate_trace(wanted, "teacher"),
                                      target_with(GetParam()));
  ASSERT_TRUE(window);
  // 2.5 to 4.2 sigma: down to the smoothed noise of a level baseline.
  EXPECT_GT(window->left_minutes, 0.125);
  EXPECT_LT(window->left_minutes, 0.21);
  EXPECT_GT(window->right_minutes, 0.125);
  EXPECT_LT(window->right_minutes, 0.21);
  EXPECT_LT(std::abs(window->width_half_minutes - 0.1177), 0.002);
}

TEST_P(Estimated, TheCurveDrawsTheBaseline) {
  SimulatedTrace wanted = trace_of(500.0, 0.0);
  wanted.drift_per_minute = 5.0;
  const Trace trace = simulate_trace(wanted, "curve");
  const auto peak = measure_peak(trace, target_with(GetParam()), kWindow, 5.0,
                                 test::no_noise(), "");
  ASSERT_TRUE(peak);
  const PeakCurve curve = test::curve_of(trace, target_with(GetParam()),
                                         kWindow, 5.0, test::no_noise());
  ASSERT_EQ(curve.baseline.size(), curve.minutes.size());
  double area = 0.0;
  for (std::size_t i = 0; i + 1 < curve.minutes.size(); ++i) {
    if (curve.minutes[i] < peak->start_minutes ||
        curve.minutes[i] > peak->end_minutes) {
      continue;
    }
    area += 0.01 * (curve.signal[i] - curve.baseline[i]);
  }
  EXPECT_LT(std::abs(area - peak->area), 0.01 * peak->area);
}

struct Noise {
  const char* name;
  double white;
  double creeping;
};

class BlankBias
    : public testing::TestWithParam<std::tuple<Baseline, const char*>> {
 protected:
  Noise noise() const {
    return std::string(std::get<1>(GetParam())) == "white"
               ? Noise{"white", 1.0, 0.0}
               : Noise{"coloured", 0.7, 0.7};
  }
};

// The twin is the whole way: 300 blank traces measured one by one, the noise
// model learned from one of them.
TEST_P(BlankBias, IsWhatBlanksShow) {
  const TargetSettings target = target_with(std::get<0>(GetParam()));
  SimulatedTrace wanted = trace_of(0.0, noise().white);
  wanted.end_minutes = 14.0;
  wanted.creeping_noise = noise().creeping;
  wanted.creep = 0.8;
  std::vector<double> areas;
  std::vector<double> biases;
  std::vector<double> sds;
  double error = 0.0;
  for (int i = 0; i < 300; ++i) {
    const Trace trace = simulate_trace(
        wanted, std::string(noise().name) + " blank " + std::to_string(i));
    // The simulation is the slow part: ten blanks' noise will do.
    const auto known =
        i % 30 == 0 ? noise_for(trace, target) : test::no_noise();
    const auto peak = measure_peak(trace, target, kWindow, 5.0, known, "");
    ASSERT_TRUE(peak);
    areas.push_back(peak->area);
    if (i % 30 != 0) continue;
    ASSERT_TRUE(peak->baseline_bias);
    ASSERT_TRUE(peak->response_noise);
    EXPECT_TRUE(
        same_bits(*peak->response_noise, peak->baseline_bias->blank_sd));
    biases.push_back(peak->baseline_bias->blank);
    sds.push_back(peak->baseline_bias->blank_sd);
    error = peak->baseline_bias->blank_error;
  }
  const double sd = standard_deviation(areas);
  RecordProperty("mean", std::to_string(mean(areas)));
  RecordProperty("predicted", std::to_string(mean(biases)));
  RecordProperty("sd", std::to_string(sd));
  RecordProperty("predicted_sd", std::to_string(mean(sds)));
  // The predictions share their random numbers: one standard error of theirs,
  // the measured mean's own, and that of ten noise models (5 % each).
  const double own = sd / std::sqrt(300.0);
  const double model = 0.05 / std::sqrt(10.0) * mean(areas);
  EXPECT_LT(std::abs(mean(areas) - mean(biases)),
            3.0 * std::sqrt(own * own + error * error + model * model));
  EXPECT_GT(mean(areas), 3.0 * own);
  EXPECT_LT(std::abs(mean(sds) / sd - 1.0), 0.25);
}

INSTANTIATE_TEST_SUITE_P(
    Kinds, BlankBias,
    testing::Combine(testing::Values(Baseline::AsymmetricLeastSquares,
                                     Baseline::Snip),
                     testing::Values("white", "coloured")));

TEST_P(Estimated, LowPeaksScatterMoreThanBlanks) {
  const auto found = simulate_baseline(target_with(GetParam()), kWindow,
                                       white_noise(1.0), 0.01);
  ASSERT_TRUE(found);
  EXPECT_GT(found->area.low_peak_sd, found->area.blank_sd);
  EXPECT_LT(found->area.low_peak, found->area.blank);
  // The same numbers again, and four times as large for four times the noise.
  const auto again = simulate_baseline(target_with(GetParam()), kWindow,
                                       white_noise(4.0), 0.01);
  EXPECT_TRUE(
      within_condition(again->area.blank, 4.0 * found->area.blank, 1e8));
  const BaselineBias scaled =
      found->of(IntegrationSettings::Response::Area, white_noise(4.0));
  EXPECT_TRUE(within_condition(scaled.blank, 4.0 * found->area.blank, 4.0));
  const BaselineBias same =
      found->of(IntegrationSettings::Response::Area, white_noise(1.2));
  EXPECT_TRUE(same_bits(same.blank, found->area.blank));
  // A blank that shows no noise lifts nothing, and nothing is divided by it.
  NoiseEstimate quiet;
  const BaselineBias none = found->scaled_to(quiet).of(
      IntegrationSettings::Response::Area, white_noise(1.0));
  EXPECT_TRUE(same_bits(none.blank, 0.0));
  EXPECT_TRUE(same_bits(none.blank_sd, 0.0));
}

INSTANTIATE_TEST_SUITE_P(Kinds, Estimated,
                         testing::Values(Baseline::AsymmetricLeastSquares,
                                         Baseline::Snip));

TEST(StraightBaseline, IsNotSimulated) {
  EXPECT_FALSE(simulate_baseline(target_with(Baseline::Valley), kWindow,
                                 white_noise(1.0), 0.01));
  EXPECT_FALSE(simulate_baseline(target_with(Baseline::Snip), kWindow,
                                 white_noise(0.0), 0.01));
  EXPECT_FALSE(estimate_baseline(simulate_trace(trace_of(1.0, 1.0), "valley"),
                                 Baseline::Valley, 0.1, 0.2));
}

TEST(BaselineWords, ReadBack) {
  for (const Baseline baseline :
       {Baseline::Valley, Baseline::AsymmetricLeastSquares, Baseline::Snip}) {
    EXPECT_EQ(baseline_from_name(baseline_name(baseline)), baseline);
  }
}

TEST(EstimatedBaselines, LeaveTheTemplateItsOwnStraightLine) {
  TargetSettings target = target_with(Baseline::Snip);
  target.integration.response = IntegrationSettings::Response::Template;
  const auto peak =
      measure_peak(simulate_trace(trace_of(50.0, 1.0), "template"), target,
                   kWindow, 5.0, test::no_noise(), "");
  ASSERT_FALSE(peak);
  EXPECT_TRUE(test::begins_with(peak.reason(), "not-available"));
}

}  // namespace
}  // namespace loqsmith
