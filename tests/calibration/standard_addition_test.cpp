#include "loqsmith/calibration/standard_addition.hpp"

#include "calibration/examples.hpp"
#include "loqsmith/base/text.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;
using test::standards;

/// Silver in a waste by atomic absorption, added amounts in ug/mL: Miller and
/// Miller, Statistics and Chemometrics for Analytical Chemistry, regression
/// chapter (data and printed values from memory).
std::vector<StandardPoint> silver() {
  return standards({{0, 0.32},
                    {5, 0.41},
                    {10, 0.52},
                    {15, 0.60},
                    {20, 0.70},
                    {25, 0.77},
                    {30, 0.89}});
}

std::string reason(const Outcome<Calibration>& outcome) {
  return outcome ? std::string{} : outcome.reason();
}

bool begins(const std::string& text, const std::string& word) {
  return text.rfind(word, 0) == 0;
}

TEST(StandardAddition, TextbookLineToTheDigitsPrinted) {
  const Outcome<Calibration> line = fit_addition_line(silver());
  ASSERT_TRUE(line);
  EXPECT_TRUE(agrees_to_digits(line->intercept, 0.3218, 4));
  EXPECT_TRUE(agrees_to_digits(line->slope, 0.0186, 3));
  EXPECT_TRUE(agrees_to_digits(line->residual_sd, 0.01092, 4));
  const StandardAddition found = amount_by_addition(*line);
  EXPECT_TRUE(agrees_to_digits(found.amount, 17.3, 3));
  EXPECT_TRUE(agrees_to_digits(found.propagated_half_width, 1.9, 2));
}

// The same line by an independent library, to all digits that it printed.
TEST(StandardAddition, AmountUncertaintyAndExactInterval) {
  const Outcome<Calibration> line = fit_addition_line(silver());
  ASSERT_TRUE(line);
  EXPECT_TRUE(agrees_to_digits(line->intercept, 0.32178571, 8));
  EXPECT_TRUE(agrees_to_digits(line->slope, 0.01864286, 7));
  EXPECT_TRUE(agrees_to_digits(line->residual_sd, 0.01092180, 7));
  EXPECT_EQ(line->degrees_of_freedom, 5);
  const StandardAddition found = amount_by_addition(*line);
  EXPECT_TRUE(agrees_to_digits(found.amount, 17.26053640, 10));
  EXPECT_TRUE(agrees_to_digits(found.standard_error, 0.74787064, 8));
  EXPECT_TRUE(agrees_to_digits(found.propagated_half_width, 1.92246267, 9));
  ASSERT_TRUE(found.interval);
  EXPECT_TRUE(agrees_to_digits(found.interval->lower, 15.43695871, 10));
  EXPECT_TRUE(agrees_to_digits(found.interval->upper, 19.29383380, 10));
  // The larger side, 19.29383380 - 17.26053640.
  EXPECT_TRUE(agrees_to_digits(*found.expanded_uncertainty, 2.0332974, 8));
}

// Without noise nothing is left but the amount: y = 4 (x + 2.5).
TEST(StandardAddition, ExactLineGivesTheExactAmount) {
  const Outcome<Calibration> line =
      fit_addition_line(standards({{0, 10}, {0, 10}, {2, 18}, {6, 34}}));
  ASSERT_TRUE(line);
  EXPECT_TRUE(
      test::within_condition(amount_by_addition(*line).amount, 2.5, 100.0));
  EXPECT_EQ(line->used_levels(), 2U);
  EXPECT_EQ(line->lowest, 2.0);
  EXPECT_EQ(line->highest, 6.0);
}

TEST(StandardAddition, PointsLeftOutStayBesideTheLine) {
  auto points = silver();
  points[3].used = false;
  points[3].response = 5.0;
  points[3].note = "saturated";
  const Outcome<Calibration> line = fit_addition_line(points);
  ASSERT_TRUE(line);
  EXPECT_EQ(line->used_points(), 6U);
  EXPECT_EQ(line->points.size(), 7U);
  EXPECT_TRUE(line->points[3].back_calculated.has_value());
  EXPECT_EQ(line->points[3].weight, 0.0);
  EXPECT_TRUE(agrees_to_digits(amount_by_addition(*line).amount, 17.3, 2));
}

TEST(StandardAddition, RefusesWhatMakesNoLine) {
  EXPECT_TRUE(begins(reason(fit_addition_line({})), "no-sample-response: "));
  EXPECT_TRUE(begins(reason(fit_addition_line(standards({{5, 1}, {10, 2}}))),
                     "no-sample-response: "));
  EXPECT_TRUE(begins(
      reason(fit_addition_line(standards({{0, 1}, {0, 1.1}, {5, 2}, {5, 2}}))),
      "few-additions: 1 different"));
  EXPECT_TRUE(
      begins(reason(fit_addition_line(standards({{0, 2}, {5, 2}, {10, 2}}))),
             "slope-not-positive: "));
  EXPECT_TRUE(
      begins(reason(fit_addition_line(standards({{0, 3}, {5, 2}, {10, 1}}))),
             "slope-not-positive: "));
}

// One degree of freedom and points off the line: t is 12.7, the slope could
// be nothing.
TEST(StandardAddition, NoIntervalWhereTheSlopeMayBeZero) {
  const Outcome<Calibration> line =
      fit_addition_line(standards({{0, 1.0}, {5, 2.5}, {10, 3.0}}));
  ASSERT_TRUE(line);
  const StandardAddition found = amount_by_addition(*line);
  EXPECT_FALSE(found.expanded_uncertainty.has_value());
  ASSERT_FALSE(found.interval);
  EXPECT_TRUE(begins(found.interval.reason(), "no-finite-interval: "));
}

}  // namespace
}  // namespace loqsmith
