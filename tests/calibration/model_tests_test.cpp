#include <cmath>

#include "calibration/examples.hpp"
#include "loqsmith/calibration/influence.hpp"
#include "loqsmith/calibration/lack_of_fit.hpp"
#include "loqsmith/calibration/mandel_test.hpp"
#include "loqsmith/calibration/slope_drift.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

std::string word_of(const std::string& reason) {
  return reason.substr(0, reason.find(':'));
}

std::vector<StandardPoint> pairs_of_levels() {
  return standards({{0, 0.0},
                    {0, 0.2},
                    {1, 1.1},
                    {1, 0.9},
                    {2, 2.2},
                    {2, 1.8},
                    {3, 2.9},
                    {3, 3.1},
                    {4, 3.8},
                    {4, 4.0},
                    {5, 4.5},
                    {5, 4.7}});
}

std::vector<StandardPoint> five_pairs() {
  return standards({{1, 10.8},
                    {1, 9.9},
                    {2, 20.1},
                    {2, 21.4},
                    {5, 52.5},
                    {5, 50.7},
                    {10, 98},
                    {10, 103},
                    {20, 205},
                    {20, 195}});
}

// R 4.2.2: anova(lm(y ~ x), lm(y ~ factor(x))), with weights and through zero.
TEST(LackOfFit, AgainstAnalysisOfVariance) {
  const auto line = fit_calibration(pairs_of_levels(), {});
  ASSERT_TRUE(line);
  const auto found = lack_of_fit(*line);
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits(found->statistic, 0.68888889, 8));
  EXPECT_TRUE(agrees_to_digits(found->critical, 4.533677, 7));
  EXPECT_TRUE(agrees_to_digits(*found->p, 0.625655367609, 10));
  EXPECT_EQ(found->degrees_1, 4.0);
  EXPECT_EQ(found->degrees_2, 6.0);
  EXPECT_TRUE(found->passed);

  const auto weighted =
      fit_calibration(five_pairs(), {.weight = Weight::InverseXSquared});
  ASSERT_TRUE(weighted);
  const auto other = lack_of_fit(*weighted);
  ASSERT_TRUE(other);
  EXPECT_TRUE(agrees_to_digits(other->statistic, 0.224185401676, 9));
  EXPECT_TRUE(agrees_to_digits(*other->p, 0.875859932728, 9));

  const auto factor =
      fit_calibration(five_pairs(), {.model = Model::ResponseFactor});
  ASSERT_TRUE(factor);
  const auto through_zero = lack_of_fit(*factor);
  ASSERT_TRUE(through_zero);
  EXPECT_TRUE(agrees_to_digits(through_zero->statistic, 0.344288706299, 9));
  EXPECT_TRUE(agrees_to_digits(*through_zero->p, 0.838192919326, 9));
  EXPECT_TRUE(agrees_to_digits(through_zero->critical, 5.1921677728, 10));
}

TEST(LackOfFit, Refusals) {
  const auto reason = [](const std::vector<StandardPoint>& points) {
    const auto line = fit_calibration(points, {});
    if (!line) return line.reason();
    const auto found = lack_of_fit(*line);
    return found ? std::string("done") : word_of(found.reason());
  };
  EXPECT_EQ(reason(fluorescence()), "no-replicates");
  EXPECT_EQ(reason(standards({{1, 1}, {2, 2}, {3, 3.1}, {3, 3.1}, {4, 4}})),
            "not-defined");
  EXPECT_EQ(reason(standards({{1, 1}, {2, 2}, {3, 3.1}, {3, 3.2}})), "done");
}

// ISO 8466-1, F_0.99; values computed, p from R 4.2.2 (anova of nested lm).
TEST(Mandel, WorkedSets) {
  const auto line = fit_calibration(seven_levels(), {});
  ASSERT_TRUE(line);
  const auto found = mandel_test(*line);
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits(found->statistic, 3.904495852, 9));
  EXPECT_TRUE(agrees_to_digits(found->critical, 21.19769, 7));
  EXPECT_TRUE(agrees_to_digits(*found->p, 0.11934948, 8));
  EXPECT_TRUE(found->passed);

  const auto curved = standards(
      {{0, 0.1}, {2, 8.0}, {4, 15.7}, {6, 24.2}, {8, 31.5}, {10, 33.0}});
  const auto bent = fit_calibration(curved, {});
  ASSERT_TRUE(bent);
  const auto other = mandel_test(*bent);
  ASSERT_TRUE(other);
  EXPECT_TRUE(agrees_to_digits(other->statistic, 5.34545454545, 10));
  EXPECT_TRUE(agrees_to_digits(other->critical, 34.116222, 8));
  EXPECT_TRUE(agrees_to_digits(*other->p, 0.103838525469, 9));
}

TEST(Mandel, WeightedAndThroughZero) {
  const auto weighted =
      fit_calibration(seven_levels(), {.weight = Weight::InverseXSquared});
  const auto factor =
      fit_calibration(seven_levels(), {.model = Model::ResponseFactor});
  ASSERT_TRUE(weighted && factor);
  const auto one = mandel_test(*weighted);
  const auto other = mandel_test(*factor);
  ASSERT_TRUE(one && other);
  EXPECT_TRUE(agrees_to_digits(one->statistic, 0.0132415317281, 8));
  EXPECT_TRUE(agrees_to_digits(*one->p, 0.91393336684, 9));
  EXPECT_TRUE(agrees_to_digits(other->statistic, 0.702571585844, 9));
  EXPECT_TRUE(agrees_to_digits(*other->p, 0.440138340397, 9));
}

// Of a quadratic in use the same test asks the other way round.
TEST(Mandel, QuadraticInUse) {
  const auto needless =
      fit_calibration(seven_levels(), {.model = Model::Quadratic});
  ASSERT_TRUE(needless);
  EXPECT_FALSE(mandel_test(*needless)->passed);
  std::vector<std::pair<double, double>> pairs;
  for (int i = 1; i <= 7; ++i)
    pairs.emplace_back(i, 10.0 * i - 0.4 * i * i + 0.01 * (i % 2));
  const auto needed =
      fit_calibration(standards(pairs), {.model = Model::Quadratic});
  ASSERT_TRUE(needed);
  EXPECT_TRUE(mandel_test(*needed)->passed);
  const auto straight = fit_calibration(standards(pairs), {});
  ASSERT_TRUE(straight);
  EXPECT_FALSE(mandel_test(*straight)->passed);
}

TEST(Mandel, Refusals) {
  const auto three = fit_calibration(standards({{1, 1}, {2, 2}, {3, 3.1}}), {});
  const auto levels =
      fit_calibration(standards({{1, 1}, {1, 1.1}, {2, 2.1}, {2, 2}}),
                      {.intercept = Intercept::Zero});
  const auto exact =
      fit_calibration(standards({{1, 1}, {2, 4}, {3, 9}, {4, 16}}), {});
  ASSERT_TRUE(three && levels && exact);
  EXPECT_EQ(word_of(mandel_test(*three).reason()), "few-points");
  EXPECT_TRUE(mandel_test(*levels));  // two levels bear a curve through zero
  EXPECT_EQ(word_of(mandel_test(*exact).reason()), "not-defined");
}

// R 4.2.2: hatvalues, rstandard, rstudent, cooks.distance of lm(y ~ x).
TEST(Influence, AgainstAnIndependentComputation) {
  const auto line = fit_calibration(seven_levels(), {});
  ASSERT_TRUE(line);
  const auto found = point_influence(*line);
  ASSERT_TRUE(found);
  ASSERT_EQ(found->size(), 7U);
  const PointInfluence& fifty = (*found)[5];
  EXPECT_TRUE(agrees_to_digits(fifty.leverage, 0.209966706047, 11));
  EXPECT_TRUE(agrees_to_digits(fifty.standardised_residual, -2.08409807441, 8));
  EXPECT_TRUE(agrees_to_digits(*fifty.deleted_residual, -5.14421527685, 8));
  EXPECT_TRUE(agrees_to_digits(fifty.cooks_distance, 0.577180101432, 8));
  const PointInfluence& hundred = (*found)[6];
  EXPECT_TRUE(agrees_to_digits(hundred.leverage, 0.813195861526, 11));
  EXPECT_TRUE(agrees_to_digits(hundred.cooks_distance, 7.3030961642, 8));
  EXPECT_TRUE(hundred.high_leverage && hundred.influential);
  EXPECT_FALSE(fifty.high_leverage || fifty.influential);

  const auto leverage = largest_leverage(*line);
  ASSERT_TRUE(leverage);
  EXPECT_EQ(leverage->injection, 7);
  EXPECT_FALSE(leverage->passed);
  EXPECT_TRUE(agrees_to_digits(leverage->critical, 0.571428571, 9));
  const auto cook = largest_cooks_distance(*line);
  ASSERT_TRUE(cook);
  EXPECT_TRUE(agrees_to_digits(cook->critical, 0.798769776932, 11));
  EXPECT_TRUE(agrees_to_digits(*cook->p, 0.0328429277123, 8));
  EXPECT_FALSE(cook->passed);
  const auto outlying = outlying_residual(*line);
  ASSERT_TRUE(outlying);
  EXPECT_EQ(outlying->injection, 6);
  EXPECT_TRUE(agrees_to_digits(outlying->critical, 5.06751035364, 10));
  EXPECT_TRUE(agrees_to_digits(*outlying->p, 0.0474004711514, 8));
  EXPECT_FALSE(outlying->passed);
}

TEST(Influence, Weighted) {
  const auto line =
      fit_calibration(seven_levels(), {.weight = Weight::InverseXSquared});
  ASSERT_TRUE(line);
  const auto found = point_influence(*line);
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits((*found)[0].leverage, 0.813195861526, 10));
  EXPECT_TRUE(
      agrees_to_digits((*found)[2].standardised_residual, 1.38706394095, 9));
  EXPECT_TRUE(
      agrees_to_digits(*(*found)[2].deleted_residual, 1.58171970937, 9));
  EXPECT_TRUE(agrees_to_digits((*found)[0].cooks_distance, 1.48962688932, 9));
}

TEST(Influence, Corners) {
  const auto exact =
      fit_calibration(standards({{1, 1}, {2, 2}, {3, 3}, {4, 4}}), {});
  ASSERT_TRUE(exact);
  EXPECT_EQ(word_of(point_influence(*exact).reason()), "not-defined");
  EXPECT_EQ(word_of(outlying_residual(*exact).reason()), "not-defined");
  // All but one on a line: what the others' scatter is, nobody knows.
  const auto one_off =
      fit_calibration(standards({{1, 1}, {2, 2}, {3, 4}, {4, 4}, {5, 5}}), {});
  ASSERT_TRUE(one_off);
  EXPECT_EQ(word_of(outlying_residual(*one_off).reason()), "not-defined");
  const auto three = fit_calibration(standards({{1, 1}, {2, 2}, {3, 3.2}}), {});
  ASSERT_TRUE(three);
  EXPECT_EQ(word_of(outlying_residual(*three).reason()), "few-points");
  EXPECT_EQ(word_of(largest_leverage(*three).reason()), "few-points");
  // The only standard away from zero concentration alone sets a slope.
  const auto alone =
      fit_calibration(standards({{1, 1.0}, {1, 1.1}, {1, 0.9}, {9, 9.0}}),
                      {.model = Model::ResponseFactor});
  ASSERT_TRUE(alone);
  EXPECT_TRUE(point_influence(*alone));
}

// R 4.2.2: the t of I(x (order - mean(order))) in lm.
TEST(SlopeDrift, AgainstAnIndependentComputation) {
  const auto in_order =
      fit_calibration(seven_levels(), {.weight = Weight::InverseXSquared});
  ASSERT_TRUE(in_order);
  const auto none = slope_drift(*in_order);
  ASSERT_TRUE(none);
  EXPECT_TRUE(agrees_to_digits(none->test.statistic, 0.0835090261551, 8));
  EXPECT_TRUE(agrees_to_digits(*none->test.p, 0.937459059694, 9));
  EXPECT_TRUE(none->test.passed);

  auto points = seven_levels();
  const int order[] = {3, 1, 6, 2, 7, 5, 4};
  for (std::size_t i = 0; i < 7; ++i) points[i].injection = order[i];
  const auto shuffled =
      fit_calibration(points, {.weight = Weight::InverseXSquared});
  ASSERT_TRUE(shuffled);
  const auto found = slope_drift(*shuffled);
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits(found->test.statistic, 3.33638612124, 8));
  EXPECT_TRUE(agrees_to_digits(*found->test.p, 0.0289329618560, 8));
  EXPECT_TRUE(agrees_to_digits(found->percent_per_injection,
                               100.0 * 0.113031897101 / 9.923501068852, 8));
  EXPECT_TRUE(agrees_to_digits(found->percent_over_standards,
                               600.0 * 0.113031897101 / 9.923501068852, 8));
  EXPECT_FALSE(found->test.passed);
}

TEST(SlopeDrift, Refusals) {
  const auto three = fit_calibration(standards({{1, 1}, {2, 2}, {3, 3.2}}), {});
  ASSERT_TRUE(three);
  EXPECT_EQ(word_of(slope_drift(*three).reason()), "few-points");
  // Each standard of a quadratic in order of its level: x order is x squared.
  const auto curve = fit_calibration(
      standards({{1, 1}, {2, 2.1}, {3, 3}, {4, 4.1}, {5, 4.9}, {6, 5.8}}),
      {.model = Model::Quadratic});
  ASSERT_TRUE(curve);
  EXPECT_EQ(word_of(slope_drift(*curve).reason()), "order-follows-level");
  const auto exact =
      fit_calibration(standards({{1, 1}, {4, 4}, {2, 2}, {3, 3}, {7, 7}}), {});
  ASSERT_TRUE(exact);
  EXPECT_EQ(word_of(slope_drift(*exact).reason()), "not-defined");
}

}  // namespace
}  // namespace loqsmith::test
