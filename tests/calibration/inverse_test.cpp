#include "loqsmith/calibration/inverse.hpp"

#include <algorithm>
#include <cmath>

#include "calibration/examples.hpp"
#include "loqsmith/calibration/weight.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

// Miller and Miller (from memory): 2.9 -> 0.72 +- 0.68, 13.5 -> 6.21 +- 0.62,
// 23.0 -> 11.13 +- 0.68; the mean of four readings of 13.5 -> +- 0.36. Further
// digits and Fieller's bounds computed independently.
TEST(Inverse, FluorescenceLine) {
  struct Row {
    double response;
    int replicates;
    double published, published_half;
    double concentration, half, lower, upper;
  };
  const auto line = fit_calibration(fluorescence(), {});
  ASSERT_TRUE(line);
  for (const Row& row : std::initializer_list<Row>{
           {2.9, 1, 0.72, 0.68, 0.71600370, 0.68009825, 0.01899159, 1.38157291},
           {13.5, 1, 6.21, 0.62, 6.20721554, 0.61630785, 5.59060774,
            6.82505639},
           {23.0, 1, 11.13, 0.68, 11.12858464, 0.67655981, 10.46610635,
            11.82158104},
           {13.5, 4, 6.21, 0.36, 6.20721554, 0.36145815, 5.84583607,
            6.56982807}}) {
    const auto found =
        concentration_from_response(*line, row.response, row.replicates);
    ASSERT_TRUE(found && found->expanded_uncertainty);
    EXPECT_TRUE(agrees_to_digits(found->concentration, row.published,
                                 row.published > 10  ? 4
                                 : row.published > 1 ? 3
                                                     : 2));
    EXPECT_TRUE(
        agrees_to_digits(*found->propagated_half_width, row.published_half, 2));
    EXPECT_TRUE(agrees_to_digits(found->concentration, row.concentration, 8));
    EXPECT_TRUE(agrees_to_digits(*found->propagated_half_width, row.half, 8));
    const auto exact = fieller_interval(*line, row.response, row.replicates);
    ASSERT_TRUE(exact);
    EXPECT_TRUE(agrees_to_digits(exact->lower, row.lower, 7));
    EXPECT_TRUE(agrees_to_digits(exact->upper, row.upper, 9));
    ASSERT_TRUE(found->interval);
    EXPECT_TRUE(same_bits(found->interval->lower, exact->lower));
    EXPECT_TRUE(same_bits(found->interval->upper, exact->upper));
    EXPECT_TRUE(same_bits(*found->expanded_uncertainty,
                          std::max(exact->upper - found->concentration,
                                   found->concentration - exact->lower)));
  }
}

// The unweighted absorbance example of the same book (from memory): 1.20 and
// 8.09, half widths 0.65 and 0.63... computed 0.6543823 and 0.6373465.
TEST(Inverse, AbsorbanceLine) {
  const auto line = fit_calibration(
      standards(
          {{0, .009}, {2, .158}, {4, .301}, {6, .472}, {8, .577}, {10, .739}}),
      {});
  ASSERT_TRUE(line);
  const auto low = concentration_from_response(*line, 0.100);
  const auto high = concentration_from_response(*line, 0.600);
  ASSERT_TRUE(low && high);
  EXPECT_TRUE(agrees_to_digits(low->concentration, 1.20, 3));
  EXPECT_TRUE(agrees_to_digits(low->concentration, 1.195352501, 10));
  EXPECT_TRUE(agrees_to_digits(high->concentration, 8.09, 3));
  EXPECT_TRUE(agrees_to_digits(high->concentration, 8.087829854, 10));
  EXPECT_TRUE(agrees_to_digits(*low->propagated_half_width, 0.6543823, 7));
  EXPECT_TRUE(agrees_to_digits(*high->propagated_half_width, 0.6373465, 7));
}

TEST(Inverse, WeightedLine) {
  const auto line =
      fit_calibration(seven_levels(), {.weight = Weight::InverseXSquared});
  ASSERT_TRUE(line);
  const auto low = concentration_from_response(*line, 15.0);
  const auto high = concentration_from_response(*line, 300.0);
  ASSERT_TRUE(low && high);
  EXPECT_TRUE(agrees_to_digits(low->concentration, 1.4297603189, 11));
  EXPECT_TRUE(agrees_to_digits(*low->propagated_half_width, 0.11995052, 8));
  EXPECT_TRUE(agrees_to_digits(high->concentration, 29.9168818106, 12));
  EXPECT_TRUE(agrees_to_digits(*high->propagated_half_width, 2.35618398, 9));
}

TEST(Inverse, BelowTheLowestLevelTheWeightStaysThatOfTheLowestLevel) {
  const auto line =
      fit_calibration(seven_levels(), {.weight = Weight::InverseXSquared});
  ASSERT_TRUE(line);
  EXPECT_TRUE(
      same_bits(response_sd_at(*line, 0.0), response_sd_at(*line, 1.0)));
  EXPECT_TRUE(
      within_condition(response_sd_at(*line, 5.0), 5 * line->residual_sd, 4));
  const auto blank = concentration_from_response(*line, 0.2);
  ASSERT_TRUE(blank && blank->expanded_uncertainty);
  EXPECT_LT(blank->concentration, 0.0);  // signed, not censored
  EXPECT_GT(*blank->expanded_uncertainty, 0.0);
}

TEST(Inverse, Quadratic) {
  const auto curve =
      fit_calibration(seven_levels(), {.model = Model::Quadratic});
  ASSERT_TRUE(curve);
  const auto found = concentration_from_response(*curve, 300.0);
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits(found->concentration, 30.3680333947, 11));
  EXPECT_TRUE(agrees_to_digits(*found->propagated_half_width, 1.53799862, 9));
}

// A curve that turns at x = 16.6, y = 40.67: there is no concentration above.
TEST(Inverse, QuadraticHasNoConcentrationBeyondItsVertex) {
  const auto curve = fit_calibration(
      standards(
          {{0, 0.1}, {2, 8.0}, {4, 15.7}, {6, 24.2}, {8, 31.5}, {10, 33.0}}),
      {.model = Model::Quadratic});
  ASSERT_TRUE(curve);
  EXPECT_TRUE(concentration_from_response(*curve, 40.0));
  EXPECT_FALSE(concentration_from_response(*curve, 41.0));
  // Just below it the interval has no upper end.
  const auto near = concentration_from_response(*curve, 40.0);
  EXPECT_FALSE(near->expanded_uncertainty);
  EXPECT_TRUE(concentration_from_response(*curve, 5.0)->expanded_uncertainty);
}

TEST(Inverse, VanishingCurvatureGivesTheStraightLine) {
  Calibration curve;
  curve.settings.model = Model::Quadratic;
  curve.intercept = 3.0;
  curve.slope = 7.0;
  for (double curvature : {1e-18, -1e-18, 0.0}) {
    curve.curvature = curvature;
    const auto found = concentration_from_response(curve, 17.0);
    ASSERT_TRUE(found);
    EXPECT_TRUE(within_condition(found->concentration, 2.0, 4));
  }
}

TEST(Inverse, MeanResponseFactor) {
  const auto factor =
      fit_calibration(seven_levels(), {.model = Model::ResponseFactor});
  ASSERT_TRUE(factor);
  const auto found = concentration_from_response(*factor, 300.0);
  ASSERT_TRUE(found);
  const double x = 300.0 / factor->slope;
  EXPECT_TRUE(within_condition(found->concentration, x, 4));
  // x sd/mean sqrt(1 + 1/n), two-sided t of 6 degrees of freedom 2.446912.
  EXPECT_TRUE(agrees_to_digits(
      *found->propagated_half_width,
      2.446912 * x * factor->residual_sd / factor->slope * std::sqrt(8.0 / 7.0),
      6));
}

// Scatter so large that the slope does not differ from zero: g >= 1.
TEST(Inverse, NoFiniteIntervalWithoutASignificantSlope) {
  const auto line = fit_calibration(
      standards({{1, 10}, {2, 2}, {3, 14}, {4, 3}, {5, 13}}), {});
  ASSERT_TRUE(line);
  const auto found = concentration_from_response(*line, 9.0);
  ASSERT_TRUE(found);
  EXPECT_FALSE(found->expanded_uncertainty);
  EXPECT_FALSE(fieller_interval(*line, 9.0));
}

TEST(Inverse, TheClosedFormIsForTheUnweightedLine) {
  for (const CalibrationSettings& settings :
       {CalibrationSettings{.weight = Weight::InverseX},
        CalibrationSettings{.model = Model::ResponseFactor},
        CalibrationSettings{.model = Model::Quadratic}}) {
    const auto fitted = fit_calibration(seven_levels(), settings);
    ASSERT_TRUE(fitted);
    EXPECT_FALSE(fieller_interval(*fitted, 100.0));
  }
}

TEST(Inverse, UndoesTheCurve) {
  for (Model model : {Model::Linear, Model::Quadratic, Model::ResponseFactor}) {
    const auto curve = fit_calibration(seven_levels(), {.model = model});
    ASSERT_TRUE(curve);
    for (double x : {0.05, 1.0, 17.0, 99.0, 140.0}) {
      const double y = response_from_concentration(*curve, x);
      const auto back = concentration_from_response(*curve, y);
      ASSERT_TRUE(back);
      EXPECT_TRUE(within_condition(back->concentration, x, 100, x + 1.0));
    }
  }
}

}  // namespace
}  // namespace loqsmith::test
