#include "loqsmith/signal/noise.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <vector>

#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/signal/noise_model.hpp"
#include "loqsmith/signal/point_noise.hpp"
#include "signal_support.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::simulate_trace;
using test::SimulatedTrace;
using test::within_condition;
using test::within_sampling_error;
using Measure = NoiseSettings::Measure;

NoiseEstimate with_figures(double peak_to_peak, double deviation) {
  NoiseEstimate noise;
  noise.peak_to_peak = peak_to_peak;
  noise.standard_deviation = deviation;
  return noise;
}

// Ph. Eur. 2.2.46: S/N = 2H/h.
TEST(Noise, RatioAsEachMeasureDefinesIt) {
  const NoiseEstimate noise = with_figures(4.0, 0.8);
  EXPECT_EQ(*signal_to_noise(50.0, noise, Measure::HalfPeakToPeak), 25.0);
  EXPECT_EQ(*signal_to_noise(50.0, noise, Measure::PeakToPeak), 12.5);
  EXPECT_EQ(*signal_to_noise(50.0, noise, Measure::StandardDeviation), 62.5);
  EXPECT_EQ(noise_figure(noise, Measure::HalfPeakToPeak), 4.0);
  EXPECT_EQ(noise_figure(noise, Measure::StandardDeviation), 0.8);
}

TEST(Noise, RatioToNoNoiseIsNotApplicable) {
  const auto ratio =
      signal_to_noise(50.0, with_figures(0.0, 0.0), Measure::PeakToPeak);
  ASSERT_FALSE(ratio);
  EXPECT_TRUE(test::begins_with(ratio.reason(), "noise-zero"));
}

// A line of slope 3 with +1 and -1 in turn: known by construction.
Trace zigzag() {
  Trace trace;
  for (int i = 0; i <= 1024; ++i) {
    const double t = i / 128.0;
    trace.minutes.push_back(t);
    trace.signal.push_back(3.0 * t + (i % 2 == 0 ? 1.0 : -1.0));
  }
  return trace;
}

TEST(Noise, DriftIsKeptOrRemoved) {
  NoiseSettings settings;
  const auto kept = measure_noise(zigzag(), 4.0, 0.25, settings);
  // 5 widths: from 3.375 to 4.625, both ends points of the same sign.
  ASSERT_TRUE(kept);
  EXPECT_EQ(kept->points, 161u);
  EXPECT_EQ(kept->start_minutes, 3.375);
  EXPECT_EQ(kept->end_minutes, 4.625);
  // Highest: the + at 4.625; lowest: the first -, one step after 3.375.
  EXPECT_TRUE(within_condition(kept->peak_to_peak,
                               3.0 * (1.25 - 1.0 / 128.0) + 2.0, 4.0));
  settings.drift = NoiseSettings::Drift::Removed;
  const auto removed = measure_noise(zigzag(), 4.0, 0.25, settings);
  ASSERT_TRUE(removed);
  // The least-squares line follows the drift; by symmetry its slope is 3.
  EXPECT_TRUE(within_condition(removed->peak_to_peak, 2.0, 200.0));
  // n values of +-1 with one + more than -: squares n - 1/n, over n - 2.
  EXPECT_TRUE(within_condition(removed->standard_deviation,
                               std::sqrt((161.0 - 1.0 / 161.0) / 159.0),
                               500.0));
}

TEST(Noise, SpanFollowsTheSetting) {
  NoiseSettings settings;
  settings.span_widths = 20.0;
  const auto noise = measure_noise(zigzag(), 4.0, 0.25, settings);
  ASSERT_TRUE(noise);
  EXPECT_EQ(noise->start_minutes, 1.5);
  EXPECT_EQ(noise->end_minutes, 6.5);
  EXPECT_TRUE(noise->reasons.empty());
}

TEST(Noise, StretchBeyondTheTraceIsSaid) {
  const auto noise = measure_noise(zigzag(), 7.8, 0.25, {});
  ASSERT_TRUE(noise);
  EXPECT_EQ(noise->reasons, std::vector<std::string>{"noise-stretch-short"});
  const auto beside = measure_noise_beside(zigzag(), 0.1, 7.9, 0.25, {});
  ASSERT_TRUE(beside);
  EXPECT_EQ(beside->reasons, std::vector<std::string>{"noise-stretch-short"});
}

TEST(Noise, FewerThanFivePointsGiveNone) {
  Trace trace;
  trace.minutes = {4.9, 4.95, 5.0, 5.05};
  trace.signal = {1, 2, 1, 2};
  const auto noise = measure_noise(trace, 5.0, 0.1, {});
  ASSERT_FALSE(noise);
  EXPECT_TRUE(test::begins_with(noise.reason(), "noise-stretch-short"));
  EXPECT_FALSE(measure_noise(Trace{}, 5.0, 0.1, {}));
  EXPECT_FALSE(measure_noise_beside(Trace{}, 4.9, 5.1, 0.1, {}));
}

TEST(Noise, ZeroIsLegal) {
  const Trace flat = simulate_trace({}, "flat");
  const auto noise = measure_noise(flat, 5.0, 0.1, {});
  ASSERT_TRUE(noise);
  EXPECT_EQ(noise->peak_to_peak, 0.0);
  EXPECT_EQ(noise->standard_deviation, 0.0);
  EXPECT_EQ(noise->model.variance(), 0.0);
}

TEST(Noise, DeviationIsNotSpoiledByASmallPeak) {
  SimulatedTrace wanted;
  wanted.white_noise = 1.0;
  SimulatedTrace with_peak = wanted;
  with_peak.peaks = {test::gaussian_of_height(5.0, 0.03, 12.0)};
  std::vector<double> clean;
  std::vector<double> spoiled;
  for (int i = 0; i < 200; ++i) {
    const std::string name = "noise " + std::to_string(i);
    NoiseSettings settings;
    settings.span_widths = 10.0;
    clean.push_back(
        measure_noise(simulate_trace(wanted, name), 5.0, 0.1, settings)
            ->standard_deviation);
    spoiled.push_back(
        measure_noise(simulate_trace(with_peak, name), 5.0, 0.1, settings)
            ->standard_deviation);
  }
  // 101 points: a deviation's own relative deviation is 1/sqrt(198). The cut
  // at 3.5 standard deviations costs 0.3 %, the mean of s another 0.25 %.
  EXPECT_TRUE(within_sampling_error(mean(clean), 0.0711, 200, 0.9945));
  // The flanks of the peak below the cut are left; without the cut the
  // deviation would be 2.6.
  EXPECT_LT(mean(spoiled), 1.25);
}

// Expected range of n normal values (d2 of quality control): n = 20 3.734950,
// n = 100 5.015187.
TEST(Noise, PeakToPeakOfWhiteNoiseHasTheExpectedRange) {
  RandomStream stream("ranges");
  std::vector<double> ranges;
  for (int i = 0; i < 400; ++i) {
    Trace trace;
    for (int k = 0; k < 100; ++k) {
      trace.minutes.push_back(0.01 * k);
      trace.signal.push_back(stream.normal());
    }
    const auto noise = measure_noise(trace, 0.495, 0.2, {});
    ASSERT_EQ(noise->points, 100u);
    ranges.push_back(noise->peak_to_peak);
  }
  EXPECT_TRUE(within_sampling_error(mean(ranges), standard_deviation(ranges),
                                    ranges.size(), 5.015187));
}

TEST(Noise, BesideSkipsThePeakAndItsNeighbours) {
  SimulatedTrace wanted;
  wanted.white_noise = 1.0;
  wanted.peaks = {test::gaussian_of_height(5.0, 0.04, 500.0),
                  test::gaussian_of_height(5.4, 0.04, 300.0),
                  test::gaussian_of_height(4.5, 0.04, 50.0)};
  std::vector<double> deviations;
  for (int i = 0; i < 100; ++i) {
    const Trace trace = simulate_trace(wanted, "crowd " + std::to_string(i));
    const auto noise = measure_noise_beside(trace, 4.85, 5.15, 0.094, {});
    ASSERT_TRUE(noise);
    EXPECT_TRUE(noise->reasons.empty());
    deviations.push_back(noise->standard_deviation);
  }
  // 47 points; mean of s lower by 1/(4 x 45) and 0.3 % for the cut.
  EXPECT_TRUE(within_sampling_error(mean(deviations), 0.105, 100, 0.991));
}

TEST(Noise, PointToPointNoiseIgnoresPeaksAndDrift) {
  SimulatedTrace wanted;
  wanted.white_noise = 1.0;
  wanted.drift_per_minute = 50.0;
  wanted.peaks = {test::gaussian_of_height(5.0, 0.1, 500.0)};
  std::vector<double> found;
  for (int i = 0; i < 50; ++i) {
    found.push_back(point_to_point_noise(
        simulate_trace(wanted, "steps " + std::to_string(i)).signal));
  }
  EXPECT_TRUE(within_sampling_error(mean(found), standard_deviation(found),
                                    found.size(), 1.0, 4.0));
}

TEST(NoiseModel, FindsIndependentAndCreepingParts) {
  SimulatedTrace wanted;
  wanted.end_minutes = 100.0;
  wanted.step_minutes = 0.05;
  wanted.white_noise = 1.0;
  wanted.creeping_noise = 2.0;
  wanted.creep = 0.9;
  std::vector<double> white;
  std::vector<double> creeping;
  std::vector<double> correlation;
  for (int i = 0; i < 20; ++i) {
    const Trace trace = simulate_trace(wanted, "model " + std::to_string(i));
    const NoiseModel model = fit_noise_model(trace, 50.0, 50.0, 4.9);
    white.push_back(model.white_variance);
    creeping.push_back(model.creeping_variance);
    correlation.push_back(model.correlation);
  }
  EXPECT_TRUE(
      within_sampling_error(mean(white), standard_deviation(white), 20, 1.0));
  EXPECT_TRUE(within_sampling_error(mean(creeping),
                                    standard_deviation(creeping), 20, 4.0));
  EXPECT_TRUE(within_sampling_error(mean(correlation),
                                    standard_deviation(correlation), 20, 0.9));
}

TEST(NoiseModel, LeavesOutCreepThatIsNotThere) {
  SimulatedTrace wanted;
  wanted.white_noise = 3.0;
  wanted.end_minutes = 200.0;
  wanted.step_minutes = 0.05;
  const Trace trace = simulate_trace(wanted, "white alone");
  const NoiseModel model = fit_noise_model(trace, 100.0, 100.0, 9.5);
  EXPECT_EQ(model.creeping_variance, 0.0);
  // 3800 points: the variance is known to sqrt(2/3800).
  EXPECT_TRUE(
      within_sampling_error(model.white_variance, 9.0 * 1.4142, 3800, 9.0));
}

TEST(NoiseModel, IsWhiteWherePointsAreFew) {
  Trace trace;
  for (int i = 0; i < 12; ++i) {
    trace.minutes.push_back(0.01 * i);
    trace.signal.push_back(i % 2);
  }
  const NoiseModel model = fit_noise_model(trace, 0.05, 0.05, 0.02);
  EXPECT_EQ(model.creeping_variance, 0.0);
  EXPECT_GT(model.white_variance, 0.0);
}

// 21 points of weight 1, and as much taken off by the mean of 20 others:
// sqrt(21 + 21^2/20). Propagation of independent noise.
TEST(NoiseModel, SpreadOfASumLessItsBaseline) {
  std::vector<double> weights(20, -21.0 / 20.0);
  weights.insert(weights.end(), 21, 1.0);
  EXPECT_TRUE(within_condition(weighted_noise(weights, white_noise(1.0)),
                               std::sqrt(43.05), 40.0));
}

TEST(NoiseModel, SpreadAgreesWithTheDoubleSum) {
  const NoiseModel noise{0.7, 2.3, 0.85};
  std::vector<double> weights;
  for (int i = 0; i < 40; ++i) weights.push_back(std::sin(0.9 * i) + 0.2);
  double variance = 0.0;
  double size = 0.0;
  for (int i = 0; i < 40; ++i) {
    for (int j = 0; j < 40; ++j) {
      const double r = i == j
                           ? noise.variance()
                           : noise.creeping_variance *
                                 std::pow(noise.correlation, std::abs(i - j));
      const double term = weights[static_cast<std::size_t>(i)] *
                          weights[static_cast<std::size_t>(j)] * r;
      variance += term;
      size += std::abs(term);
    }
  }
  const double found = weighted_noise(weights, noise);
  EXPECT_TRUE(within_condition(found * found, variance, 40.0, size));
}

TEST(NoiseModel, PointToPointNoiseOfTheModelIsWhatIsSeen) {
  SimulatedTrace wanted;
  wanted.end_minutes = 400.0;
  wanted.creeping_noise = 2.0;
  wanted.creep = 0.8;
  const double found =
      point_to_point_noise(simulate_trace(wanted, "creeping").signal);
  const NoiseModel model{0.0, 4.0, 0.8};
  // A deviation from n median absolute differences: 1.17 s / sqrt(n), and
  // third differences overlap by 4 points.
  EXPECT_TRUE(within_sampling_error(found, 2.0 * 1.17 * model.point_to_point(),
                                    40000, model.point_to_point()));
}

}  // namespace
}  // namespace loqsmith
