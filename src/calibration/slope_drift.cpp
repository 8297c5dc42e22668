#include "loqsmith/calibration/slope_drift.hpp"

#include <cmath>
#include <vector>

#include "loqsmith/base/reading_figures.hpp"
#include "loqsmith/calibration/fitted_points.hpp"
#include "loqsmith/calibration/model_powers.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/least_squares.hpp"

namespace loqsmith {
namespace {

constexpr double kConfidence = 0.95;

// The columns of the model, then x (order - mean order).
std::vector<std::vector<double>> columns_with_drift(const FittedPoints& points,
                                                    ModelPowers powers) {
  std::vector<std::vector<double>> columns;
  for (int power = powers.lowest; power <= powers.highest; ++power) {
    columns.emplace_back();
    for (double x : points.concentration)
      columns.back().push_back(power == 0 ? 1.0 : power == 1 ? x : x * x);
  }
  double sum = 0.0;
  for (int injection : points.injection) sum += injection;
  const double middle = sum / static_cast<double>(points.size());
  columns.emplace_back();
  for (std::size_t i = 0; i < points.size(); ++i)
    columns.back().push_back(points.concentration[i] *
                             (points.injection[i] - middle));
  return columns;
}

std::string meaning_of(const SlopeDrift& drift) {
  const DiagnosticTest& test = drift.test;
  return std::string(test.passed ? "the slope does not drift beyond its scatter"
                                 : "the slope drifts over the sequence") +
         ": " + figure(drift.percent_over_standards) +
         " % from the first to the last standard (t " + figure(test.statistic) +
         ", critical value " + figure(test.critical) + ")";
}

}  // namespace

Outcome<SlopeDrift> slope_drift(const Calibration& calibration) {
  const FittedPoints points = fitted_points(calibration);
  const ModelPowers powers = model_powers(calibration.settings);
  if (static_cast<int>(points.size()) <= powers.count() + 1)
    return NotApplicable{"few-points: the drift leaves no degree of freedom"};
  const auto fit = fit_columns(columns_with_drift(points, powers),
                               points.response, points.weight);
  if (!fit)
    return NotApplicable{
        "order-follows-level: a drift could not be told from the curve"};
  if (is_without_scatter(points, fit->residual_sd))
    return NotApplicable{"not-defined: the standards do not scatter"};

  const std::size_t at = fit->coefficients.size() - 1;
  const std::size_t slope_at = powers.lowest == 0 ? 1 : 0;
  SlopeDrift drift;
  drift.percent_per_injection =
      100.0 * fit->coefficients[at] / fit->coefficients[slope_at];
  drift.percent_over_standards =
      drift.percent_per_injection *
      (points.injection.back() - points.injection.front());
  DiagnosticTest& test = drift.test;
  test.name = "slope-drift";
  test.degrees_1 = fit->degrees_of_freedom;
  test.statistic = fit->coefficients[at] / fit->standard_errors[at];
  test.critical = student_t_quantile(0.5 + 0.5 * kConfidence, *test.degrees_1);
  test.p =
      2.0 * student_t_upper_tail(std::abs(test.statistic), *test.degrees_1);
  test.passed = std::abs(test.statistic) <= test.critical;
  if (!std::isfinite(drift.percent_over_standards))
    return NotApplicable{"not-defined: the slope is zero"};
  test.meaning = meaning_of(drift);
  return drift;
}

}  // namespace loqsmith
