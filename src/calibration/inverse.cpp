#include "loqsmith/calibration/inverse.hpp"

#include <algorithm>
#include <array>
#include <cmath>

#include "loqsmith/calibration/prediction_spread.hpp"
#include "loqsmith/numerics/distributions.hpp"

namespace loqsmith {
namespace {

// v^T Cov v of the row v.
double variance_along(const Calibration& calibration,
                      const std::array<double, 3>& row) {
  double sum = 0.0;
  for (std::size_t i = 0; i < 3; ++i)
    for (std::size_t j = 0; j < 3; ++j)
      sum += row[i] * calibration.covariance[i][j] * row[j];
  return sum;
}

// Whether t times the slope's own standard error leaves it above zero.
bool slope_is_significant(const Calibration& calibration, double x, double t) {
  const double derivative = calibration.slope + 2.0 * calibration.curvature * x;
  const double variance = variance_along(calibration, {0.0, 1.0, 2.0 * x});
  return derivative > 0.0 && t * t * variance < derivative * derivative;
}

std::optional<double> propagated_half_width(const Calibration& calibration,
                                            double x, int replicates) {
  const PredictionSpread spread(calibration, replicates);
  const double t = student_t_quantile(0.975, spread.degrees_at(x));
  if (!slope_is_significant(calibration, x, t)) return std::nullopt;
  const double half = t * std::sqrt(spread.variance_at(x)) /
                      (calibration.slope + 2.0 * calibration.curvature * x);
  if (!std::isfinite(half)) return std::nullopt;
  return half;
}

bool is_unweighted_line(const CalibrationSettings& settings) {
  return settings.model == CalibrationSettings::Model::Linear &&
         settings.weight == CalibrationSettings::Weight::None;
}

void set_interval(InversePrediction& found, const Calibration& calibration,
                  double response, int replicates) {
  if (calibration.degrees_of_freedom < 1 || replicates < 1) return;
  found.propagated_half_width =
      propagated_half_width(calibration, found.concentration, replicates);
  if (!found.propagated_half_width) return;
  const auto interval =
      is_unweighted_line(calibration.settings)
          ? fieller_interval(calibration, response, replicates)
          : profile_interval(calibration, response, replicates);
  if (!interval) return;
  found.interval = *interval;
  found.expanded_uncertainty = std::max(interval->upper - found.concentration,
                                        found.concentration - interval->lower);
}

}  // namespace

double response_from_concentration(const Calibration& calibration,
                                   double concentration) {
  return calibration.intercept +
         concentration *
             (calibration.slope + concentration * calibration.curvature);
}

double curve_variance(const Calibration& calibration, double concentration) {
  return variance_along(calibration,
                        {1.0, concentration, concentration * concentration});
}

// The root is written so that nothing cancels and that it becomes the straight
// line's as the curvature vanishes: 2 d / (b + sqrt(b^2 + 4 c d)), d = y - a.
Outcome<double> point_on_curve(const Calibration& calibration,
                               double response) {
  const double above = response - calibration.intercept;
  const double discriminant = calibration.slope * calibration.slope +
                              4.0 * calibration.curvature * above;
  if (!(discriminant >= 0.0))
    return NotApplicable{
        "beyond-curve: the response lies beyond the turning point of the "
        "quadratic curve"};
  const double x = 2.0 * above / (calibration.slope + std::sqrt(discriminant));
  if (!std::isfinite(x))
    return NotApplicable{"beyond-curve: the concentration has no finite value"};
  return x;
}

Outcome<InversePrediction> concentration_from_response(
    const Calibration& calibration, double response, int replicates) {
  const Outcome<double> point = point_on_curve(calibration, response);
  if (!point) return NotApplicable{point.reason()};
  InversePrediction found;
  found.concentration = *point;
  set_interval(found, calibration, response, replicates);
  return found;
}

}  // namespace loqsmith
