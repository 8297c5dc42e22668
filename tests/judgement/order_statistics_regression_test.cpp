#include "loqsmith/judgement/order_statistics_regression.hpp"

#include <algorithm>
#include <array>
#include <cmath>

#include "judgement/censored_examples.hpp"
#include "loqsmith/numerics/mean.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::above;
using test::agrees_to_digits;
using test::below;
using test::measured;

// Helsel 2012, the arsenic data: positions of the measured values.
TEST(OrderStatisticsRegression, PositionsOfTheArsenicData) {
  const auto fit = regress_on_order_statistics(test::arsenic());
  ASSERT_TRUE(fit);
  constexpr std::array<double, 11> kWanted{
      0.0982143, 0.1964286, 0.2946429, 0.3928571, 0.4910714, 0.5892857,
      0.7366071, 0.8293651, 0.8730159, 0.9444444, 0.9722222};
  ASSERT_EQ(fit->measured_positions.size(), kWanted.size());
  for (std::size_t i = 0; i < kWanted.size(); ++i) {
    // Printed to seven decimals.
    EXPECT_TRUE(agrees_to_digits(fit->measured_positions[i], kWanted[i],
                                 kWanted[i] < 0.1 ? 6 : 7));
  }
  EXPECT_TRUE(agrees_to_digits(fit->slope, 0.6467751084, 10));
  EXPECT_TRUE(agrees_to_digits(fit->intercept, -0.2299869999, 9));
  // "< 0.9" at 0.34375 and the fourth "< 1" at 0.6285714.
  const auto holds = [&](double z) {
    const double wanted = std::exp(fit->intercept + fit->slope * z);
    return std::any_of(fit->filled.begin(), fit->filled.end(), [&](double x) {
      return bool(agrees_to_digits(x, wanted, 12));
    });
  };
  EXPECT_TRUE(holds(-0.40225006532172536));  // scipy 1.10.1 norm.ppf(0.34375)
  EXPECT_TRUE(holds(0.3280721075316511));    // norm.ppf(0.628571428...)
}

// Published: mean 0.972, standard deviation 0.718, median 0.700; further
// digits, percentiles (method "weibull") and the standard error by leaving out
// one result at a time recomputed with numpy 1.24.2, scipy 1.10.1.
TEST(OrderStatisticsRegression, EstimatesOfTheArsenicData) {
  const auto found = order_statistics_estimate(test::arsenic());
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits(*found->mean, 0.972, 3));
  EXPECT_TRUE(agrees_to_digits(*found->mean, 0.9724632416814588, 12));
  EXPECT_TRUE(agrees_to_digits(*found->standard_deviation, 0.718, 3));
  EXPECT_TRUE(
      agrees_to_digits(*found->standard_deviation, 0.7180122488177998, 12));
  constexpr std::array<double, 6> kPercentiles{0.43969889, 0.51796452, 0.7,
                                               1.10274043, 2.25,       3.1};
  for (std::size_t i = 0; i < kPercentiles.size(); ++i) {
    EXPECT_TRUE(agrees_to_digits(*found->percentiles[i], kPercentiles[i], 8));
  }
  EXPECT_TRUE(
      agrees_to_digits(*found->standard_error, 0.16379133971148357, 11));
  EXPECT_TRUE(agrees_to_digits(*found->upper_mean, 1.2531805553045148, 11));
}

TEST(OrderStatisticsRegression, WithoutCensoringNothingIsFilledIn) {
  const std::vector<double> plain{3.1, 0.4, 1.7, 1.7, 2.2, 9.5, 0.8};
  std::vector<CensoredValue> values;
  for (const double x : plain) values.push_back(measured(x));
  const auto found = order_statistics_estimate(values);
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits(*found->mean, mean(plain), 14));
  EXPECT_TRUE(agrees_to_digits(*found->standard_error,
                               standard_deviation(plain) / std::sqrt(7.0), 12));
  EXPECT_FALSE(found->percentiles[5]);  // rank 7.6 of 7
}

TEST(OrderStatisticsRegression, OrderOfTheResultsDoesNotMatter) {
  std::vector<CensoredValue> turned = test::arsenic();
  std::reverse(turned.begin(), turned.end());
  const auto forth = order_statistics_estimate(test::arsenic());
  const auto back = order_statistics_estimate(turned);
  ASSERT_TRUE(forth && back);
  EXPECT_TRUE(test::same_bits(*forth->mean, *back->mean));
  EXPECT_TRUE(test::same_bits(*forth->upper_mean, *back->upper_mean));
}

TEST(OrderStatisticsRegression, SaysWhenThereIsNone) {
  const auto reason = [](const std::vector<CensoredValue>& values) {
    const auto found = order_statistics_estimate(values);
    return found ? std::string{}
                 : found.reason().substr(0, found.reason().find(':'));
  };
  EXPECT_EQ(reason({measured(1), measured(2), measured(3), above(5)}),
            "above-range-present");
  EXPECT_EQ(reason({measured(1), measured(2), measured(-3)}), "not-positive");
  EXPECT_EQ(reason({measured(1), measured(2), below(3)}), "too-few-measured");
  EXPECT_EQ(reason({measured(2), measured(2), measured(2)}), "all-equal");
  // Three are enough for the line, not for leaving one out.
  const auto three = order_statistics_estimate(
      std::vector{measured(1), measured(2), measured(3), below(1.5)});
  ASSERT_TRUE(three);
  EXPECT_TRUE(three->mean);
  EXPECT_FALSE(three->upper_mean);
  EXPECT_EQ(three->notes, std::vector<std::string>{"too-few-for-upper-mean"});
}

}  // namespace
}  // namespace loqsmith
