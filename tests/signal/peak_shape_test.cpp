#include "loqsmith/signal/peak_shape.hpp"

#include <gtest/gtest.h>

#include "signal_support.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;
using test::no_noise;
using test::simulate_trace;
using test::SimulatedTrace;
using test::target_at;
using test::window_of;

// Ph. Eur. 2.2.46 and USP <621>, formulas from memory; t 5.0, width 0.12, and
// t 5.6, width 0.14.
TEST(PeakShape, PlatesAndResolutionOfTheFormulas) {
  EXPECT_TRUE(agrees_to_digits(plate_number(5.0, 0.12), 9618.055556, 10));
  EXPECT_TRUE(
      agrees_to_digits(resolution(5.0, 0.12, 5.6, 0.14), 2.723076923, 10));
}

struct ModifiedPeak {
  double tau;
  double retention;
  double height;
  double asymmetry;
  double tailing;
  double width_half;
  int digits;  // the apex is found to 2e-4 of the width, and they hang on it
};

class ModifiedGaussians : public testing::TestWithParam<ModifiedPeak> {};

// Exponentially modified Gaussians of unit area with mu 10 and sigma 0.1;
// apex and widths solved for with 50 digits.
TEST_P(ModifiedGaussians, HaveTheirShape) {
  const ModifiedPeak& wanted = GetParam();
  SimulatedTrace trace;
  trace.start_minutes = 8.0;
  trace.end_minutes = 16.0;
  trace.step_minutes = 0.002;
  trace.peaks = {{10.0, 0.1, 1.0, wanted.tau}};
  TargetSettings target = target_at(10.1, 0.3);
  const auto peak = measure_peak(simulate_trace(trace, "clean"), target,
                                 window_of(0.9, 4.5, wanted.width_half), 10.1,
                                 no_noise(), "");
  ASSERT_TRUE(peak);
  ASSERT_TRUE(peak->found);
  EXPECT_TRUE(agrees_to_digits(peak->area, 1.0, 6));
  EXPECT_TRUE(agrees_to_digits(peak->retention_minutes, wanted.retention, 5));
  EXPECT_TRUE(agrees_to_digits(peak->height, wanted.height, 5));
  EXPECT_TRUE(
      agrees_to_digits(*peak->width_half_minutes, wanted.width_half, 4));
  EXPECT_TRUE(
      agrees_to_digits(*peak->asymmetry, wanted.asymmetry, wanted.digits));
  EXPECT_TRUE(agrees_to_digits(*peak->tailing, wanted.tailing, wanted.digits));
}

INSTANTIATE_TEST_SUITE_P(
    PeakShape, ModifiedGaussians,
    testing::Values(ModifiedPeak{0.05, 10.042814, 3.640036, 1.092879, 1.057187,
                                 0.255886, 4},
                    ModifiedPeak{0.10, 10.069737, 3.128284, 1.362180, 1.228212,
                                 0.289089, 4},
                    ModifiedPeak{0.15, 10.088094, 2.706402, 1.700626, 1.435443,
                                 0.323619, 4},
                    ModifiedPeak{0.20, 10.101791, 2.376368, 2.055600, 1.648134,
                                 0.358646, 4},
                    ModifiedPeak{0.30, 10.121538, 1.906116, 2.766003, 2.069830,
                                 0.430029, 3}));

TEST(PeakShape, ResolutionIsToTheNearestNeighbour) {
  SimulatedTrace wanted;
  wanted.peaks = {test::gaussian_of_height(5.0, 0.05, 100.0),
                  test::gaussian_of_height(5.4, 0.05, 60.0),
                  test::gaussian_of_height(4.3, 0.05, 90.0)};
  const auto peak =
      measure_peak(simulate_trace(wanted, "three"), target_at(5.0),
                   window_of(0.19, 0.19, 0.1177), 5.0, no_noise(), "");
  ASSERT_TRUE(peak);
  ASSERT_TRUE(peak->resolution);
  // 1.18 x 0.4 / (2 x 2.354820045 x 0.05), widths to the linear
  // interpolation's digits.
  EXPECT_TRUE(agrees_to_digits(*peak->resolution, 2.0044, 3));
}

TEST(PeakShape, WidthsBelowTheNoiseAreNotStated) {
  SimulatedTrace wanted;
  wanted.white_noise = 1.0;
  wanted.peaks = {test::gaussian_of_height(5.0, 0.05, 20.0)};
  SimulatedTrace blank;
  blank.white_noise = 1.0;
  const auto noise =
      measure_noise(simulate_trace(blank, "blank"), 5.0, 0.1177, {});
  const auto peak =
      measure_peak(simulate_trace(wanted, "low"), target_at(5.0),
                   window_of(0.19, 0.19, 0.1177), 5.0, noise, "blank 1");
  ASSERT_TRUE(peak);
  EXPECT_TRUE(peak->found);
  EXPECT_TRUE(peak->width_half_minutes);
  EXPECT_FALSE(peak->tailing);
  EXPECT_FALSE(peak->asymmetry);
}

}  // namespace
}  // namespace loqsmith
