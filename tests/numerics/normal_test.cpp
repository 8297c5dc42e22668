#include "loqsmith/numerics/normal.hpp"

#include <gtest/gtest.h>

#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;
using test::within_condition;

// Standard normal quantiles to 10 decimals, as in any statistical table.
TEST(Normal, QuantilesAgreeWithTables) {
  EXPECT_TRUE(agrees_to_digits(normal_quantile(0.95), 1.6448536270, 10));
  EXPECT_TRUE(agrees_to_digits(normal_quantile(0.975), 1.9599639845, 11));
  EXPECT_TRUE(agrees_to_digits(normal_quantile(0.99), 2.3263478740, 11));
  EXPECT_TRUE(agrees_to_digits(normal_quantile(0.995), 2.5758293035, 11));
}

TEST(Normal, QuantileAndDistributionUndoEachOther) {
  for (const double p : {1e-300, 1e-20, 1e-6, 0.01, 0.3, 0.5}) {
    const double z = normal_quantile(p);
    // d ln(cdf) / d ln(z) is about z squared in the tail.
    EXPECT_TRUE(within_condition(normal_cdf(z), p, 4.0 * (1.0 + z * z))) << p;
  }
}

TEST(Normal, IsSymmetric) {
  for (const double p : {0.75, 0.875, 0.9375, 0.99609375}) {
    EXPECT_TRUE(
        within_condition(normal_quantile(p), -normal_quantile(1 - p), 1.0));
  }
}

}  // namespace
}  // namespace loqsmith
