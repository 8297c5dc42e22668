#include "loqsmith/numerics/mean.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <limits>
#include <vector>

#include "loqsmith/numerics/random.hpp"
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

// Against sorting: values apart, with many ties, in order and against it.
TEST(Mean, MedianIsTheMiddleOfTheSortedValues) {
  RandomStream stream("median");
  for (std::size_t n = 1; n < 400; ++n) {
    const double ties = n % 3 == 0 ? 2.0 : 1e6;
    std::vector<double> values;
    for (std::size_t i = 0; i < n; ++i) {
      // Of both zeros none is the middle one rather than the other.
      values.push_back(std::round(ties * stream.normal()) + 0.0);
    }
    std::vector<double> sorted = values;
    std::sort(sorted.begin(), sorted.end());
    const double low = sorted[(n - 1) / 2];
    const double middle = low + 0.5 * (sorted[n / 2] - low);
    EXPECT_TRUE(same_bits(median(values), middle)) << n;
    EXPECT_TRUE(same_bits(median(sorted), middle)) << n;
    std::reverse(sorted.begin(), sorted.end());
    EXPECT_TRUE(same_bits(median(sorted), middle)) << n;
  }
}

TEST(Mean, MedianOfOddAndEvenCounts) {
  EXPECT_TRUE(same_bits(median(std::vector<double>{3, 1, 2}), 2.0));
  EXPECT_TRUE(same_bits(median(std::vector<double>{4, 1, 3, 2}), 2.5));
}

}  // namespace
}  // namespace loqsmith
