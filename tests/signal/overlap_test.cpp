#include <gtest/gtest.h>

#include <cmath>
#include <vector>

#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/signal/model_overlap.hpp"
#include "curve_support.hpp"
#include "overlap_support.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;
using test::has_reason;
using test::noise_of_blank;
using test::Pair;
using test::second_apex;
using test::simulate_trace;
using test::SimulatedTrace;
using test::target_with;
using test::taught_alone;
using test::taught_by;
using test::trace_of;
using test::within_sampling_error;
using Overlap = IntegrationSettings::Overlap;

Outcome<Peak> measured(const Trace& trace, const Pair& pair, Overlap overlap,
                       const WindowTemplate& window, double minutes = 5.0) {
  return measure_peak(trace, target_with(overlap, minutes), window, minutes,
                      noise_of_blank(pair, window.width_half_minutes),
                      "blank 1");
}

Outcome<Peak> measured(const Pair& pair, Overlap overlap,
                       double minutes = 5.0) {
  return measured(simulate_trace(trace_of(pair), "the pair"), pair, overlap,
                  taught_alone(pair, overlap), minutes);
}

TEST(Overlap, StandardsTeachSigmaAndTauForModelOnly) {
  const Pair pair;
  const WindowTemplate window = taught_alone(pair, Overlap::Model);
  // Height 2000 noise deviations: sigma is known to some 0.1 %.
  EXPECT_TRUE(agrees_to_digits(window.sigma_minutes, 0.05, 2));
  EXPECT_TRUE(agrees_to_digits(window.tau_minutes, 0.02, 2));
  EXPECT_EQ(taught_alone(pair, Overlap::Drop).sigma_minutes, 0.0);
}

TEST(Overlap, StandardsAloneTeachTheSameWindowToAll) {
  const Pair pair;
  const WindowTemplate drop = taught_alone(pair, Overlap::Drop);
  for (const Overlap overlap : {Overlap::Skim, Overlap::Model}) {
    const WindowTemplate other = taught_alone(pair, overlap);
    EXPECT_TRUE(test::same_bits(other.left_minutes, drop.left_minutes));
    EXPECT_TRUE(test::same_bits(other.right_minutes, drop.right_minutes));
    EXPECT_TRUE(
        test::same_bits(other.width_half_minutes, drop.width_half_minutes));
  }
}

TEST(Overlap, FusedStandardsTeachAWholeWindow) {
  Pair pair;
  pair.resolution = 0.7;
  pair.first_height = pair.second_height = 2000.0;
  const Trace trace = simulate_trace(trace_of(pair), "the standard");
  const auto fused = taught_by(trace, target_with(Overlap::Model, 5.0));
  ASSERT_TRUE(fused) << fused.reason();
  const WindowTemplate alone = taught_alone(pair, Overlap::Model);
  EXPECT_TRUE(fused->weak);
  EXPECT_TRUE(agrees_to_digits(fused->sigma_minutes, 0.05, 2));
  EXPECT_LT(std::abs(fused->width_half_minutes - alone.width_half_minutes),
            0.01 * alone.width_half_minutes);
  // The valley stands at 0.08 minutes: the foot is the fitted peak's.
  EXPECT_GT(fused->right_minutes, 0.9 * alone.right_minutes);
}

TEST(Overlap, WithoutANeighbourAllMeasureTheSame) {
  Pair pair;
  pair.second_height = 0.0;
  const WindowTemplate window = taught_alone(pair, Overlap::Model);
  const Trace trace = simulate_trace(trace_of(pair), "alone");
  const auto drop = measured(trace, pair, Overlap::Drop, window);
  ASSERT_TRUE(drop);
  EXPECT_EQ(drop->overlap, "");
  for (const Overlap overlap : {Overlap::Skim, Overlap::Model}) {
    const auto other = measured(trace, pair, overlap, window);
    ASSERT_TRUE(other);
    EXPECT_EQ(other->overlap, "");
    EXPECT_TRUE(test::same_bits(other->area, drop->area));
    EXPECT_TRUE(test::same_bits(*other->response_noise, *drop->response_noise));
  }
}

TEST(Overlap, ModelFindsAreaHeightAndTimeOfAPeakAlone) {
  Pair pair;
  pair.noise = 0.0;
  pair.second_height = 500.0;
  const auto fused = measured(pair, Overlap::Model);
  pair.second_height = 0.0;
  const auto alone = measured(pair, Overlap::Model);
  ASSERT_TRUE(fused && alone);
  EXPECT_EQ(fused->overlap, "model");
  EXPECT_TRUE(has_reason(*fused, "overlapped"));
  EXPECT_FALSE(has_reason(*fused, "model-misfit"));
  // What differs is the 0.1 % of the peak in the baseline beside its feet.
  EXPECT_LT(std::abs(fused->area - alone->area), 0.003 * alone->area);
  EXPECT_LT(std::abs(fused->height - 100.0), 0.1);
  EXPECT_LT(std::abs(fused->retention_minutes - 5.0), 1e-4);
  EXPECT_LT(std::abs(*fused->width_half_minutes - *alone->width_half_minutes),
            0.003 * *alone->width_half_minutes);
  EXPECT_LT(std::abs(*fused->tailing - *alone->tailing), 0.01);
}

TEST(Overlap, ModelTakesABlankBesideANeighbourToZero) {
  Pair pair;
  pair.first_height = 0.0;
  pair.second_height = 500.0;
  pair.resolution = 0.9;
  const WindowTemplate window = taught_alone(pair, Overlap::Model);
  RandomStream stream("blanks beside a neighbour");
  std::vector<double> areas;
  std::vector<double> predicted;
  for (int i = 0; i < 200; ++i) {
    const auto peak = measured(simulate_trace(trace_of(pair), stream), pair,
                               Overlap::Model, window);
    ASSERT_TRUE(peak);
    EXPECT_FALSE(peak->found);
    EXPECT_EQ(peak->overlap, "model");
    areas.push_back(peak->area);
    predicted.push_back(*peak->response_noise);
  }
  const double sd = standard_deviation(areas);
  EXPECT_TRUE(within_sampling_error(mean(areas), sd, areas.size(), 0.0));
  // The noise that is predicted is the noise that is seen: the standard error
  // of a standard deviation of n values is sd / sqrt(2 n).
  EXPECT_TRUE(within_sampling_error(sd, sd / std::sqrt(2.0), areas.size(),
                                    mean(predicted)));
}

TEST(Overlap, AFitThatFailsIsSaidAndTheDropStands) {
  // A box is no peak of the model; next to it nothing can be fitted soundly.
  Pair pair;
  pair.second_height = 0.0;
  const WindowTemplate window = taught_alone(pair, Overlap::Model);
  Trace trace = simulate_trace(trace_of(pair), "box");
  for (std::size_t i = 0; i < trace.minutes.size(); ++i) {
    const double out = trace.minutes[i] - 5.16;
    if (out >= 0.0 && out < 1.2) trace.signal[i] += 3000.0 * (1.3 - out);
  }
  const auto model = measured(trace, pair, Overlap::Model, window);
  const auto drop = measured(trace, pair, Overlap::Drop, window);
  ASSERT_TRUE(model && drop);
  EXPECT_TRUE(has_reason(*model, "model-not-converged"));
  EXPECT_EQ(model->overlap, "drop");
  EXPECT_TRUE(test::same_bits(model->area, drop->area));
}

TEST(Overlap, PeaksThatDoNotLookLikeTheModelAreSaid) {
  Pair pair;
  pair.first_height = 300.0;
  pair.second_height = 3000.0;
  const WindowTemplate window = taught_alone(pair, Overlap::Model);
  SimulatedTrace wanted = trace_of(pair);
  // The neighbour is two peaks in one.
  wanted.peaks.push_back(wanted.peaks[1]);
  wanted.peaks.back().minutes += 0.09;
  const auto peak = measured(simulate_trace(wanted, "two in one"), pair,
                             Overlap::Model, window);
  ASSERT_TRUE(peak);
  EXPECT_TRUE(has_reason(*peak, "model-misfit") ||
              has_reason(*peak, "model-not-converged"));
}

TEST(Overlap, AnUnknownShapeIsSaid) {
  Pair pair;
  pair.resolution = 0.8;
  WindowTemplate window = taught_alone(pair, Overlap::Model);
  window.sigma_minutes = 0.0;
  const auto peak = measured(simulate_trace(trace_of(pair), "pair"), pair,
                             Overlap::Model, window);
  ASSERT_TRUE(peak);
  EXPECT_EQ(peak->overlap, "model");
  EXPECT_TRUE(has_reason(*peak, "model-shape-assumed"));
}

TEST(Overlap, OnlyMuchLowerPeaksAreSkimmed) {
  Pair pair;
  EXPECT_EQ(measured(pair, Overlap::Skim)->overlap, "drop");
  pair.first_height = 2000.0;
  pair.resolution = 1.4;
  EXPECT_EQ(measured(pair, Overlap::Skim, second_apex(pair))->overlap, "skim");
  EXPECT_EQ(measured(pair, Overlap::Skim)->overlap, "skim");
}

// A rider on a long tail: the line cuts off what lies between the valley and
// the touching point; what the rider loses the parent gains.
TEST(Overlap, RiderAndParentShareWhatDropShares) {
  Pair pair;
  pair.noise = 0.0;
  pair.tau = 0.06;
  pair.first_height = 2000.0;
  pair.resolution = 1.5;
  const double at = second_apex(pair);
  const auto parent = measured(pair, Overlap::Skim);
  const auto rider = measured(pair, Overlap::Skim, at);
  const auto parent_drop = measured(pair, Overlap::Drop);
  const auto rider_drop = measured(pair, Overlap::Drop, at);
  ASSERT_TRUE(parent && rider && parent_drop && rider_drop);
  EXPECT_EQ(rider->overlap, "skim");
  EXPECT_GT(rider->area, 0.0);
  EXPECT_LT(rider->area, rider_drop->area);
  EXPECT_GT(parent->area, parent_drop->area);
}

TEST(Overlap, CurveShowsTheSkimmingLine) {
  Pair pair;
  pair.noise = 0.0;
  pair.tau = 0.06;
  pair.first_height = 2000.0;
  pair.resolution = 1.5;
  const double at = second_apex(pair);
  const Trace trace = simulate_trace(trace_of(pair), "tail");
  const WindowTemplate window = taught_alone(pair, Overlap::Skim);
  const auto rider = measured(trace, pair, Overlap::Skim, window, at);
  ASSERT_TRUE(rider);
  const PeakCurve curve =
      test::curve_of(trace, target_with(Overlap::Skim, at), window, at,
                     noise_of_blank(pair, window.width_half_minutes));
  // The line leaves the trace where the window begins, to within the mean of
  // the points about it.
  const double there =
      interpolate(trace.minutes, trace.signal, rider->start_minutes);
  EXPECT_LT(std::abs(curve.baseline_start - there), 0.02 * rider->height);
  const double truth = 20.0 + 2.0 * (rider->start_minutes - 7.0);
  EXPECT_GT(curve.baseline_start, truth + 0.5 * (there - truth));
}

TEST(Overlap, ABlankOnASteepFlankIsNotSkimmed) {
  Pair pair;
  pair.first_height = 2000.0;
  pair.second_height = 0.0;
  pair.resolution = 0.8;
  const auto blank = measured(pair, Overlap::Skim, second_apex(pair));
  ASSERT_TRUE(blank);
  EXPECT_FALSE(blank->found);
  EXPECT_EQ(blank->overlap, "drop");
}

TEST(Overlap, SkimAndModelNeedAStraightBaseline) {
  const Pair pair;
  TargetSettings target = target_with(Overlap::Model, 5.0);
  target.integration.baseline = IntegrationSettings::Baseline::Snip;
  const auto peak = measure_peak(simulate_trace(trace_of(pair), "snip"), target,
                                 taught_alone(pair, Overlap::Model), 5.0,
                                 test::no_noise(), "");
  ASSERT_FALSE(peak);
  EXPECT_TRUE(test::begins_with(peak.reason(), "not-available"));
}

}  // namespace
}  // namespace loqsmith
