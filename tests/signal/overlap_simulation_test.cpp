#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <string>
#include <vector>

#include "exact_pair.hpp"
#include "loqsmith/numerics/least_squares.hpp"
#include "loqsmith/numerics/mean.hpp"
#include "overlap_support.hpp"
#include "support/tolerance.hpp"

// What two overlapped peaks give over many noisy traces, against what theory
// says. The smaller peak stands at 100 noise standard deviations.

namespace loqsmith {
namespace {

using test::ExactPair;
using test::modified_gaussian;
using test::noise_of_blank;
using test::Pair;
using test::second_apex;
using test::simulate_trace;
using test::SimulatedPeak;
using test::SimulatedTrace;
using test::target_with;
using test::taught_alone;
using test::trace_of;
using test::within_sampling_error;
using Overlap = IntegrationSettings::Overlap;

constexpr int kTraces = 500;

struct Statistics {
  double mean = 0.0;
  double sd = 0.0;
  double predicted = 0.0;  // mean of the response noise
  int parted = 0;          // traces that were skimmed or modelled
};

// Both peaks of the same traces.
struct Both {
  Statistics first;
  Statistics second;
};

Statistics statistics(const std::vector<Peak>& peaks, const char* word) {
  std::vector<double> areas;
  std::vector<double> predicted;
  Statistics result;
  for (const Peak& peak : peaks) {
    areas.push_back(peak.area);
    predicted.push_back(*peak.response_noise);
    if (peak.overlap == word) ++result.parted;
  }
  result.mean = mean(areas);
  result.sd = standard_deviation(areas);
  result.predicted = mean(predicted);
  return result;
}

Both simulate(const Pair& pair, Overlap overlap, const char* word,
              const WindowTemplate& window) {
  const auto noise = noise_of_blank(pair, window.width_half_minutes);
  const double times[] = {5.0, second_apex(pair)};
  const SimulatedTrace wanted = trace_of(pair);
  RandomStream stream("overlapped pairs");
  std::vector<Peak> peaks[2];
  for (int i = 0; i < kTraces; ++i) {
    const Trace trace = simulate_trace(wanted, stream);
    for (int k = 0; k < 2; ++k) {
      const auto peak = measure_peak(trace, target_with(overlap, times[k]),
                                     window, times[k], noise, "blank 1");
      EXPECT_TRUE(peak && peak->found) << i;
      if (peak) peaks[k].push_back(*peak);
    }
  }
  return {statistics(peaks[0], word), statistics(peaks[1], word)};
}

Both simulate(const Pair& pair, Overlap overlap, const char* word) {
  return simulate(pair, overlap, word, taught_alone(pair, overlap));
}

Pair one_to_five() {
  Pair pair;
  pair.second_height = 500.0;
  return pair;
}

Pair fused_equals() {
  Pair pair;
  pair.resolution = 0.7;
  return pair;
}

// The least standard deviation of an unbiased estimate of each area where
// areas, times, a straight line and `own` shapes (sigma and tau) are unknown:
// Cramer and Rao's bound for independent normal noise,
// sqrt of the diagonal of s^2 (J'J)^-1, with J by differences of the
// simulator's own peaks over the same points.
std::vector<double> least_deviations(const Pair& pair,
                                     const std::vector<bool>& own) {
  const SimulatedTrace wanted = trace_of(pair);
  // The points of the fit: up to the baseline's points beyond both peaks.
  const WindowTemplate window = taught_alone(pair, Overlap::Model);
  const double width = window.width_half_minutes;
  const double from = 5.0 - std::max(window.left_minutes, 1.7 * width);
  const double to =
      second_apex(pair) + std::max(window.right_minutes, 1.7 * width);
  std::vector<double> times;
  for (double t = 0.0; t <= to + 0.5 * width; t += wanted.step_minutes) {
    if (t >= from - 0.5 * width) times.push_back(t);
  }
  std::vector<std::vector<double>> columns{
      std::vector<double>(times.size(), 1.0), times};
  const auto add = [&](const SimulatedPeak& peak, double SimulatedPeak::*which,
                       double step) {
    SimulatedPeak less = peak;
    SimulatedPeak more = peak;
    less.*which -= step;
    more.*which += step;
    std::vector<double> column;
    for (const double t : times) {
      const auto signal = [&](const SimulatedPeak& one) {
        return one.area * modified_gaussian(t, one.minutes, one.sigma, one.tau);
      };
      column.push_back((signal(more) - signal(less)) / (2.0 * step));
    }
    columns.push_back(column);
  };
  std::vector<std::size_t> areas;
  for (std::size_t k = 0; k < 2; ++k) {
    areas.push_back(columns.size());
    add(wanted.peaks[k], &SimulatedPeak::area, 1.0);
    add(wanted.peaks[k], &SimulatedPeak::minutes, 1e-5);
    if (!own[k]) continue;
    add(wanted.peaks[k], &SimulatedPeak::sigma, 1e-5);
    add(wanted.peaks[k], &SimulatedPeak::tau, 1e-5);
  }
  // Any values serve: only the design's (J'J)^-1 is wanted.
  std::vector<double> values(times.size(), 0.0);
  values[0] = 1.0;
  const auto fit = fit_columns(columns, values);
  std::vector<double> least;
  for (const std::size_t index : areas) {
    least.push_back(wanted.white_noise * fit->standard_errors[index] /
                    fit->residual_sd);
  }
  return least;
}

void expect_unbiased(const Statistics& found, double truth, double share) {
  const double error = found.sd / std::sqrt(static_cast<double>(kTraces));
  EXPECT_LT(std::abs(found.mean - truth), share * truth + 3.0 * error)
      << "bias " << 100.0 * (found.mean / truth - 1.0) << " %";
}

// The standard error of a standard deviation of n values is sd / sqrt(2 n).
void expect_near_bound(const Statistics& found, double bound) {
  EXPECT_LT(found.sd, 1.5 * bound * (1.0 + 3.0 / std::sqrt(2.0 * kTraces)))
      << "ratio to the bound " << found.sd / bound;
}

// For whoever wants the figures.
void keep_figures(const Both& found, const SimulatedTrace& wanted,
                  const std::vector<double>& least) {
  const Statistics* both[] = {&found.first, &found.second};
  for (std::size_t k = 0; k < 2; ++k) {
    const std::string peak = k == 0 ? "first_" : "second_";
    const double bias = both[k]->mean / wanted.peaks[k].area - 1.0;
    testing::Test::RecordProperty(peak + "bias_percent",
                                  std::to_string(100.0 * bias));
    testing::Test::RecordProperty(peak + "sd_over_bound",
                                  std::to_string(both[k]->sd / least[k]));
  }
}

void expect_predicted(const Statistics& found) {
  EXPECT_TRUE(within_sampling_error(found.sd, found.sd / std::sqrt(2.0),
                                    kTraces, found.predicted));
}

TEST(OverlapSimulation, ModelAtResolutionOneAndOneToFive) {
  const Pair pair = one_to_five();
  const Both found = simulate(pair, Overlap::Model, "model");
  const SimulatedTrace wanted = trace_of(pair);
  EXPECT_EQ(found.first.parted, kTraces);
  EXPECT_EQ(found.second.parted, kTraces);
  expect_unbiased(found.first, wanted.peaks[0].area, 0.03);
  expect_unbiased(found.second, wanted.peaks[1].area, 0.03);
  // The higher peak stands clear and tells its own shape.
  const std::vector<double> least = least_deviations(pair, {false, true});
  expect_near_bound(found.first, least[0]);
  expect_near_bound(found.second, least[1]);
  keep_figures(found, wanted, least);
  expect_predicted(found.first);
  expect_predicted(found.second);
}

TEST(OverlapSimulation, ModelAtResolutionSevenTenthsAndEqualHeights) {
  const Pair pair = fused_equals();
  const Both found = simulate(pair, Overlap::Model, "model");
  const SimulatedTrace wanted = trace_of(pair);
  EXPECT_EQ(found.first.parted, kTraces);
  EXPECT_EQ(found.second.parted, kTraces);
  expect_unbiased(found.first, wanted.peaks[0].area, 0.05);
  expect_unbiased(found.second, wanted.peaks[1].area, 0.05);
  // Neither tells its own shape: both have the standards'.
  const std::vector<double> least = least_deviations(pair, {false, false});
  expect_near_bound(found.first, least[0]);
  expect_near_bound(found.second, least[1]);
  keep_figures(found, wanted, least);
  expect_predicted(found.first);
  expect_predicted(found.second);
}

// Without a tail tau is hardly to be told from zero, and its sign not at all:
// the fit must come to rest all the same.
TEST(OverlapSimulation, ModelComesToRestForGaussians) {
  Pair pair = one_to_five();
  pair.tau = 0.0;
  pair.first_height = 300.0;
  pair.second_height = 15000.0;
  pair.resolution = 1.2;
  const Both found = simulate(pair, Overlap::Model, "model");
  const SimulatedTrace wanted = trace_of(pair);
  EXPECT_GE(found.first.parted, kTraces - kTraces / 100);
  EXPECT_GE(found.second.parted, kTraces - kTraces / 100);
  expect_unbiased(found.first, wanted.peaks[0].area, 0.03);
  expect_unbiased(found.second, wanted.peaks[1].area, 0.03);
}

// Where the standards are fused like the samples, they still teach the shape.
TEST(OverlapSimulation, ModelTaughtByFusedStandards) {
  const Pair pair = fused_equals();
  Pair standard = pair;
  standard.first_height = standard.second_height = 2000.0;
  const auto window =
      test::taught_by(simulate_trace(trace_of(standard), "the fused standard"),
                      target_with(Overlap::Model, 5.0));
  ASSERT_TRUE(window) << window.reason();
  const Both found = simulate(pair, Overlap::Model, "model", *window);
  const SimulatedTrace wanted = trace_of(pair);
  EXPECT_EQ(found.first.parted, kTraces);
  EXPECT_EQ(found.second.parted, kTraces);
  expect_unbiased(found.first, wanted.peaks[0].area, 0.05);
  expect_unbiased(found.second, wanted.peaks[1].area, 0.05);
}

void expect_as_theory(const Statistics& found, double theory, double margin) {
  const double error = found.sd / std::sqrt(static_cast<double>(kTraces));
  EXPECT_LT(std::abs(found.mean - theory), margin + 3.0 * error)
      << found.mean << ", by theory " << theory;
}

// The drop gives what lies on either side of the valley: of one to five at
// resolution 1.0 the lower peak loses a twentieth of its area, of equal
// tailing peaks at 0.7 the first loses and the second gains as much.
TEST(OverlapSimulation, DropGivesTheAreaOnEitherSideOfTheValley) {
  for (const Pair& pair : {one_to_five(), fused_equals()}) {
    const Both found = simulate(pair, Overlap::Drop, "drop");
    EXPECT_EQ(found.first.parted, kTraces);
    EXPECT_EQ(found.second.parted, kTraces);
    const WindowTemplate window = taught_alone(pair, Overlap::Drop);
    const ExactPair exact(pair, window);
    const double margin = exact.feet_in_baseline();
    expect_as_theory(found.first, exact.first_dropped(), margin);
    expect_as_theory(found.second, exact.second_dropped(), margin);
  }
}

// The skim gives what lies above the tangent: less than half of the lower
// peak. That is why equal or nearly equal peaks are not skimmed.
TEST(OverlapSimulation, SkimGivesTheAreaAboveTheTangent) {
  const Pair pair = one_to_five();
  const Both found = simulate(pair, Overlap::Skim, "skim");
  EXPECT_EQ(found.first.parted, kTraces);
  EXPECT_EQ(found.second.parted, kTraces);
  const WindowTemplate window = taught_alone(pair, Overlap::Skim);
  const ExactPair exact(pair, window);
  expect_as_theory(found.first, exact.rider(), exact.noise_of_line());
  expect_as_theory(found.second, exact.parent(), exact.noise_of_line());
}

}  // namespace
}  // namespace loqsmith
