#include "loqsmith/limits/intercept_deviation.hpp"

#include "limits/line_examples.hpp"
#include "loqsmith/limits/words.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

ProcedureSettings ich() {
  return with_factors(procedure("intercept-deviation"), 3.3, 10.0);
}

Outcome<LimitEstimate> limit(const LimitEvidence& evidence) {
  return intercept_deviation(evidence, {}, ich());
}

// Miller and Miller, fluorescence line: s_a 0.2949 (printed, from memory);
// limits by ICH's factors and chi-square bounds for 5 degrees of freedom,
// computed independently.
TEST(InterceptDeviation, FluorescenceLine) {
  const auto found = limit(fitted(fluorescence()));
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits(
      *term(*found, "standard deviation of the intercept"), 0.2949, 4));
  EXPECT_TRUE(agrees_to_digits(
      *term(*found, "standard deviation of the intercept"), 0.2949360014, 10));
  EXPECT_TRUE(agrees_to_digits(*found->detection, 0.5042014158, 10));
  EXPECT_TRUE(agrees_to_digits(*found->quantitation, 1.5278830782, 10));
  const SpreadBounds bounds = standard_deviation_bounds(5.0, 0.95);
  EXPECT_TRUE(agrees_to_digits(bounds.lower, 0.624208, 6));
  EXPECT_TRUE(agrees_to_digits(bounds.upper, 2.452614, 7));
  EXPECT_TRUE(within_condition(*found->detection_lower,
                               bounds.lower * *found->detection, 4));
  EXPECT_TRUE(within_condition(*found->quantitation_upper,
                               bounds.upper * *found->quantitation, 4));
  EXPECT_EQ(found->degrees_of_freedom, 5.0);
  EXPECT_EQ(found->n, 7U);
  EXPECT_FALSE(found->critical_value);
}

// k s_a / (s sqrt(1 + h0)) is 1.8577 here: P(t_5 >= that) = 6.1 %.
TEST(InterceptDeviation, SaysWhatAnInterceptsScatterPromises) {
  const auto found = limit(fitted(fluorescence()));
  ASSERT_TRUE(found);
  ASSERT_TRUE(finding(*found, "intercept-not-response"));
  EXPECT_EQ(found->grade(), Grade::Caution);
  const double rate = *term(
      *found,
      "rate of blanks at or above the detection limit by the line's scatter");
  EXPECT_TRUE(agrees_to_digits(
      rate,
      student_t_upper_tail(
          3.3 * 0.2949360014 / std::hypot(0.4328477132, 0.2949360014), 5.0),
      8));
  EXPECT_TRUE(contains(finding(*found, "intercept-not-response")->text,
                       percent_figure(rate)));

  const auto wide = intercept_deviation(
      fitted(fluorescence()), {},
      with_factors(procedure("intercept-deviation"), 6.0, 10.0));
  EXPECT_FALSE(finding(*wide, "intercept-not-response"));
}

TEST(InterceptDeviation, NotApplicable) {
  EXPECT_TRUE(contains(limit({}).reason(), "no-calibration: "));
  EXPECT_TRUE(contains(
      limit(fitted(seven_levels(), {.model = Model::Quadratic})).reason(),
      "quadratic-calibration: "));
  EXPECT_TRUE(contains(
      limit(fitted(fluorescence(), {.intercept = Intercept::Zero})).reason(),
      "line-through-zero: "));
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
}

}  // namespace
}  // namespace loqsmith::test
