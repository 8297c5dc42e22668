#include "loqsmith/record/axis.hpp"

#include <gtest/gtest.h>

#include <limits>
#include <utility>

#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using Labels = std::vector<std::string>;

TEST(LinearAxis, EndsOnRoundNumbers) {
  const Axis axis = linear_axis(0.3, 9.2, 0, 100, 5);
  EXPECT_EQ(axis.low, 0.0);
  EXPECT_EQ(axis.high, 10.0);
  EXPECT_EQ(axis.labels, (Labels{"0", "2", "4", "6", "8", "10"}));
  EXPECT_TRUE(test::same_bits(axis.place(5.0), 50.0));
}

TEST(LinearAxis, LabelsAreAsFineAsTheStep) {
  EXPECT_EQ(linear_axis(-0.04, 0.04, 0, 1, 4).labels,
            (Labels{"-0.04", "-0.02", "0.00", "0.02", "0.04"}));
}

TEST(LinearAxis, AStretchWithoutLengthIsWidened) {
  const Axis axis = linear_axis(5.0, 5.0, 0, 100);
  EXPECT_LT(axis.low, 5.0);
  EXPECT_GT(axis.high, 5.0);
  const Axis zero = linear_axis(0.0, 0.0, 0, 100);
  EXPECT_LT(zero.low, zero.high);
}

TEST(TightAxis, KeepsItsEnds) {
  const Axis axis = tight_axis(3.02, 3.87, 0, 100, 4);
  EXPECT_EQ(axis.low, 3.02);
  EXPECT_EQ(axis.high, 3.87);
  EXPECT_EQ(axis.labels, (Labels{"3.5"}));
  EXPECT_EQ(tight_axis(3.02, 3.87, 0, 100, 5).labels,
            (Labels{"3.2", "3.4", "3.6", "3.8"}));
}

TEST(Axes, LabelsOfLargeNumbersDiffer) {
  EXPECT_EQ(tight_axis(1.20e6, 1.23e6, 0, 100, 3).labels,
            (Labels{"1.2e6", "1.21e6", "1.22e6", "1.23e6"}));
  EXPECT_EQ(linear_axis(0, 4e6, 0, 100, 2).labels, (Labels{"0", "2e6", "4e6"}));
}

TEST(Axes, AbsurdNumbersComeToAnEnd) {
  for (const auto& [low, high] :
       {std::pair(1e16, 1e16 + 4), std::pair(-1e308, 1e308),
        std::pair(5e-324, 1e-323), std::pair(0.0, 1.7e308)}) {
    EXPECT_LE(linear_axis(low, high, 0, 100).ticks.size(), 40U);
    EXPECT_LE(tight_axis(low, high, 0, 100).ticks.size(), 40U);
  }
  EXPECT_EQ(px(tight_axis(-1e308, 1.7e308, 0, 100).place(1.0)), "50.0");
  const Axis axis = log_axis(5e-324, 1.7e308, 0, 100);
  EXPECT_GT(axis.low, 0.0);
  EXPECT_LT(axis.ticks.size(), 700U);
  EXPECT_EQ(px(std::numeric_limits<double>::quiet_NaN()), "0.0");
}

TEST(LogAxis, MarksOneTwoFiveAndHoldsWhatIsBeyond) {
  const Axis axis = log_axis(0.13, 45, 0, 100);
  EXPECT_EQ(axis.labels,
            (Labels{"0.1", "0.2", "0.5", "1", "2", "5", "10", "20", "50"}));
  EXPECT_TRUE(test::within_condition(axis.place(axis.low), 0.0, 4, 100));
  EXPECT_TRUE(test::within_condition(axis.place(1e9), 100.0, 4));
  EXPECT_TRUE(test::within_condition(axis.place(1e-9), 0.0, 4, 100));
  EXPECT_EQ(axis.minor_ticks.front(), 0.30000000000000004);
}

TEST(LogAxis, AWideOneNamesDecadesOnly) {
  EXPECT_EQ(log_axis(0.01, 1000, 0, 100).labels,
            (Labels{"0.01", "0.1", "1", "10", "100", "1000"}));
}

}  // namespace
}  // namespace loqsmith
