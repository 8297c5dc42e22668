#include "loqsmith/signal/savitzky_golay.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <vector>

#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::within_condition;

struct Published {
  int points;
  int order;
  int derivative;
  std::vector<double> integers;
  double norm;
};

class PublishedTable : public testing::TestWithParam<Published> {};

TEST_P(PublishedTable, IsReproduced) {
  const Published& table = GetParam();
  const std::vector<double> weights =
      savitzky_golay_weights(table.points, table.order, table.derivative);
  ASSERT_EQ(weights.size(), table.integers.size());
  for (std::size_t i = 0; i < weights.size(); ++i) {
    EXPECT_TRUE(within_condition(weights[i] * table.norm, table.integers[i],
                                 10.0, table.norm));
  }
}

// A. Savitzky, M. J. E. Golay, Anal. Chem. 36 (1964) 1627, tables I to V, as
// corrected by Steinier et al., Anal. Chem. 44 (1972) 1906.
INSTANTIATE_TEST_SUITE_P(
    SavitzkyGolay, PublishedTable,
    testing::Values(
        Published{5, 2, 0, {-3, 12, 17, 12, -3}, 35},
        Published{5, 3, 0, {-3, 12, 17, 12, -3}, 35},
        Published{7, 2, 0, {-2, 3, 6, 7, 6, 3, -2}, 21},
        Published{9, 2, 0, {-21, 14, 39, 54, 59, 54, 39, 14, -21}, 231},
        Published{5, 2, 1, {-2, -1, 0, 1, 2}, 10},
        Published{7, 2, 1, {-3, -2, -1, 0, 1, 2, 3}, 28},
        Published{9, 2, 1, {-4, -3, -2, -1, 0, 1, 2, 3, 4}, 60},
        Published{5, 3, 1, {1, -8, 0, 8, -1}, 12},
        Published{7, 3, 1, {22, -67, -58, 0, 58, 67, -22}, 252},
        Published{9, 3, 1, {86, -142, -193, -126, 0, 126, 193, 142, -86}, 1188},
        Published{5, 2, 2, {2, -1, -2, -1, 2}, 7},
        Published{7, 2, 2, {5, 0, -3, -4, -3, 0, 5}, 42},
        Published{9, 2, 2, {28, 7, -8, -17, -20, -17, -8, 7, 28}, 462}));

// A parabola is its own best fit, so every point, also the first and last, has
// its value, slope and curvature; at uneven times too.
void expect_parabola_kept(const std::vector<double>& minutes) {
  std::vector<double> signal;
  for (const double t : minutes) signal.push_back(3.0 - 2.0 * t + 0.5 * t * t);
  const auto smoothed = savitzky_golay(minutes, signal, 7, 2, 0);
  const auto slope = savitzky_golay(minutes, signal, 7, 2, 1);
  const auto bend = savitzky_golay(minutes, signal, 7, 2, 2);
  for (std::size_t i = 0; i < minutes.size(); ++i) {
    // A derivative divides rounding by the step, the second one twice.
    EXPECT_TRUE(within_condition(smoothed[i], signal[i], 50.0, 10.0));
    EXPECT_TRUE(within_condition(slope[i], minutes[i] - 2.0, 500.0, 10.0));
    EXPECT_TRUE(within_condition(bend[i], 1.0, 5000.0, 10.0));
  }
}

TEST(SavitzkyGolay, KeepsAParabolaAtEvenTimes) {
  std::vector<double> minutes;
  for (int i = 0; i < 40; ++i) minutes.push_back(0.125 * i);
  expect_parabola_kept(minutes);
}

TEST(SavitzkyGolay, KeepsAParabolaAtUnevenTimes) {
  std::vector<double> minutes;
  for (int i = 0; i < 40; ++i) {
    minutes.push_back(0.125 * i + 0.05 * std::sin(3.0 * i));
  }
  expect_parabola_kept(minutes);
}

TEST(SavitzkyGolay, GainOfIndependentNoiseIsRootOfTheMiddleWeight) {
  EXPECT_TRUE(within_condition(smoothing_noise_gain(5, 2),
                               std::sqrt(17.0 / 35.0), 4.0));
  EXPECT_EQ(smoothing_noise_gain(1, 2), 1.0);
}

TEST(SavitzkyGolay, LeavesTheSignalWhereThereIsNothingToFit) {
  const std::vector<double> minutes = {0, 1, 2, 3};
  const std::vector<double> signal = {5, 1, 4, 2};
  EXPECT_EQ(savitzky_golay(minutes, signal, 1, 2, 0), signal);
  const std::vector<double> one = {7};
  EXPECT_EQ(savitzky_golay(std::vector<double>{0}, one, 5, 2, 0), one);
  EXPECT_EQ(savitzky_golay(std::vector<double>{0}, one, 5, 2, 1),
            std::vector<double>{0});
}

}  // namespace
}  // namespace loqsmith
