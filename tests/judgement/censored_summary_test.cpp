#include "loqsmith/judgement/censored_summary.hpp"

#include <array>

#include "judgement/censored_examples.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::above;
using test::below;
using test::measured;

/// `many` measured values, all different, and so many below and above limits.
std::vector<CensoredValue> group(std::size_t many, std::size_t low,
                                 std::size_t high = 0) {
  std::vector<CensoredValue> values;
  for (std::size_t i = 0; i < many; ++i) {
    values.push_back(measured(2.0 + 0.25 * static_cast<double>(i)));
  }
  values.insert(values.end(), low, below(2.5));
  values.insert(values.end(), high, above(100.0));
  return values;
}

TEST(CensoredSummary, TheCountDecidesWhatIsAdvised) {
  using M = SummaryMethod;
  struct Case {
    std::vector<CensoredValue> values;
    std::optional<M> advised;
    const char* advice;
  };
  const std::vector<Case> cases{
      {group(1, 0), M::KaplanMeier, "half-or-more-measured"},
      {group(4, 0), M::KaplanMeier, "half-or-more-measured"},
      {group(4, 1), std::nullopt, "too-few-measured"},
      {group(5, 5), M::KaplanMeier, "half-or-more-measured"},
      {group(5, 6), M::OrderStatistics, "most-censored-few"},
      {group(24, 25), M::OrderStatistics, "most-censored-few"},
      {group(24, 26), M::Lognormal, "most-censored-many"},
      // Exactly 80 % censored is not over it.
      {group(5, 20), M::OrderStatistics, "most-censored-few"},
      {group(5, 21), std::nullopt, "too-many-censored"},
      {group(0, 3), std::nullopt, "nothing-measured"},
      {group(0, 0), std::nullopt, "nothing-measured"},
      {group(8, 2, 1), M::Lognormal, "instead-of-kaplan-meier"},
      {group(6, 6, 1), M::Lognormal, "instead-of-order-statistics"}};
  for (const Case& one : cases) {
    const CensoredSummary found = summarise_censored(one.values);
    EXPECT_EQ(found.advised, one.advised) << one.advice;
    EXPECT_EQ(found.advice, one.advice);
    EXPECT_EQ(found.methods.size(), one.advised ? 3U : 0U);
    EXPECT_EQ(found.advised_estimate() != nullptr, one.advised.has_value());
  }
}

// Helsel 2012: 13 of 24 below limits, the three methods side by side.
TEST(CensoredSummary, ArsenicBesideEachOther) {
  const CensoredSummary found = summarise_censored(test::arsenic());
  EXPECT_EQ(found.counts.measured, 11U);
  EXPECT_EQ(found.counts.below, 13U);
  ASSERT_EQ(found.methods.size(), 3U);
  const std::array means{0.949, 0.972, 0.945};
  const std::array medians{0.700, 0.700, 0.777};
  for (std::size_t i = 0; i < means.size(); ++i) {
    const auto& estimate = found.methods[i].estimate;
    ASSERT_TRUE(estimate);
    EXPECT_TRUE(test::agrees_to_digits(*estimate->mean, means[i], 3));
    EXPECT_TRUE(test::agrees_to_digits(*estimate->median(), medians[i], 3));
    EXPECT_GT(*estimate->upper_mean, *estimate->mean);
  }
  EXPECT_EQ(found.advised, SummaryMethod::OrderStatistics);
}

// What can not be found is said, and another method answers.
TEST(CensoredSummary, NonPositiveValuesLeaveKaplanMeier) {
  std::vector<CensoredValue> values = group(6, 5);
  values.push_back(measured(-0.1));
  const CensoredSummary found = summarise_censored(values);
  EXPECT_EQ(found.advised, SummaryMethod::KaplanMeier);
  EXPECT_FALSE(found.methods[1].estimate);
  EXPECT_FALSE(found.methods[2].estimate);
}

TEST(CensoredSummary, NoMethodAtAll) {
  // A "<" limit above the end of a range, and values without logarithms.
  std::vector<CensoredValue> values{above(3), below(4)};
  for (const double x : {-1.0, 1.0, 2.0, 5.0, 6.0}) {
    values.push_back(measured(x));
  }
  const CensoredSummary found = summarise_censored(values);
  EXPECT_EQ(found.advised, std::nullopt);
  EXPECT_EQ(found.advice, "no-method-gives-a-mean");
}

}  // namespace
}  // namespace loqsmith
