#include <array>
#include <cmath>
#include <iostream>
#include <vector>

#include "limits/evidence_builders.hpp"
#include "loqsmith/limits/bootstrap_ratio_bounds.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/mean.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

std::vector<double> normal_sample(RandomStream& random, std::size_t n) {
  std::vector<double> values;
  for (std::size_t i = 0; i < n; ++i) values.push_back(random.normal());
  return values;
}

// Ratios of the standard deviation of values drawn again, with replacement.
std::vector<double> resampled(const std::vector<double>& values,
                              RandomStream& random) {
  const double sd = standard_deviation(values);
  std::vector<double> ratios, drawn(values.size());
  while (ratios.size() < 399) {
    for (double& one : drawn)
      one = values[static_cast<std::size_t>(
          random.uniform() * static_cast<double>(values.size()))];
    const double again = standard_deviation(drawn);
    if (again > 0.0) ratios.push_back(again / sd);
  }
  return ratios;
}

TEST(BootstrapBounds, RanksTurnRatiosIntoBounds) {
  std::vector<double> ratios;
  for (int i = 1; i <= 999; ++i) ratios.push_back(0.002 * i);
  const auto bounds = bootstrap_ratio_bounds(3.0, ratios);
  ASSERT_TRUE(bounds);
  EXPECT_TRUE(within_condition(bounds->lower, 3.0 / 1.95, 100));  // rank 975
  EXPECT_TRUE(within_condition(bounds->upper, 3.0 / 0.05, 100));  // rank 25
  EXPECT_FALSE(bootstrap_ratio_bounds(3.0, {1.0, 2.0}));
}

TEST(BootstrapBounds, ChiSquareDrawsHaveMeanAndVarianceOfTheDistribution) {
  RandomStream random("chi-square draws");
  constexpr std::size_t kDraws = 20000;
  for (int nu : {1, 2, 5, 12}) {
    std::vector<double> draws, squares;
    for (std::size_t i = 0; i < kDraws; ++i)
      draws.push_back(drawn_chi_square(random, nu));
    for (double one : draws) squares.push_back((one - nu) * (one - nu));
    // Variance 2 nu; variance of the squared deviation 8 nu^2 + 48 nu.
    EXPECT_TRUE(within_sampling_error(mean(draws), std::sqrt(2.0 * nu), kDraws,
                                      nu, 3.0));
    EXPECT_TRUE(within_sampling_error(
        mean(squares), std::sqrt(8.0 * nu * nu + 48.0 * nu), kDraws, 2.0 * nu));
  }
}

// Normal draws in ratio form are the chi-square interval.
TEST(BootstrapBounds, NormalDrawsAgreeWithChiSquare) {
  LimitEstimate estimate;
  estimate.detection = 3.0;
  estimate.quantitation = 10.0;
  set_bootstrap_bounds(estimate, "agreement", [](RandomStream& random) {
    const double ratio = std::sqrt(drawn_chi_square(random, 6) / 6.0);
    return DrawnRatios{ratio, ratio};
  });
  const SpreadBounds exact = standard_deviation_bounds(6.0, 0.95);
  // Standard errors: sqrt(0.025 0.975 / 999) over the density of the ratio at
  // its 97.5 and 2.5 % points (0.177, 0.281), times 3 / ratio^2.
  EXPECT_TRUE(within_sampling_error(*estimate.detection_lower,
                                    0.035 * std::sqrt(999.0), 999,
                                    3.0 * exact.lower));
  EXPECT_TRUE(within_sampling_error(*estimate.detection_upper,
                                    0.256 * std::sqrt(999.0), 999,
                                    3.0 * exact.upper));
  EXPECT_TRUE(within_condition(*estimate.quantitation_upper,
                               *estimate.detection_upper / 0.3, 100));
  EXPECT_TRUE(term(estimate,
                   "bootstrap draws for the bounds, random stream "
                   "\"agreement\""));
  EXPECT_TRUE(estimate.findings.empty());
}

TEST(BootstrapBounds, SameStreamSameBounds) {
  const auto bounds = [](std::string_view stream) {
    LimitEstimate estimate;
    estimate.detection = 1.0;
    set_bootstrap_bounds(estimate, stream, [](RandomStream& random) {
      return DrawnRatios{std::exp(0.1 * random.normal()), {}};
    });
    EXPECT_FALSE(estimate.quantitation_lower);
    return *estimate.detection_upper;
  };
  EXPECT_TRUE(same_bits(bounds("one"), bounds("one")));
  EXPECT_NE(bounds("one"), bounds("two"));
}

TEST(BootstrapBounds, ALimitThatManyDrawsLackHasNone) {
  LimitEstimate estimate;
  estimate.detection = 1.0;
  estimate.quantitation = 2.0;
  set_bootstrap_bounds(
      estimate, "lacking",
      [](RandomStream& random) {
        DrawnRatios ratios{std::exp(random.normal()), {}};
        if (random.uniform() < 0.9) ratios.quantitation = ratios.detection;
        return ratios;
      },
      "0.91 at 7 blanks");
  EXPECT_TRUE(estimate.detection_lower && estimate.detection_upper);
  EXPECT_FALSE(estimate.quantitation_lower || estimate.quantitation_upper);
  ASSERT_NE(finding(estimate, "bounds-absent"), nullptr);
  ASSERT_NE(finding(estimate, "bounds-approximate"), nullptr);
  EXPECT_TRUE(contains(finding(estimate, "bounds-approximate")->text,
                       "approximate: 0.91 at 7 blanks"));
  EXPECT_EQ(estimate.grade(), Grade::Note);
}

// How often bounds from drawing 7 values again hold the true spread: ratio
// form comes nearer than percentiles, and neither reaches 0.93.
TEST(BootstrapBounds, DrawingSevenValuesAgainCoversTooLittle) {
  RandomStream random("coverage of resampling");
  constexpr int kStudies = 2000;
  int by_ratio = 0;
  int by_percentile = 0;
  for (int study = 0; study < kStudies; ++study) {
    const std::vector<double> values = normal_sample(random, 7);
    const double sd = standard_deviation(values);
    const auto bounds = bootstrap_ratio_bounds(sd, resampled(values, random));
    ASSERT_TRUE(bounds);
    if (bounds->lower <= 1.0 && 1.0 <= bounds->upper) ++by_ratio;
    const double low = sd * sd / bounds->upper;
    const double high = sd * sd / bounds->lower;
    if (low <= 1.0 && 1.0 <= high) ++by_percentile;
  }
  const double ratio = static_cast<double>(by_ratio) / kStudies;
  const double percentile = static_cast<double>(by_percentile) / kStudies;
  std::cout << "7 values drawn again: ratio form covers " << ratio
            << ", percentiles " << percentile << '\n';
  EXPECT_GT(ratio, percentile);
  EXPECT_LT(ratio, 0.93);
}

}  // namespace
}  // namespace loqsmith::test
