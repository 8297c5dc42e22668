#include "loqsmith/calibration/diagnostics.hpp"

#include <cmath>

#include "calibration/examples.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

// Sums of |relative errors| in percent, computed independently.
TEST(WeightAdvice, SevenLevels) {
  const auto line = fit_calibration(seven_levels(), {});
  ASSERT_TRUE(line);
  const WeightAdvice advice = advise_weight(*line);
  ASSERT_EQ(advice.candidates.size(), 4U);
  const double sums[] = {24.83857127, 15.29735690, 15.09399610};
  for (std::size_t i = 0; i < 3; ++i)
    EXPECT_TRUE(agrees_to_digits(
        *advice.candidates[i].sum_relative_error_percent, sums[i], 9));
  EXPECT_FALSE(advice.candidates[3].sum_relative_error_percent);
  EXPECT_EQ(advice.least, Weight::InverseXSquared);
  EXPECT_TRUE(advice.unweighted_over_a_decade);
  EXPECT_TRUE(advice.advises_change);
  EXPECT_NE(advice.advice.find("factor of 100"), std::string::npos);

  const auto weighted =
      fit_calibration(seven_levels(), {.weight = Weight::InverseX});
  ASSERT_TRUE(weighted);
  const WeightAdvice fine = advise_weight(*weighted);
  EXPECT_EQ(fine.least, Weight::InverseXSquared);  // by a hundredth: chance
  EXPECT_FALSE(fine.advises_change);
}

TEST(WeightAdvice, ExactlyADecadeIsNotMore) {
  const auto line = fit_calibration(
      standards({{1, 10.1}, {2, 19.9}, {5, 50.1}, {10, 99.9}}), {});
  ASSERT_TRUE(line);
  EXPECT_FALSE(advise_weight(*line).unweighted_over_a_decade);
}

// R 4.2.2: back-calculation with coefficients of lm(y ~ x + I(x^2)).
TEST(WeightAdvice, Quadratic) {
  const auto curve =
      fit_calibration(seven_levels(), {.model = Model::Quadratic});
  ASSERT_TRUE(curve);
  const WeightAdvice advice = advise_weight(*curve);
  const double sums[] = {35.6529578655, 14.4151239305, 14.8260312123};
  for (std::size_t i = 0; i < 3; ++i)
    EXPECT_TRUE(agrees_to_digits(
        *advice.candidates[i].sum_relative_error_percent, sums[i], 8));
  EXPECT_EQ(advice.least, Weight::InverseX);
}

TEST(WeightAdvice, AMeanResponseFactorHasItsWeight) {
  const auto factor =
      fit_calibration(seven_levels(), {.model = Model::ResponseFactor});
  ASSERT_TRUE(factor);
  const WeightAdvice advice = advise_weight(*factor);
  EXPECT_TRUE(advice.candidates.empty());
  EXPECT_FALSE(advice.advises_change);
  EXPECT_FALSE(advice.advice.empty());
}

std::vector<StandardPoint> with_one_off() {
  auto points = standards({{1, 10.1},
                           {2, 19.8},
                           {3, 30.2},
                           {4, 39.9},
                           {5, 50.1},
                           {6, 59.7},
                           {7, 70.2},
                           {8, 80.1}});
  points[3].response = 48.0;
  return points;
}

TEST(SuggestedExclusions, PointsAtTheOutlyingStandardAndLeavesItIn) {
  const auto line = fit_calibration(with_one_off(), {});
  ASSERT_TRUE(line);
  const auto suggested = suggest_exclusions(*line);
  ASSERT_EQ(suggested.size(), 1U);
  EXPECT_EQ(suggested[0].injection, 4);
  EXPECT_EQ(suggested[0].level, "L4");
  EXPECT_EQ(line->used_points(), 8U);
  ASSERT_TRUE(suggested[0].without);
  EXPECT_EQ(suggested[0].without->used_points(), 7U);
  EXPECT_LT(suggested[0].without->residual_sd, 0.1 * line->residual_sd);
}

TEST(SuggestedExclusions, NoneWhereTheStandardsAgree) {
  const auto line = fit_calibration(seven_levels(), {});
  ASSERT_TRUE(line);
  EXPECT_TRUE(suggest_exclusions(*line).empty());
}

TEST(SuggestedExclusions, OutlierAmongReplicates) {
  std::vector<std::pair<double, double>> pairs;
  for (double x : {1.0, 2.0, 4.0})
    for (double off : {-0.1, 0.05, 0.0, 0.1, -0.05, 0.02})
      pairs.emplace_back(x, 10.0 * x + off);
  pairs[7].second = 21.5;
  const auto line = fit_calibration(standards(pairs), {});
  ASSERT_TRUE(line);
  const auto suggested = suggest_exclusions(*line);
  ASSERT_EQ(suggested.size(), 1U);
  EXPECT_EQ(suggested[0].injection, 8);
  EXPECT_NE(suggested[0].why.find("Grubbs"), std::string::npos);
  EXPECT_NE(suggested[0].why.find("off the curve"), std::string::npos);
}

TEST(Diagnostics, EveryTestIsNamedDoneOrNot) {
  const auto line = fit_calibration(seven_levels(), {});
  ASSERT_TRUE(line);
  const CalibrationDiagnostics found = diagnose_calibration(*line);
  const std::vector<std::string> names{
      "lack-of-fit",        "mandel",   "cochran",        "levene",
      "residual-normality", "leverage", "cooks-distance", "outlying-residual",
      "slope-drift",        "grubbs"};
  ASSERT_EQ(found.tests.size(), names.size());
  for (std::size_t i = 0; i < names.size(); ++i) {
    EXPECT_EQ(found.tests[i].name, names[i]);
    const auto& outcome = found.tests[i].outcome;
    if (!outcome) {
      EXPECT_FALSE(outcome.reason().empty());
      continue;
    }
    EXPECT_EQ(outcome->name, names[i]);
    EXPECT_FALSE(outcome->meaning.empty());
  }
  EXPECT_EQ(found.influence.size(), 7U);
}

// What is not used has no part in anything.
TEST(Diagnostics, UnusedStandardsAreNotThere) {
  auto points = seven_levels();
  points.push_back(standard(8, 20, 900));
  points.back().used = false;
  const auto with = fit_calibration(points, {});
  const auto without = fit_calibration(seven_levels(), {});
  ASSERT_TRUE(with && without);
  const auto one = diagnose_calibration(*with);
  const auto other = diagnose_calibration(*without);
  ASSERT_EQ(one.tests.size(), other.tests.size());
  for (std::size_t i = 0; i < one.tests.size(); ++i) {
    ASSERT_EQ(one.tests[i].outcome.has_value(),
              other.tests[i].outcome.has_value());
    if (!one.tests[i].outcome) continue;
    EXPECT_TRUE(same_bits(one.tests[i].outcome->statistic,
                          other.tests[i].outcome->statistic));
  }
}

}  // namespace
}  // namespace loqsmith::test
