#include <array>
#include <cmath>
#include <string>

#include "judgement/censored_examples.hpp"
#include "loqsmith/judgement/censored_summary.hpp"
#include "loqsmith/numerics/random.hpp"
#include "support/tolerance.hpp"

// How often the upper limits of the mean lie above the true mean, and how far
// the means are from it: many lognormal groups, a third of them below one of
// two limits. Promised are 95 %; the methods are approximate, each in its way.

namespace loqsmith {
namespace {

constexpr int kGroups = 1500;

struct Tally {
  double held = 0.0;
  double sum = 0.0;
  double squares = 0.0;
  double groups = 0.0;
};

std::vector<CensoredValue> draw(RandomStream& random, std::size_t n,
                                double sigma) {
  std::vector<CensoredValue> values;
  for (std::size_t i = 0; i < n; ++i) {
    const double x = std::exp(sigma * random.normal());
    // 25 % and 40 % of the values lie below these.
    const double limit = std::exp(sigma * (i % 2 == 0 ? -0.674 : -0.253));
    values.push_back(x < limit ? test::below(limit) : test::measured(x));
  }
  return values;
}

std::array<Tally, 3> tally(std::size_t n, double sigma) {
  RandomStream random("upper limits of the mean, " + std::to_string(n));
  const double truth = std::exp(0.5 * sigma * sigma);
  std::array<Tally, 3> tallies;
  for (int group = 0; group < kGroups; ++group) {
    const CensoredSummary found = summarise_censored(draw(random, n, sigma));
    for (std::size_t i = 0; i < found.methods.size(); ++i) {
      const auto& estimate = found.methods[i].estimate;
      if (!estimate || !estimate->upper_mean) continue;
      tallies[i].groups += 1.0;
      tallies[i].held += *estimate->upper_mean >= truth ? 1.0 : 0.0;
      tallies[i].sum += *estimate->mean / truth;
      tallies[i].squares += std::pow(*estimate->mean / truth, 2);
    }
  }
  return tallies;
}

double held(const Tally& tally) { return tally.held / tally.groups; }
double mean_ratio(const Tally& tally) { return tally.sum / tally.groups; }
double spread(const Tally& tally) {
  return std::sqrt(tally.squares / tally.groups -
                   mean_ratio(tally) * mean_ratio(tally));
}

// Three standard errors of a fraction near 0.95 or 0.8.
double margin(const Tally& tally) {
  return 3.0 * 0.4 / std::sqrt(tally.groups);
}

// Slightly skew results: what is promised is held.
TEST(CensoredCoverage, SlightlySkewGroupsHoldWhatIsPromised) {
  for (const Tally& one : tally(24, 0.4)) {
    ASSERT_GT(one.groups, 0.99 * kGroups);
    EXPECT_GT(held(one), 0.95 - margin(one));
  }
}

// Very skew results: Student's t falls short, to about four in five, and Cox's
// method less. The guide says so; this holds the words to the numbers.
TEST(CensoredCoverage, VerySkewGroupsHoldLess) {
  const auto [kaplan_meier, order_statistics, lognormal] = tally(24, 1.2);
  for (const Tally& one : {kaplan_meier, order_statistics}) {
    EXPECT_LT(held(one), 0.90 - margin(one));
    EXPECT_GT(held(one), 0.75 + margin(one));
  }
  EXPECT_GT(held(lognormal), 0.85 + margin(lognormal));
  EXPECT_LT(held(lognormal), 0.95 - margin(lognormal));
}

// Order statistics and likelihood find the mean; Kaplan-Meier's is an upper
// bound, since a mass below the lowest limit stands at that limit.
TEST(CensoredCoverage, MeansAreWhereTheyShouldBe) {
  const auto [kaplan_meier, order_statistics, lognormal] = tally(60, 0.8);
  for (const Tally& one : {order_statistics, lognormal}) {
    EXPECT_TRUE(
        test::within_sampling_error(mean_ratio(one), spread(one),
                                    static_cast<std::size_t>(one.groups), 1.0));
  }
  EXPECT_GT(mean_ratio(kaplan_meier),
            1.0 + 3.0 * spread(kaplan_meier) / std::sqrt(kaplan_meier.groups));
  EXPECT_LT(mean_ratio(kaplan_meier), 1.06);
}

}  // namespace
}  // namespace loqsmith
