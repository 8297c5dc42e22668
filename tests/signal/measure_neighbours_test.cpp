#include <gtest/gtest.h>

#include <cmath>
#include <vector>

#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/signal/measure_peak.hpp"
#include "curve_support.hpp"
#include "one_peak.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::blank_noise;
using test::gaussian_of_height;
using test::has_reason;
using test::kWindow;
using test::measured;
using test::sample;
using test::simulate_trace;
using test::SimulatedTrace;
using test::target_at;
using test::window_of;

TEST(MeasureNeighbours, PointsOfNeighboursAreKeptOutOfTheBaseline) {
  SimulatedTrace wanted = sample(100.0, 0.0);
  wanted.peaks.push_back(gaussian_of_height(5.42, 0.05, 500.0));
  const auto peak = measured(wanted, "near");
  ASSERT_TRUE(peak);
  EXPECT_TRUE(has_reason(*peak, "baseline-shortened"));
  EXPECT_EQ(peak->overlap, "");
  // The few points left stand at 0.2 % of the neighbour at most.
  EXPECT_LT(std::abs(peak->area - 12.533), 0.02 * 12.533);
}

// Half a percent of a tall neighbour's flank in the baseline would put blanks
// two and a half standard deviations too low.
TEST(MeasureNeighbours, ATallNeighbourDoesNotLiftTheBaseline) {
  for (const double distance : {0.35, 0.4, 0.5}) {
    SimulatedTrace wanted = sample(0.0);
    wanted.start_minutes = 3.0;
    wanted.end_minutes = 7.0;
    wanted.peaks = {gaussian_of_height(5.0 + distance, 0.05, 1000.0)};
    RandomStream stream("tall neighbour");
    std::vector<double> areas;
    for (int i = 0; i < 200; ++i) {
      areas.push_back(measured(simulate_trace(wanted, stream))->area);
    }
    EXPECT_TRUE(test::within_sampling_error(
        mean(areas), standard_deviation(areas), areas.size(), 0.0))
        << distance;
  }
}

TEST(MeasureNeighbours, ANeighboursValleyBoundsTheWindow) {
  SimulatedTrace wanted = sample(300.0, 0.0);
  wanted.peaks.push_back(gaussian_of_height(5.2, 0.05, 300.0));
  const auto peak = measured(wanted, "fused");
  ASSERT_TRUE(peak);
  EXPECT_TRUE(has_reason(*peak, "overlapped"));
  EXPECT_EQ(peak->overlap, "drop");
  // Two equal peaks: the valley is half-way, and what one loses beyond it it
  // gains from the other.
  EXPECT_LT(std::abs(peak->end_minutes - 5.1), 0.006);
  EXPECT_LT(std::abs(peak->area - 37.599), 0.01 * 37.599);
}

TEST(MeasureNeighbours, BetweenTwoNeighboursTheBaselineRunsBelowThemAll) {
  SimulatedTrace wanted = sample(300.0, 0.0);
  wanted.offset = 50.0;
  wanted.peaks.push_back(gaussian_of_height(5.2, 0.05, 300.0));
  wanted.peaks.push_back(gaussian_of_height(4.8, 0.05, 300.0));
  const auto peak = measured(wanted, "three");
  ASSERT_TRUE(peak);
  EXPECT_LT(std::abs(peak->area - 37.599), 0.01 * 37.599);
  const PeakCurve curve =
      test::curve_of(simulate_trace(wanted, "three"), target_at(5.0), kWindow,
                     5.0, test::blank_noise());
  EXPECT_LT(std::abs(curve.baseline_start - 50.0), 1.0);
  EXPECT_LT(std::abs(curve.baseline_end - 50.0), 1.0);
}

TEST(MeasureNeighbours, WithNoFreeStretchOnOneSideTheBaselineIsLevel) {
  SimulatedTrace wanted = sample(300.0, 0.0);
  wanted.peaks.push_back(gaussian_of_height(5.2, 0.05, 300.0));
  wanted.end_minutes = 5.36;
  const auto peak = measured(wanted, "one side");
  ASSERT_TRUE(peak);
  EXPECT_TRUE(has_reason(*peak, "baseline-one-sided"));
  EXPECT_LT(std::abs(peak->area - 37.599), 0.01 * 37.599);
  wanted.peaks.push_back(gaussian_of_height(4.8, 0.05, 300.0));
  wanted.start_minutes = 4.64;
  const auto both = measured(wanted, "both sides");
  ASSERT_TRUE(both);
  EXPECT_TRUE(has_reason(*both, "baseline-at-valley"));
}

TEST(MeasureNeighbours, NoiseOfTheSignalItselfMakesNoNeighbours) {
  // A counting detector: 5 % noise on the peak, hardly any beside it.
  SimulatedTrace wanted = sample(20000.0);
  wanted.relative_noise = 0.05;
  for (int i = 0; i < 20; ++i) {
    const auto peak = measured(wanted, "counts " + std::to_string(i));
    ASSERT_TRUE(peak);
    EXPECT_EQ(peak->overlap, "") << i;
    EXPECT_FALSE(has_reason(*peak, "several-peaks")) << i;
  }
}

}  // namespace
}  // namespace loqsmith
