#include "loqsmith/judgement/kaplan_meier.hpp"

#include <algorithm>
#include <array>
#include <cmath>

#include "judgement/censored_examples.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/numerics/random.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::above;
using test::agrees_to_digits;
using test::below;
using test::measured;

// Helsel 2012, the arsenic data; n, d and F as worked there.
TEST(KaplanMeier, StepsOfTheArsenicData) {
  const auto found = product_limit(test::arsenic());
  ASSERT_TRUE(found);
  struct Wanted {
    double value;
    std::size_t at_risk;
    std::size_t measured;
    double fraction;
  };
  constexpr std::array<Wanted, 8> kWanted{{{0.5, 3, 3, 0.34375},
                                           {0.6, 4, 1, 0.45833333},
                                           {0.7, 6, 2, 0.6875},
                                           {0.9, 8, 1, 0.78571429},
                                           {1.5, 13, 1, 0.85119048},
                                           {1.7, 14, 1, 0.91666667},
                                           {2.8, 23, 1, 0.95833333},
                                           {3.2, 24, 1, 1.0}}};
  ASSERT_EQ(found->steps.size(), kWanted.size());
  for (std::size_t i = 0; i < kWanted.size(); ++i) {
    const DistributionStep& step = found->steps[i];
    EXPECT_EQ(step.value, kWanted[i].value);
    EXPECT_EQ(step.at_risk, kWanted[i].at_risk);
    EXPECT_EQ(step.measured, kWanted[i].measured);
    EXPECT_TRUE(agrees_to_digits(step.at_or_below, kWanted[i].fraction, 8));
  }
  EXPECT_EQ(found->mass_below, 0.0);
  EXPECT_EQ(found->mass_above, 0.0);
}

// Published: mean 0.949, "standard deviation" 0.807 (it is sqrt(n) times the
// standard error of the mean), median 0.700. Further digits recomputed with
// numpy 1.24.2 and, the standard error, with R's survfit (0.157025 before
// the factor m / (m - 1)).
TEST(KaplanMeier, EstimatesOfTheArsenicData) {
  const auto found = product_limit(test::arsenic());
  ASSERT_TRUE(found);
  const CensoredEstimate estimate = kaplan_meier_estimate(*found);
  EXPECT_TRUE(agrees_to_digits(*estimate.mean, 0.949, 3));
  EXPECT_TRUE(agrees_to_digits(*estimate.mean, 0.94895833, 8));
  const double error = *estimate.standard_error;
  EXPECT_TRUE(agrees_to_digits(std::sqrt(24.0) * error, 0.807, 3));
  EXPECT_TRUE(agrees_to_digits(error * std::sqrt(10.0 / 11.0), 0.157025, 6));
  EXPECT_TRUE(agrees_to_digits(error, 0.1646887528485264, 12));
  EXPECT_EQ(estimate.median(), 0.7);
  // scipy 1.10.1: t(0.95, 23).
  EXPECT_TRUE(agrees_to_digits(*estimate.upper_mean, 1.231213697780593, 12));
  EXPECT_TRUE(estimate.notes.empty());
}

// Where nothing is censored these are the plain mean and its standard error.
TEST(KaplanMeier, WithoutCensoringItIsTheOrdinaryMean) {
  const std::vector<double> plain{3.1, 0.4, 1.7, 1.7, 2.2, 9.5, 0.8};
  std::vector<CensoredValue> values;
  for (const double x : plain) values.push_back(measured(x));
  const CensoredEstimate estimate =
      kaplan_meier_estimate(*product_limit(values));
  EXPECT_TRUE(agrees_to_digits(*estimate.mean, mean(plain), 14));
  const double spread = standard_deviation(plain);
  EXPECT_TRUE(agrees_to_digits(*estimate.standard_deviation, spread, 13));
  EXPECT_TRUE(
      agrees_to_digits(*estimate.standard_error, spread / std::sqrt(7.0), 13));
  EXPECT_EQ(estimate.median(), 1.7);
}

TEST(KaplanMeier, MassBelowTheLowestLimitBoundsTheMean) {
  const auto found = product_limit(
      std::vector{below(0.5), below(1.0), measured(1.0), measured(3.0)});
  ASSERT_TRUE(found);
  // F(1) = 3/4, of the three at or below 1 one is measured: 2/4 lie below.
  EXPECT_TRUE(agrees_to_digits(found->mass_below, 0.5, 15));
  const CensoredEstimate estimate = kaplan_meier_estimate(*found);
  EXPECT_EQ(estimate.notes, std::vector<std::string>{"mean-at-most"});
  EXPECT_TRUE(agrees_to_digits(*estimate.mean, 1.25, 14));
  EXPECT_FALSE(estimate.median());  // below the lowest limit
  EXPECT_EQ(estimate.percentiles[3], 1.0);
  EXPECT_EQ(estimate.percentiles[4], 3.0);
}

// Ordinary survival, by hand: 5/6, 5/6 3/4, 5/6 3/4 2/3, 0.
TEST(KaplanMeier, ResultsAboveTheRangeAlone) {
  const auto found =
      product_limit(std::vector{measured(0.5), above(0.7), measured(0.9),
                                measured(1.0), above(1.2), measured(2.0)});
  ASSERT_TRUE(found);
  constexpr std::array kWanted{1.0 / 6.0, 0.375, 7.0 / 12.0, 1.0};
  ASSERT_EQ(found->steps.size(), kWanted.size());
  for (std::size_t i = 0; i < kWanted.size(); ++i) {
    EXPECT_TRUE(agrees_to_digits(found->steps[i].at_or_below, kWanted[i], 14));
  }
  const CensoredEstimate estimate = kaplan_meier_estimate(*found);
  ASSERT_TRUE(estimate.mean);  // the largest is measured
  EXPECT_FALSE(estimate.upper_mean);
}

// The iteration for any pattern of censoring (B. W. Turnbull 1976): equal
// masses, then again and again the mean of what each result says of its place.
std::vector<double> by_iteration(const std::vector<CensoredValue>& values) {
  std::vector<double> places = measured_values(values);
  places.erase(std::unique(places.begin(), places.end()), places.end());
  places.insert(places.begin(), -1e300);
  places.push_back(1e300);
  std::vector<double> masses(places.size(), 1.0 / double(places.size()));
  const auto holds = [](const CensoredValue& one, double place) {
    if (one.censoring == Censoring::Measured) return place == one.value;
    return one.censoring == Censoring::Below ? place < one.value
                                             : place > one.value;
  };
  for (int round = 0; round < 4000; ++round) {
    std::vector<double> next(places.size(), 0.0);
    for (const CensoredValue& one : values) {
      double sum = 0.0;
      for (std::size_t j = 0; j < places.size(); ++j) {
        if (holds(one, places[j])) sum += masses[j];
      }
      for (std::size_t j = 0; j < places.size(); ++j) {
        if (holds(one, places[j])) {
          next[j] += masses[j] / sum / double(values.size());
        }
      }
    }
    masses = next;
  }
  std::vector<double> fractions;
  double sum = masses.front();
  for (std::size_t j = 1; j + 1 < places.size(); ++j) {
    fractions.push_back(sum += masses[j]);
  }
  return fractions;
}

TEST(KaplanMeier, BothSidesEqualTheIteration) {
  const auto found = product_limit(test::both_sides());
  ASSERT_TRUE(found);
  const std::vector<double> wanted = by_iteration(test::both_sides());
  ASSERT_EQ(found->steps.size(), wanted.size());
  for (std::size_t i = 0; i < wanted.size(); ++i) {
    EXPECT_TRUE(agrees_to_digits(found->steps[i].at_or_below, wanted[i], 9));
  }
  EXPECT_TRUE(agrees_to_digits(found->mass_below, 0.1041666667, 9));
  EXPECT_TRUE(agrees_to_digits(found->mass_above, 0.09375, 9));
  const CensoredEstimate estimate = kaplan_meier_estimate(*found);
  EXPECT_FALSE(estimate.mean);
  EXPECT_EQ(estimate.notes, std::vector<std::string>{"mean-open-above"});
  EXPECT_EQ(estimate.median(), 1.1);
  EXPECT_FALSE(estimate.percentiles[0]);  // 10.4 % lie below every limit
  EXPECT_FALSE(estimate.percentiles[5]);  // 9.4 % lie beyond the range
}

TEST(KaplanMeier, ManyLeftCensoredNightsEqualTheIteration) {
  RandomStream random("many left-censored groups");
  for (int night = 0; night < 20; ++night) {
    std::vector<CensoredValue> values{measured(0.05)};
    for (int i = 0; i < 14; ++i) {
      const double x = std::exp(random.normal());
      const double limit = 0.3 * std::ceil(3.0 * random.uniform());
      values.push_back(x < limit ? below(limit) : measured(x));
    }
    const auto found = product_limit(values);
    ASSERT_TRUE(found);
    const std::vector<double> wanted = by_iteration(values);
    for (std::size_t i = 0; i < wanted.size(); ++i) {
      EXPECT_TRUE(agrees_to_digits(found->steps[i].at_or_below, wanted[i], 7));
    }
  }
}

TEST(KaplanMeier, SaysWhenThereIsNone) {
  EXPECT_EQ(product_limit(std::vector<CensoredValue>{}).reason().substr(0, 16),
            "nothing-measured");
  EXPECT_EQ(
      product_limit(std::vector{below(1), above(3)}).reason().substr(0, 7),
      "nothing");
  EXPECT_EQ(product_limit(std::vector{below(5), measured(2), above(3)})
                .reason()
                .substr(0, 14),
            "limits-overlap");
  const CensoredEstimate one =
      kaplan_meier_estimate(*product_limit(std::vector{measured(2)}));
  EXPECT_EQ(one.mean, 2.0);
  EXPECT_FALSE(one.upper_mean);
}

}  // namespace
}  // namespace loqsmith
