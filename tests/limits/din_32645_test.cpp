#include "loqsmith/limits/din_32645.hpp"

#include "limits/line_examples.hpp"
#include "loqsmith/limits/low_range_line.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

Outcome<LimitEstimate> limit(
    const LimitEvidence& evidence,
    const ProcedureSettings& settings = with_levels("din-32645", 0.01, 0.01)) {
  return din_32645(evidence, {}, settings);
}

Outcome<LimitEstimate> limit_of_blanks(const std::vector<double>& blanks,
                                       double slope, double alpha,
                                       double beta) {
  ProcedureSettings settings = with_levels("din-32645", alpha, beta);
  settings.way_blank = true;
  return limit(evidence_of(blanks, known_line(0.0, slope)), settings);
}

// k s_x0 t w(x) once: a step of the standard's iteration.
double step(const LowRangeLine& line, double alpha, int replicates, double x) {
  const double t =
      student_t_quantile(1.0 - 0.5 * alpha, line.degrees_of_freedom);
  return 3.0 * line.residual_sd / line.slope * t *
         std::sqrt(1.0 / replicates + line.leverage.at(x));
}

// Miller and Miller, fluorescence line (data from memory); limits by the
// formulas of DIN 32645, computed independently. First: the iteration's first
// step, from k x_NG.
TEST(Din32645, FluorescenceLine) {
  struct Row {
    double alpha;
    int m;
    double decision, detection, first, quantitation;
  };
  for (const Row& row : std::initializer_list<Row>{
           {0.01, 1, 0.91303286, 1.82606572, 3.01772519, 2.99990055},
           {0.01, 3, 0.67386244, 1.34772489, 2.13145700, 2.11955939},
           {0.05, 1, 0.54675889, 1.09351777, 1.98111836, 1.96278597},
           {0.05, 3, 0.40353452, 0.80706905, 1.42699586, 1.40944060}}) {
    const LimitEvidence evidence = fitted(fluorescence());
    const auto found =
        limit(evidence, with_levels("din-32645", row.alpha, row.alpha, row.m));
    ASSERT_TRUE(found);
    EXPECT_TRUE(agrees_to_digits(*found->critical_value, row.decision, 8));
    EXPECT_TRUE(agrees_to_digits(*found->detection, row.detection,
                                 row.detection < 1.0 ? 8 : 9));
    EXPECT_TRUE(agrees_to_digits(*found->quantitation, row.quantitation, 9));
    EXPECT_EQ(found->degrees_of_freedom, 5.0);

    const LowRangeLine line =
        fit_low_range(*evidence.calibration, std::nullopt).value();
    double x = step(line, row.alpha, row.m, 3.0 * *found->critical_value);
    EXPECT_TRUE(agrees_to_digits(x, row.first, 9));
    for (int i = 0; i < 60; ++i) x = step(line, row.alpha, row.m, x);
    EXPECT_TRUE(agrees_to_digits(x, *found->quantitation, 12));
  }
}

// Quick estimate of the standard: 1.2 times the factor of 7 blanks times the
// procedure standard deviation, 0.90401001 for the fluorescence line.
TEST(Din32645, QuickEstimate) {
  const auto found = limit(fitted(fluorescence()));
  ASSERT_TRUE(found);
  const double factor =
      student_t_quantile(0.99, 6.0) * std::sqrt(1.0 + 1.0 / 7.0);
  EXPECT_TRUE(agrees_to_digits(factor, 3.3597, 5));
  EXPECT_TRUE(agrees_to_digits(
      1.2 * factor * *term(*found, "procedure standard deviation"), 0.90401001,
      8));
}

// Harris, low-current example (data from memory), by the formula for blanks.
TEST(Din32645, LowCurrentBlanks) {
  const auto one =
      limit_of_blanks(low_current_blanks(), kLowCurrentSlope, 0.01, 0.01);
  const auto five =
      limit_of_blanks(low_current_blanks(), kLowCurrentSlope, 0.05, 0.05);
  ASSERT_TRUE(one && five);
  EXPECT_TRUE(agrees_to_digits(*one->critical_value, 9.15642737, 9));
  EXPECT_TRUE(agrees_to_digits(*five->critical_value, 5.66161835, 9));
  EXPECT_TRUE(within_condition(*one->detection, 2.0 * 9.15642737, 1e7));
  EXPECT_EQ(one->degrees_of_freedom, 6.0);
  EXPECT_EQ(one->n, 7U);
  const SpreadBounds bounds = standard_deviation_bounds(6.0, 0.95);
  EXPECT_TRUE(within_condition(*one->detection_upper,
                               bounds.upper * *one->detection, 4));
  // 3 t_{0.995, 6} s / b sqrt(8/7)
  EXPECT_TRUE(agrees_to_digits(
      *one->quantitation,
      3.0 * 3.707428 * 0.6241184259 / 0.229 * std::sqrt(8.0 / 7.0), 7));
}

// Factors t sqrt(1 + 1/n) of the quick estimate from n blanks, alpha 0.05 and
// 0.01, computed independently: the decision limit where s / b is 1.
TEST(Din32645, FactorsOfBlanks) {
  struct Row {
    int n;
    double five, one;
  };
  for (const Row& row : std::initializer_list<Row>{{4, 2.6311, 5.0767},
                                                   {5, 2.3353, 4.1046},
                                                   {6, 2.1765, 3.6345},
                                                   {7, 2.0773, 3.3597},
                                                   {8, 2.0095, 3.1798},
                                                   {9, 1.9601, 3.0531},
                                                   {10, 1.9226, 2.9591},
                                                   {15, 1.8191, 2.7106},
                                                   {20, 1.7718, 2.6022}}) {
    std::vector<double> blanks;
    for (int i = 0; i < row.n; ++i) blanks.push_back(i);
    const double sd =
        std::sqrt(row.n * (row.n + 1.0) / 12.0);  // of 0, 1, ..., n - 1
    EXPECT_TRUE(agrees_to_digits(
        *limit_of_blanks(blanks, sd, 0.05, 0.05)->critical_value, row.five, 5));
    EXPECT_TRUE(agrees_to_digits(
        *limit_of_blanks(blanks, sd, 0.01, 0.01)->critical_value, row.one, 5));
  }
}

// s_x0 k t / sqrt(Qx) is 1.2: the iteration would run away.
TEST(Din32645, NoQuantitationLimitWhereTheIterationDiverges) {
  const auto points = standards({{1, 1}, {3, 9}, {5, 1}, {7, 10}, {9, 9}});
  const auto found = limit(fitted(points));
  ASSERT_TRUE(found);
  EXPECT_TRUE(found->critical_value && found->detection);
  EXPECT_FALSE(found->quantitation);
  EXPECT_FALSE(found->quantitation_lower || found->quantitation_upper);
  ASSERT_TRUE(finding(*found, "quantitation-absent"));
  EXPECT_EQ(finding(*found, "quantitation-absent")->grade, Grade::Caution);
}

TEST(Din32645, WantsLevelsNearTheLimit) {
  const auto found = limit(fitted(fluorescence()));
  ASSERT_TRUE(finding(*found, "range-above-ten-limits"));  // 12 / 0.913
  auto near = fluorescence();
  near.resize(5);  // up to 8
  EXPECT_FALSE(finding(*limit(fitted(near)), "range-above-ten-limits"));
}

TEST(Din32645, NotApplicable) {
  EXPECT_TRUE(contains(limit({}).reason(), "no-calibration: "));
  EXPECT_TRUE(contains(
      limit(fitted(seven_levels(), {.model = Model::Quadratic})).reason(),
      "quadratic-calibration: "));
  EXPECT_TRUE(contains(
      limit(fitted(standards({{0, 0.1}, {1, 1}, {2, 2.1}, {5, 5}, {100, 99}})))
          .reason(),
      "few-low-levels: 3 levels"));
  EXPECT_TRUE(contains(limit(evidence_of({}, known_line(0.0, -1.0))).reason(),
                       "slope-not-positive: a limit needs a rising line"));
  EXPECT_TRUE(contains(
      limit(fitted(standards({{1, 9}, {2, 8.2}, {4, 7}, {8, 6}, {100, 300}})))
          .reason(),
      "slope-not-positive: the low standards do not rise"));
  EXPECT_TRUE(contains(
      limit(fitted(standards({{1, 3}, {2, 6}, {4, 12}, {8, 24}}))).reason(),
      "no-scatter: "));
  EXPECT_TRUE(contains(limit_of_blanks({1, 2}, 1.0, 0.01, 0.01).reason(),
                       "few-blanks: 2 solvent blanks"));
  EXPECT_TRUE(contains(limit_of_blanks({2, 2, 2}, 1.0, 0.01, 0.01).reason(),
                       "blanks-all-equal: "));
  EXPECT_TRUE(contains(limit_of_blanks({1, 2, 3}, -1.0, 0.01, 0.01).reason(),
                       "slope-not-positive: "));
  ProcedureSettings blank = procedure("din-32645");
  blank.way_blank = true;
  EXPECT_TRUE(contains(limit({}, blank).reason(), "no-calibration: "));
}

TEST(Din32645, BlanksAreJudged) {
  EXPECT_TRUE(
      finding(*limit_of_blanks({1, 2, 3, 1.5}, 1.0, 0.01, 0.01), "few-blanks"));
  const auto far =
      limit_of_blanks({9, 9.5, 10, 9.7, 9.9, 10.2, 9.1}, 1.0, 0.01, 0.01);
  ASSERT_TRUE(finding(*far, "blank-differs-from-intercept"));
  EXPECT_EQ(far->grade(), Grade::NotValid);
}

}  // namespace
}  // namespace loqsmith::test
