#include "loqsmith/signal/template_shape.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <vector>

#include "loqsmith/signal/summits.hpp"
#include "curve_support.hpp"
#include "support/tolerance.hpp"
#include "template_night.hpp"

namespace loqsmith {
namespace {

using test::area_of_height;
using test::gaussian_of_height;
using test::has_reason;
using test::simulate_trace;
using test::SimulatedPeak;
using test::SimulatedTrace;
using test::target_at;
using test::template_detector;
using test::TemplateNight;
using test::within_condition;
using test::within_sampling_error;

TargetSettings by_template() {
  TargetSettings target = target_at(5.0);
  target.integration.response = IntegrationSettings::Response::Template;
  return target;
}

// A standard without noise whose points stand at another fraction of a step.
Outcome<TeacherPeak> taught(SimulatedTrace wanted, double fraction,
                            int injection) {
  wanted.start_minutes = fraction * wanted.step_minutes;
  return observe_teacher(simulate_trace(wanted, "standard"), by_template(),
                         injection, Role::Standard);
}

SimulatedTrace standard(double height) {
  SimulatedTrace wanted;
  wanted.peaks = {gaussian_of_height(5.0, 0.05, height)};
  return wanted;
}

double gaussian(double x, double sigma) {
  return std::exp(-0.5 * (x / sigma) * (x / sigma)) /
         (sigma * std::sqrt(2.0 * 3.14159265358979324));
}

TEST(TemplateShape, PeaksSampledAtFractionsOfAStepGiveOneShape) {
  std::vector<TeacherPeak> seen;
  for (int i = 0; i < 4; ++i) {
    seen.push_back(*taught(standard(300.0 + 100.0 * i), 0.25 * i, i + 1));
  }
  const auto window = learn_template(seen);
  ASSERT_TRUE(window);
  const TemplateShape& shape = window->shape;
  ASSERT_EQ(shape.lessons, 4U);
  double sum = 0.0;
  for (const double value : shape.values) sum += value * shape.step_minutes;
  // Ends are a thousandth of the apex high: half of each is not the area's.
  EXPECT_LE(std::abs(sum - 1.0), 1e-4);
  // 5 points a standard deviation: the cubic is good to 1 part in 10,000 of
  // the apex, the baseline just outside the feet takes off some more.
  const double apex = gaussian(0.0, 0.05);
  for (double x = -0.15; x <= 0.15; x += 0.007) {
    EXPECT_LE(std::abs(shape_at(shape, x) - gaussian(x, 0.05)), 0.003 * apex)
        << x;
  }
  EXPECT_LE(std::abs(shape_slope_at(shape, 0.05) + gaussian(0.05, 0.05) / 0.05),
            0.03 * apex / 0.05);
  EXPECT_TRUE(test::same_bits(shape_at(shape, 0.3), 0.0));
  EXPECT_LE(shape.scatter, 0.002);
}

TEST(TemplateShape, OnlyWhereTheResponseAsksForIt) {
  const Trace trace = simulate_trace(standard(500.0), "area");
  const auto seen = observe_teacher(trace, target_at(5.0), 1, Role::Standard);
  ASSERT_TRUE(seen);
  EXPECT_TRUE(seen->slice.offsets.empty());
  EXPECT_TRUE(learn_template({*seen})->shape.empty());
  const auto peak =
      measure_peak(trace, target_at(5.0), *learn_template({*seen}), 5.0,
                   test::no_noise(), "");
  ASSERT_TRUE(peak);
  EXPECT_FALSE(peak->template_response);
  EXPECT_FALSE(peak->shape_passed);
  EXPECT_FALSE(peak->area_instead);
}

TEST(TemplateShape, SaturatedAndOverlappedPeaksNeverTeach) {
  std::vector<TeacherPeak> seen{*taught(standard(300.0), 0.0, 1)};
  SimulatedTrace cut = standard(900.0);
  cut.ceiling = 700.0;
  seen.push_back(*taught(cut, 0.0, 2));
  ASSERT_TRUE(seen.back().saturated);
  SimulatedTrace crowded = standard(400.0);
  crowded.peaks.push_back(gaussian_of_height(5.22, 0.05, 400.0));
  seen.push_back(*taught(crowded, 0.0, 3));
  ASSERT_TRUE(seen.back().right_overlapped);
  EXPECT_EQ(learn_template(seen)->shape.lessons, 1U);
  EXPECT_TRUE(learn_template({seen.back()})->shape.empty());
}

// Without a shape every injection goes by area, and says so.
TEST(TemplateShape, AreaStandsInWhereNoShapeWasLearned) {
  SimulatedTrace crowded = standard(400.0);
  crowded.peaks.push_back(gaussian_of_height(5.22, 0.05, 400.0));
  const auto window = learn_template({*taught(crowded, 0.0, 3)});
  ASSERT_TRUE(window);
  const auto peak =
      measure_peak(simulate_trace(standard(100.0), "alone"), by_template(),
                   *window, 5.0, test::no_noise(), "");
  ASSERT_TRUE(peak);
  EXPECT_TRUE(peak->area_instead);
  EXPECT_FALSE(peak->template_response);
  EXPECT_TRUE(has_reason(*peak, "template-not-fitted"));
}

// Two shapes in equal parts: a width 10 % larger changes the shape by 7 % of
// its root mean square, the mean lies halfway, n - 1 makes 3.5 into 5.
TEST(TemplateShape, ScatterOfTheTeachersIsSeen) {
  std::vector<TeacherPeak> seen;
  for (int i = 0; i < 2; ++i) {
    SimulatedTrace wanted = standard(500.0);
    wanted.peaks[0].sigma *= 1.0 + 0.1 * i;
    seen.push_back(*taught(wanted, 0.0, i + 1));
  }
  const TemplateShape shape = learn_template(seen)->shape;
  EXPECT_GE(shape.scatter, 0.035);
  EXPECT_LE(shape.scatter, 0.065);
}

class Shapes : public testing::Test {
 protected:
  Shapes() : night_(template_detector(1.0, 0.0), "shapes") {}

  Peak with(const SimulatedPeak& peak) {
    SimulatedTrace wanted = night_.wanted_for(0.0);
    wanted.peaks = {peak};
    return night_.measured(simulate_trace(wanted, night_.stream()),
                           night_.blank_noise());
  }

  TemplateNight night_;
};

TEST_F(Shapes, TheTaughtShapePassesAtEveryHeight) {
  for (const double height : {3.0, 30.0, 300.0, 3000.0, 30000.0, 300000.0}) {
    const double area = area_of_height(height);
    for (int i = 0; i < 20; ++i) {
      // Noise beside a peak may now and then look like a neighbour.
      EXPECT_FALSE(has_reason(night_.measure(area), "shape-differs")) << height;
    }
  }
}

TEST_F(Shapes, AnotherShapeGoesByAreaAndSaysSo) {
  const std::vector<SimulatedPeak> others{
      {5.0, 0.07, area_of_height(100.0), 0.0},    // broader
      {5.0, 0.03, area_of_height(100.0), 0.0},    // narrower
      {5.0, 0.05, area_of_height(200.0), 0.06}};  // tailing
  for (const SimulatedPeak& other : others) {
    const Peak peak = with(other);
    EXPECT_FALSE(peak.shape_passed);
    EXPECT_TRUE(peak.area_instead);
    EXPECT_FALSE(peak.template_response);
    EXPECT_TRUE(has_reason(peak, "shape-differs"));
  }
}

TEST_F(Shapes, AHiddenNeighbourDoesNotPass) {
  SimulatedTrace wanted = night_.wanted_for(area_of_height(100.0));
  wanted.peaks.push_back({5.08, 0.05, area_of_height(50.0), 0.0});
  const Peak peak = night_.measured(simulate_trace(wanted, night_.stream()),
                                    night_.blank_noise());
  EXPECT_TRUE(peak.area_instead);
}

TEST_F(Shapes, ASpikeDoesNotPass) {
  Trace trace = night_.trace_of(0.0);
  const auto at =
      std::lower_bound(trace.minutes.begin(), trace.minutes.end(), 5.02) -
      trace.minutes.begin();
  trace.signal[static_cast<std::size_t>(at)] += 60.0;
  EXPECT_TRUE(night_.measured(trace, night_.blank_noise()).area_instead);
}

// A slightly misplaced apex is no other shape: at the expected time, a tenth
// of a width off, a low peak still passes.
TEST_F(Shapes, ALowPeakALittleOffPasses) {
  const Peak peak = with({5.01, 0.05, area_of_height(8.0), 0.0});
  EXPECT_TRUE(peak.shape_passed);
}

TEST_F(Shapes, ScaleAndOffsetOfTheSignalFollowExactly) {
  Trace trace = night_.trace_of(area_of_height(20.0));
  const auto one = night_.measured(trace, night_.blank_noise());
  ASSERT_TRUE(one.template_response);
  for (double& y : trace.signal) y += 5000.0;
  const auto shifted = night_.measured(trace, night_.blank_noise());
  ASSERT_TRUE(shifted.template_response);
  EXPECT_TRUE(within_condition(*shifted.template_response,
                               *one.template_response, 1e7));
}

// Noise of zero is legal: the template fits a clean trace exactly, and the
// response of a clean blank is zero.
TEST_F(Shapes, ATraceWithoutNoiseIsMeasured) {
  const Peak clean = night_.measure_clean(area_of_height(100.0));
  ASSERT_TRUE(clean.template_response);
  EXPECT_LE(std::abs(*clean.template_response / area_of_height(100.0) - 1.0),
            0.01);
  const Peak blank = night_.measure_clean(0.0);
  ASSERT_TRUE(blank.template_response);
  EXPECT_LE(std::abs(*blank.template_response), 1e-10 * area_of_height(100.0));
}

TEST_F(Shapes, TheFigureShowsTheFit) {
  SimulatedTrace wanted = night_.wanted_for(area_of_height(100.0));
  wanted.white_noise = 0.0;
  const Trace trace = simulate_trace(wanted, night_.stream());
  const Peak peak = night_.measured(trace, test::no_noise());
  ASSERT_TRUE(peak.template_response);
  const PeakCurve curve =
      test::curve_of(trace, night_.target(), night_.window(), 5.0,
                     test::no_noise());
  EXPECT_TRUE(curve.fit_stands);
  ASSERT_GE(curve.fitted.size(), 30U);
  for (std::size_t i = 0; i < curve.fitted.size(); ++i) {
    const double t = curve.fitted_minutes[i];
    const double truth = interpolate(trace.minutes, trace.signal, t);
    // The shape was learned from peaks of 200 to 600 times the noise.
    EXPECT_LE(std::abs(curve.fitted[i] - truth), 1.0) << t;
  }
}

TEST_F(Shapes, UnevenTimesGiveTheSameResponse) {
  SimulatedTrace wanted = night_.wanted_for(area_of_height(100.0));
  wanted.white_noise = 0.0;
  wanted.jitter = 0.4;
  const double even =
      *night_.measure_clean(area_of_height(100.0)).template_response;
  for (int i = 0; i < 20; ++i) {
    const Peak peak = night_.measured(simulate_trace(wanted, night_.stream()),
                                      test::no_noise());
    EXPECT_LE(std::abs(peak.template_response.value_or(peak.area) / even - 1.0),
              0.01);
  }
}

// Odd traces: whatever comes, finite numbers or a reason.
TEST_F(Shapes, AnyTraceGivesFiniteNumbersOrAReason) {
  RandomStream& stream = night_.stream();
  int fitted = 0;
  for (int i = 0; i < 500; ++i) {
    Trace trace;
    const int points = static_cast<int>(stream.uniform() * 150.0);
    const bool wild = i % 2 == 0;
    double t = 4.0 + stream.uniform();
    for (int k = 0; k < points; ++k) {
      t += stream.uniform() < 0.1 ? 0.3 * stream.uniform() : 0.02;
      trace.minutes.push_back(t);
      trace.signal.push_back(wild ? std::exp(3.0 * stream.normal())
                                  : std::round(0.6 * stream.normal()));
    }
    const auto seen = observe_teacher(trace, by_template(), 1, Role::Standard);
    if (seen) learn_template({*seen});
    const auto peak = measure_peak(trace, night_.target(), night_.window(), 5.0,
                                   night_.blank_noise(), "blank 1");
    if (!peak) continue;
    EXPECT_NE(peak->template_response.has_value(), peak->area_instead);
    EXPECT_EQ(peak->template_response.has_value(), peak->shape_passed);
    if (!peak->template_response) continue;
    EXPECT_TRUE(std::isfinite(*peak->template_response));
    ++fitted;
  }
  EXPECT_GE(fitted, 20);
}

TEST(TypicalNoise, MediansOfWhatTheBlanksShow) {
  EXPECT_TRUE(test::same_bits(typical_noise({}).variance(), 0.0));
  const NoiseModel white =
      typical_noise({white_noise(1.0), white_noise(3.0), white_noise(2.0)});
  EXPECT_TRUE(test::same_bits(white.white_variance, 4.0));
  EXPECT_TRUE(test::same_bits(white.creeping_variance, 0.0));
  const NoiseModel mixed = typical_noise(
      {{1.0, 3.0, 0.5}, {2.0, 2.0, 0.9}, {3.0, 1.0, 0.7}, {0.0, 0.0, 0.0}});
  EXPECT_TRUE(test::same_bits(mixed.white_variance, 2.0));
  EXPECT_TRUE(test::same_bits(mixed.creeping_variance, 2.0));
  EXPECT_TRUE(test::same_bits(mixed.correlation, 0.7));
}

}  // namespace
}  // namespace loqsmith
