#include "loqsmith/limits/two_component_model.hpp"

#include <cmath>
#include <numbers>
#include <vector>

#include "limits/toluene.hpp"
#include "loqsmith/limits/two_component_likelihood.hpp"
#include "loqsmith/limits/two_component_precision.hpp"
#include "loqsmith/numerics/random.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

struct Observed {
  std::vector<double> x, y;
};

Observed observed_toluene() {
  Observed all;
  for (const StandardPoint& point : toluene()) {
    all.x.push_back(point.concentration);
    all.y.push_back(point.response);
  }
  return all;
}

// Independent and slow: 20,001 points over 12 standard deviations of eta.
double slow_log_likelihood(const Observed& all, const std::vector<double>& at) {
  const double additive = std::exp(at[2]);
  const double proportional = std::exp(at[3]);
  double sum = 0.0;
  for (std::size_t i = 0; i < all.x.size(); ++i) {
    constexpr int kSteps = 20000;
    const double step = 24.0 / kSteps;
    long double integral = 0.0;
    for (int k = 0; k <= kSteps; ++k) {
      const double z = -12.0 + step * k;
      const double mean = at[0] + at[1] * all.x[i] * std::exp(proportional * z);
      const double e = (all.y[i] - mean) / additive;
      integral += std::exp(-0.5 * (e * e + z * z));
    }
    sum += std::log(static_cast<double>(integral) * step /
                    (2.0 * std::numbers::pi * additive));
  }
  return sum;
}

TEST(TwoComponentLikelihood, AgreesWithASlowTwin) {
  const Observed all = observed_toluene();
  for (const std::vector<double>& at :
       std::vector<std::vector<double>>{{11.5, 1.52, 1.74, -2.27},
                                        {5.0, 1.7, 2.5, -1.2},
                                        {20.0, 1.4, 0.9, -3.0}}) {
    const auto there = two_component_likelihood(all.x, all.y, at);
    ASSERT_TRUE(there);
    EXPECT_TRUE(
        agrees_to_digits(there->value, slow_log_likelihood(all, at), 10));
  }
}

// Central differences of the value and of the gradient.
TEST(TwoComponentLikelihood, DerivativesAreThoseOfTheValue) {
  Observed all = observed_toluene();
  all.x.insert(all.x.begin(), {0.0, 0.0});
  all.y.insert(all.y.begin(), {9.0, 14.0});
  const std::vector<double> at{11.0, 1.5, 1.8, -2.1};
  const auto there = two_component_likelihood(all.x, all.y, at);
  ASSERT_TRUE(there);
  for (std::size_t i = 0; i < 4; ++i) {
    const double step = 1e-4 * (i == 0 ? 10.0 : 1.0);
    std::vector<double> up = at, down = at;
    up[i] += step;
    down[i] -= step;
    const auto above = two_component_likelihood(all.x, all.y, up);
    const auto below = two_component_likelihood(all.x, all.y, down);
    ASSERT_TRUE(above && below);
    EXPECT_TRUE(agrees_to_digits(
        there->gradient[i], (above->value - below->value) / (2.0 * step), 5));
    for (std::size_t j = 0; j < 4; ++j)
      EXPECT_TRUE(agrees_to_digits(
          there->information[4 * i + j],
          (below->gradient[j] - above->gradient[j]) / (2.0 * step), 4))
          << i << ' ' << j;
  }
}

// Published to the digits printed: 11.51, 1.524, 0.1032, 5.698 (Rocke and
// Lorenzato 1995). With more digits: computed from the published data by
// quadrature of 801 points and a simplex search.
TEST(TwoComponentModel, TolueneAsPublished) {
  const Observed all = observed_toluene();
  const auto model = fit_two_component(all.x, all.y);
  ASSERT_TRUE(model) << model.reason();
  EXPECT_TRUE(agrees_to_digits(model->slope, 1.524, 4));
  EXPECT_TRUE(agrees_to_digits(model->proportional_sd, 0.1032, 4));
  EXPECT_TRUE(agrees_to_digits(model->additive_sd, 5.698, 4));
  EXPECT_TRUE(agrees_to_digits(model->intercept, 11.515730, 6));
  EXPECT_TRUE(agrees_to_digits(model->slope, 1.524470, 7));
  EXPECT_TRUE(agrees_to_digits(model->proportional_sd, 0.103216, 6));
  EXPECT_TRUE(agrees_to_digits(model->additive_sd, 5.697807, 6));
  EXPECT_TRUE(agrees_to_digits(model->log_likelihood, -134.348524, 9));
  EXPECT_FALSE(model->by_moments || model->additive_only);
}

// Rocke and Lorenzato print 11.51 where the maximum lies at 11.5157.
TEST(TwoComponentModel, InterceptWithinAUnitOfTheLastPublishedDigit) {
  const Observed all = observed_toluene();
  const auto model = fit_two_component(all.x, all.y);
  ASSERT_TRUE(model);
  EXPECT_LT(std::abs(model->intercept - 11.51), 0.01);
}

Observed simulated(RandomStream& random, double additive, double proportional) {
  Observed all;
  for (double x : {1.0, 3.0, 10.0, 30.0, 100.0, 300.0, 1000.0})
    for (int i = 0; i < 4; ++i) {
      all.x.push_back(x);
      all.y.push_back(20.0 +
                      10.0 * x * std::exp(proportional * random.normal()) +
                      additive * random.normal());
    }
  return all;
}

// Maximum likelihood knows nothing of the degrees of freedom that the line
// takes, so the additive spread comes out low; the shortfall makes that good.
TEST(TwoComponentModel, FindsWhatWasPutIn) {
  RandomStream random("two components put in");
  constexpr int kSets = 200;
  int fitted = 0;
  double additive = 0.0, mended = 0.0, proportional = 0.0, slope = 0.0;
  for (int i = 0; i < kSets; ++i) {
    const Observed all = simulated(random, 3.0, 0.05);
    const auto model = fit_two_component(all.x, all.y);
    if (!model) continue;
    ++fitted;
    const double ratio = model->additive_sd / 3.0;
    additive += ratio * ratio;
    mended += ratio * ratio * std::exp(precision_of(*model, all.x).shortfall);
    proportional += std::log(model->proportional_sd / 0.05);
    slope += std::log(model->slope / 10.0);
  }
  // Now and then the likelihood climbs for ever towards no additive error.
  EXPECT_GE(fitted, kSets - 4);
  // Relative standard deviation of a variance with 6 degrees of freedom.
  const double spread = std::sqrt(2.0 / 6.0);
  const std::size_t n = static_cast<std::size_t>(fitted);
  EXPECT_LT(additive / fitted, 1.0);
  EXPECT_TRUE(within_sampling_error(mended / fitted, spread, n, 1.0));
  EXPECT_LT(std::abs(proportional / fitted), 0.1);
  EXPECT_LT(std::abs(slope / fitted), 0.01);
}

TEST(TwoComponentModel, NoProportionalErrorIsSaidSo) {
  RandomStream random("additive alone");
  int additive_only = 0;
  for (int i = 0; i < 50; ++i) {
    const Observed all = simulated(random, 3.0, 0.0);
    const auto model = fit_two_component(all.x, all.y);
    if (!model) {
      ADD_FAILURE() << model.reason();
      continue;
    }
    EXPECT_LT(model->proportional_sd, 0.01);
    if (!model->additive_only) continue;
    ++additive_only;
    EXPECT_GT(model->covariance[2][2], 0.0);
    EXPECT_TRUE(same_bits(model->covariance[3][3], 0.0));
  }
  EXPECT_GT(additive_only, 0);
}

// Another unit of response or of concentration is another unit of the model.
TEST(TwoComponentModel, UnitsPassThrough) {
  const Observed all = observed_toluene();
  Observed scaled = all;
  for (double& x : scaled.x) x *= 1e-6;
  for (double& y : scaled.y) y *= 1e4;
  const auto one = fit_two_component(all.x, all.y);
  const auto other = fit_two_component(scaled.x, scaled.y);
  ASSERT_TRUE(one && other);
  EXPECT_TRUE(agrees_to_digits(other->additive_sd, 1e4 * one->additive_sd, 7));
  EXPECT_TRUE(agrees_to_digits(other->slope, 1e10 * one->slope, 7));
  EXPECT_TRUE(
      agrees_to_digits(other->proportional_sd, one->proportional_sd, 7));
  EXPECT_TRUE(
      agrees_to_digits(other->covariance[2][2], one->covariance[2][2], 6));
}

TEST(TwoComponentModel, MomentsNeedReplicatesAndScatter) {
  const std::vector<double> x{1, 1, 10, 10, 100, 100, 1000, 1000};
  const auto reason = [&](const std::vector<double>& y) {
    const auto model = fit_two_component(x, y);
    return model ? std::string() : model.reason();
  };
  EXPECT_EQ(reason({1, 1, 10, 10, 99, 101, 990, 1000}).rfind("no-scatter", 0),
            0U);
  EXPECT_EQ(reason({9, 8, 8, 7, 5, 6, 1, 2}).rfind("slope-not-positive", 0),
            0U);
  const auto single =
      fit_two_component(std::vector<double>{1, 3, 10, 100, 1000},
                        std::vector<double>{1, 3, 11, 98, 999});
  ASSERT_FALSE(single);
  EXPECT_EQ(single.reason().rfind("no-replicates", 0), 0U);
}

}  // namespace
}  // namespace loqsmith::test
