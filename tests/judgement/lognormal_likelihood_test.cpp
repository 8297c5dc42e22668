#include "loqsmith/judgement/lognormal_likelihood.hpp"

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

// Helsel 2012, the arsenic data. Published: mean 0.945, standard deviation
// 0.656, median 0.777; mu, sigma and the likelihood recomputed with R's
// survreg, covariance and upper limit with scipy 1.10.1 (differences of the
// likelihood, hence fewer digits).
TEST(LognormalLikelihood, ArsenicData) {
  const auto fit = fit_lognormal(test::arsenic());
  ASSERT_TRUE(fit);
  EXPECT_TRUE(agrees_to_digits(fit->log_mean, -0.2528290104, 9));
  EXPECT_TRUE(agrees_to_digits(fit->log_deviation, 0.6269484572, 9));
  EXPECT_TRUE(agrees_to_digits(fit->log_likelihood, -14.29523803, 10));
  EXPECT_TRUE(agrees_to_digits(fit->variance_mean, 0.02910912, 6));
  EXPECT_TRUE(agrees_to_digits(fit->variance_deviation, 0.01549753, 6));
  EXPECT_TRUE(agrees_to_digits(fit->covariance, -0.00769191, 5));

  const CensoredEstimate found = lognormal_estimate(*fit, 24);
  EXPECT_TRUE(agrees_to_digits(*found.mean, 0.945, 3));
  EXPECT_TRUE(agrees_to_digits(*found.mean, 0.9452585166, 9));
  EXPECT_TRUE(agrees_to_digits(*found.standard_deviation, 0.656, 3));
  EXPECT_TRUE(agrees_to_digits(*found.standard_deviation, 0.6559261492, 9));
  EXPECT_TRUE(agrees_to_digits(*found.median(), 0.777, 3));
  constexpr std::array<double, 6> kPercentiles{
      0.34774153, 0.50880048, 0.77660066, 1.1853538, 1.73435878, 2.17800525};
  for (std::size_t i = 0; i < kPercentiles.size(); ++i) {
    EXPECT_TRUE(agrees_to_digits(*found.percentiles[i], kPercentiles[i], 7));
  }
  EXPECT_TRUE(agrees_to_digits(*found.upper_mean, 1.24319629, 6));
}

// scipy 1.10.1: the same likelihood climbed by its simplex search.
TEST(LognormalLikelihood, BothSidesEqualAnIndependentSearch) {
  const auto fit = fit_lognormal(test::both_sides());
  ASSERT_TRUE(fit);
  EXPECT_TRUE(agrees_to_digits(fit->log_mean, 0.17827735, 7));
  EXPECT_TRUE(agrees_to_digits(fit->log_deviation, 1.67003002, 7));
  EXPECT_TRUE(agrees_to_digits(fit->log_likelihood, -29.5444306282, 11));
  const CensoredEstimate found = lognormal_estimate(*fit, 16);
  EXPECT_TRUE(agrees_to_digits(*found.mean, 4.82001711, 7));
  EXPECT_TRUE(agrees_to_digits(*found.upper_mean, 18.159362, 6));
}

// Nothing censored: closed forms, and Cox's interval with Student's t.
TEST(LognormalLikelihood, WithoutCensoringTheClosedForm) {
  const std::vector<double> plain{3.1, 0.4, 1.7, 1.7, 2.2, 9.5, 0.8};
  std::vector<CensoredValue> values;
  std::vector<double> logs;
  for (const double x : plain) {
    values.push_back(measured(x));
    logs.push_back(std::log(x));
  }
  const auto fit = fit_lognormal(values);
  ASSERT_TRUE(fit);
  const double sigma = standard_deviation(logs) * std::sqrt(6.0 / 7.0);
  EXPECT_TRUE(agrees_to_digits(fit->log_mean, mean(logs), 10));
  EXPECT_TRUE(agrees_to_digits(fit->log_deviation, sigma, 10));
  EXPECT_TRUE(agrees_to_digits(fit->variance_mean, sigma * sigma / 7.0, 9));
  EXPECT_TRUE(
      agrees_to_digits(fit->variance_deviation, sigma * sigma / 14.0, 9));
  const double error =
      std::sqrt(sigma * sigma / 7.0 + std::pow(sigma, 4) / 14.0);
  EXPECT_TRUE(agrees_to_digits(*lognormal_estimate(*fit, 7).upper_mean,
                               std::exp(mean(logs) + 0.5 * sigma * sigma +
                                        student_t_quantile(0.95, 6.0) * error),
                               8));
}

// Beyond sigma 2 the uppermost 1 % make 37 % of the mean and more.
TEST(LognormalLikelihood, SaysWhereTheMeanRestsOnTheShape) {
  LognormalFit fit;
  fit.variance_mean = fit.variance_deviation = 0.01;
  fit.log_deviation = 1.9;
  EXPECT_TRUE(lognormal_estimate(fit, 20).notes.empty());
  fit.log_deviation = 2.1;
  EXPECT_EQ(lognormal_estimate(fit, 20).notes,
            std::vector<std::string>{"mean-rests-on-shape"});
  fit.log_deviation = 40.0;
  EXPECT_FALSE(lognormal_estimate(fit, 20).mean);
  EXPECT_EQ(lognormal_estimate(fit, 20).notes,
            std::vector<std::string>{"spread-beyond-numbers"});
}

// A change of unit moves mu and leaves sigma.
TEST(LognormalLikelihood, FollowsTheUnit) {
  std::vector<CensoredValue> scaled = test::both_sides();
  for (CensoredValue& one : scaled) one.value *= 1e6;
  const auto fit = fit_lognormal(test::both_sides());
  const auto other = fit_lognormal(scaled);
  ASSERT_TRUE(fit && other);
  EXPECT_TRUE(agrees_to_digits(other->log_deviation, fit->log_deviation, 9));
  EXPECT_TRUE(
      agrees_to_digits(other->log_mean, fit->log_mean + std::log(1e6), 9));
}

// The climb ends at a peak from wherever the data let it begin.
TEST(LognormalLikelihood, FindsThePeakOfHardGroups) {
  RandomStream random("hard groups");
  int fitted = 0;
  for (int group = 0; group < 300; ++group) {
    const double sigma = std::exp(2.0 * random.uniform() - 1.5);
    std::vector<CensoredValue> values;
    for (int i = 0; i < 12; ++i) {
      const double x = std::exp(sigma * random.normal());
      const double limit = 4.0 * random.uniform();
      const double end = 2.0 + 4.0 * random.uniform();
      values.push_back(x < limit ? below(limit)
                       : x > end ? above(end)
                                 : measured(x));
    }
    if (count_censored(values).measured < 3) continue;
    const auto fit = fit_lognormal(values);
    ASSERT_TRUE(fit) << fit.reason();
    EXPECT_GT(fit->variance_mean, 0.0);
    EXPECT_GT(fit->variance_deviation, 0.0);
    ++fitted;
  }
  EXPECT_GT(fitted, 150);
}

TEST(LognormalLikelihood, SaysWhenThereIsNone) {
  const auto reason = [](const std::vector<CensoredValue>& values) {
    const auto found = fit_lognormal(values);
    return found ? std::string{}
                 : found.reason().substr(0, found.reason().find(':'));
  };
  EXPECT_EQ(reason({measured(1), measured(2), measured(0)}), "not-positive");
  EXPECT_EQ(reason({measured(1), measured(2), below(3), above(4)}),
            "too-few-measured");
  EXPECT_EQ(reason({measured(2), measured(2), measured(2), below(1)}),
            "all-equal");
}

}  // namespace
}  // namespace loqsmith
