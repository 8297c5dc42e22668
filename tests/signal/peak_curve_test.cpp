#include "loqsmith/signal/peak_curve.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <vector>

#include "loqsmith/signal/measure_peak.hpp"
#include "loqsmith/signal/peak_working.hpp"
#include "one_peak.hpp"
#include "overlap_support.hpp"
#include "support/tolerance.hpp"
#include "template_night.hpp"

// What figures draw must be what was measured.

namespace loqsmith {
namespace {

using test::agrees_to_digits;
using test::same_bits;
using test::within_condition;
using Overlap = IntegrationSettings::Overlap;

double baseline_between_feet(const PeakCurve& curve, const Peak& peak,
                             double t) {
  return curve.baseline_start + (curve.baseline_end - curve.baseline_start) *
                                    (t - peak.start_minutes) /
                                    (peak.end_minutes - peak.start_minutes);
}

// Trapezoids of signal minus drawn baseline over the window.
double drawn_area(const PeakCurve& curve, const Peak& peak) {
  const auto above = [&](double t) {
    return interpolate(curve.minutes, curve.signal, t) -
           baseline_between_feet(curve, peak, t);
  };
  std::vector<double> times{peak.start_minutes};
  for (const double t : curve.minutes) {
    if (t > peak.start_minutes && t < peak.end_minutes) times.push_back(t);
  }
  times.push_back(peak.end_minutes);
  double area = 0.0;
  for (std::size_t i = 0; i + 1 < times.size(); ++i) {
    area += 0.5 * (times[i + 1] - times[i]) *
            (above(times[i]) + above(times[i + 1]));
  }
  return area;
}

WorkedPeak worked(const Trace& trace) {
  return measure_peak_with_working(trace, test::target_at(5.0), test::kWindow,
                                   5.0, test::blank_noise(), "blank 2");
}

TEST(PeakCurve, TheDrawnAreaIsTheMeasuredOne) {
  for (const double height : {0.0, 5.0, 300.0}) {
    test::SimulatedTrace wanted = test::sample(height);
    wanted.offset = 40.0;
    wanted.drift_per_minute = 3.0;
    const WorkedPeak seen = worked(simulate_trace(wanted, "area"));
    ASSERT_TRUE(seen.peak);
    const PeakCurve curve = peak_curve(*seen.peak, seen.working, test::kWindow);
    EXPECT_TRUE(
        within_condition(drawn_area(curve, *seen.peak), seen.peak->area, 1e6));
    EXPECT_EQ(curve.fit, PeakCurve::Fit::None);
    EXPECT_TRUE(curve.residual.empty() && curve.baseline.empty());
  }
}

TEST(PeakCurve, TheWorkingChangesNothing) {
  const Trace trace = simulate_trace(test::sample(20.0), "working");
  const WorkedPeak seen = worked(trace);
  const auto plain = test::measured(trace);
  ASSERT_TRUE(seen.peak && plain);
  EXPECT_TRUE(same_bits(seen.peak->area, plain->area));
  EXPECT_TRUE(same_bits(seen.peak->height, plain->height));
  EXPECT_EQ(seen.peak->reasons, plain->reasons);
  EXPECT_EQ(seen.peak->noise_source, plain->noise_source);
  EXPECT_FALSE(worked(Trace{}).peak);
}

TEST(PeakCurve, FeetStandOutsideTheWindowAndHoldTheBaseline) {
  const WorkedPeak seen = worked(simulate_trace(test::sample(300.0), "feet"));
  ASSERT_TRUE(seen.peak);
  const PeakCurve curve = peak_curve(*seen.peak, seen.working, test::kWindow);
  ASSERT_EQ(curve.feet.size(), 2U);
  EXPECT_LE(curve.feet[0].to_minutes, seen.peak->start_minutes);
  EXPECT_GE(curve.feet[1].from_minutes, seen.peak->end_minutes);
  for (const CurveFoot& foot : curve.feet) {
    EXPECT_LT(foot.from_minutes, foot.to_minutes);
    // The drawn line, carried on, meets the mean of the points that hold it.
    const double middle = 0.5 * (foot.from_minutes + foot.to_minutes);
    EXPECT_TRUE(within_condition(
        baseline_between_feet(curve, *seen.peak, middle), foot.signal, 1e9));
  }
}

TEST(PeakCurve, AnUnsmoothedTraceHasNoSmoothedOne) {
  TargetSettings target = test::target_at(5.0);
  target.integration.smoothing_points = 1;
  const Trace trace = simulate_trace(test::sample(300.0), "raw");
  const WorkedPeak seen = measure_peak_with_working(
      trace, target, test::kWindow, 5.0, test::blank_noise(), "");
  ASSERT_TRUE(seen.peak);
  EXPECT_TRUE(
      peak_curve(*seen.peak, seen.working, test::kWindow).smoothed.empty());
}

class ModelCurve : public testing::Test {
 protected:
  ModelCurve() {
    pair_.noise = 0.0;
    pair_.second_height = 400.0;
    pair_.resolution = 0.9;
    window_ = test::taught_alone(pair_, Overlap::Model);
    seen_ = measure_peak_with_working(
        simulate_trace(test::trace_of(pair_), "model"),
        test::target_with(Overlap::Model, 5.0), window_, 5.0, test::no_noise(),
        "");
    if (seen_.peak) {
      curve_ = peak_curve(*seen_.peak, seen_.working, window_);
    }
  }

  test::Pair pair_;
  WindowTemplate window_;
  WorkedPeak seen_;
  PeakCurve curve_;
};

TEST_F(ModelCurve, PartsAndLineMakeTheFit) {
  ASSERT_TRUE(seen_.peak);
  ASSERT_EQ(seen_.peak->overlap, "model");
  ASSERT_EQ(curve_.fit, PeakCurve::Fit::Model);
  ASSERT_EQ(curve_.parts.size(), 2U);
  const std::size_t n = curve_.fitted.size();
  ASSERT_GT(n, 40U);
  ASSERT_EQ(curve_.residual.size(), n);
  for (std::size_t i = 0; i < n; ++i) {
    const double t = curve_.fitted_minutes[i];
    const double line = baseline_between_feet(curve_, *seen_.peak, t);
    EXPECT_TRUE(within_condition(curve_.parts[0][i] + curve_.parts[1][i] - line,
                                 curve_.fitted[i], 1e6));
    // Without noise two such peaks are fitted all but exactly.
    EXPECT_LT(std::abs(curve_.residual[i]), 0.005 * 400.0) << t;
  }
}

TEST_F(ModelCurve, TheFirstPartIsTheTargets) {
  ASSERT_EQ(curve_.parts.size(), 2U);
  const auto top =
      std::max_element(curve_.parts[0].begin(), curve_.parts[0].end());
  const double at = curve_.fitted_minutes[static_cast<std::size_t>(
      top - curve_.parts[0].begin())];
  EXPECT_LT(std::abs(at - seen_.peak->retention_minutes), 0.011);
  const double above = *top - baseline_between_feet(curve_, *seen_.peak, at);
  EXPECT_LT(std::abs(above / seen_.peak->height - 1.0), 0.01);
}

TEST(PeakCurve, ATemplateThatDoesNotFitIsDrawnAndSaid) {
  test::TemplateNight night(test::template_detector(1.0, 0.0), "misfit");
  test::SimulatedTrace wanted = night.wanted_for(test::area_of_height(300.0));
  wanted.peaks = {{5.0, 0.02, test::area_of_height(300.0), 0.0}};
  const WorkedPeak seen = measure_peak_with_working(
      simulate_trace(wanted, "narrow"), night.target(), night.window(), 5.0,
      night.blank_noise(), "blank 1");
  ASSERT_TRUE(seen.peak);
  ASSERT_TRUE(seen.peak->area_instead);
  const PeakCurve curve = peak_curve(*seen.peak, seen.working, night.window());
  EXPECT_EQ(curve.fit, PeakCurve::Fit::Template);
  EXPECT_FALSE(curve.fit_stands);
  EXPECT_GT(*std::max_element(curve.residual.begin(), curve.residual.end()),
            100.0);
}

TEST(CurveNoise, StretchesAreThoseThatWereMeasured) {
  const Trace blank = simulate_trace(test::sample(0.0), "noise");
  const NoiseSettings settings;
  const auto around = measure_noise(blank, 5.0, 0.1177, settings);
  ASSERT_TRUE(around);
  const CurveNoise drawn =
      curve_noise_around(blank, *around, settings, "blank 3");
  ASSERT_EQ(drawn.stretches.size(), 1U);
  EXPECT_TRUE(same_bits(drawn.stretches[0].first, around->start_minutes));
  EXPECT_TRUE(same_bits(drawn.stretches[0].second, around->end_minutes));
  // With drift kept h is what the band shows.
  EXPECT_TRUE(same_bits(drawn.high - drawn.low, around->peak_to_peak));
  EXPECT_TRUE(same_bits(drawn.peak_to_peak, around->peak_to_peak));
  EXPECT_EQ(drawn.source, "blank 3");
}

TEST(CurveNoise, BesideAPeakThereIsOneOnEitherSide) {
  const Trace trace = simulate_trace(test::sample(300.0), "beside");
  NoiseSettings settings;
  settings.source = NoiseSettings::Source::Baseline;
  const auto beside = measure_noise_beside(trace, 4.81, 5.19, 0.1177, settings);
  ASSERT_TRUE(beside);
  const CurveNoise drawn =
      curve_noise_beside(trace, 4.81, 5.19, 0.1177, *beside, settings);
  ASSERT_EQ(drawn.stretches.size(), 2U);
  EXPECT_LT(drawn.stretches[0].second, 4.81);
  EXPECT_GT(drawn.stretches[1].first, 5.19);
  EXPECT_TRUE(same_bits(drawn.stretches[0].first, beside->start_minutes));
  EXPECT_TRUE(same_bits(drawn.stretches[1].second, beside->end_minutes));
  EXPECT_TRUE(same_bits(drawn.high - drawn.low, beside->peak_to_peak));
  EXPECT_TRUE(curve_noise(*beside, settings, "blank 1").stretches.empty());
}

}  // namespace
}  // namespace loqsmith
