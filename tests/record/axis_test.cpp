#include "loqsmith/record/axis.hpp"

#include <gtest/gtest.h>

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
