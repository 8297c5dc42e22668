#include "loqsmith/numerics/mean.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <limits>
#include <vector>

#include "nist_univariate_data.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;
using test::same_bits;
using test::nist::UnivariateSet;

class NistUnivariate : public testing::TestWithParam<UnivariateSet> {};

// NIST StRD, univariate summary statistics; certified to 15 digits. Digits
// asked for are what double arithmetic can give where the decimals of the data
// are not exact in binary (NumAcc3, NumAcc4).
TEST_P(NistUnivariate, AgreesWithCertifiedValues) {
  const UnivariateSet& set = GetParam();
  ASSERT_EQ(set.values.size(), set.count);
  EXPECT_TRUE(agrees_to_digits(mean(set.values), set.mean, set.mean_digits));
  EXPECT_TRUE(agrees_to_digits(standard_deviation(set.values), set.deviation,
                               set.deviation_digits));
}

INSTANTIATE_TEST_SUITE_P(Sets, NistUnivariate,
                         testing::ValuesIn(test::nist::univariate_sets()),
                         [](const auto& found) { return found.param.name; });

TEST(Mean, KeepsDigitsBesideALargeConstant) {
  // Mean of squares less square of the mean would give a negative variance.
  const std::vector<double> values = {1e9 + 4, 1e9 + 7, 1e9 + 13, 1e9 + 16};
  EXPECT_TRUE(same_bits(standard_deviation(values), std::sqrt(30.0)));
}

TEST(Mean, CompensatedSumKeepsWhatPlainSumLoses) {
  const std::vector<double> values = {1.0, 1e100, 1.0, -1e100};
  EXPECT_TRUE(same_bits(compensated_sum(values), 2.0));
}

TEST(Mean, MedianOfOddAndEvenCounts) {
  EXPECT_TRUE(same_bits(median(std::vector<double>{3, 1, 2}), 2.0));
  EXPECT_TRUE(same_bits(median(std::vector<double>{4, 1, 3, 2}), 2.5));
}

TEST(Mean, RobustDeviationIgnoresAQuarterOfWildValues) {
  const std::vector<double> values = {1, 2, 3, 4, 5, 1e6};
  // Median 3.5; distances .5 .5 1.5 1.5 2.5 big: median 1.5.
  EXPECT_TRUE(
      same_bits(robust_deviation(values), 1.5 * kDeviationPerMedianDeviation));
}

}  // namespace
}  // namespace loqsmith
