#include "loqsmith/calibration/inverse.hpp"

#include <cmath>

#include "loqsmith/calibration/weight.hpp"
#include "loqsmith/numerics/distributions.hpp"

namespace loqsmith {
namespace {

double two_sided_t(const Calibration& calibration) {
  return student_t_quantile(0.975, calibration.degrees_of_freedom);
}

double derivative_at(const Calibration& calibration, double x) {
  return calibration.slope + 2.0 * calibration.curvature * x;
}

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
  const double derivative = derivative_at(calibration, x);
  const double variance = variance_along(calibration, {0.0, 1.0, 2.0 * x});
  return t * t * variance < derivative * derivative;
}

bool stays_below_vertex(const Calibration& calibration, double response) {
  if (!(calibration.curvature < 0.0)) return true;
  const double vertex =
      calibration.intercept -
      calibration.slope * calibration.slope / (4.0 * calibration.curvature);
  return response < vertex;
}

std::optional<double> half_width(const Calibration& calibration,
                                 double response, double x, int replicates) {
  if (calibration.degrees_of_freedom < 1 || replicates < 1) return std::nullopt;
  const double t = two_sided_t(calibration);
  const double derivative = derivative_at(calibration, x);
  if (!(derivative > 0.0) || !slope_is_significant(calibration, x, t))
    return std::nullopt;
  const double sd = response_sd_at(calibration, x);
  const double response_half =
      t * std::sqrt(sd * sd / replicates +
                    variance_along(calibration, {1.0, x, x * x}));
  if (!stays_below_vertex(calibration, response + response_half))
    return std::nullopt;
  const double half = response_half / derivative;
  if (!std::isfinite(half)) return std::nullopt;
  return half;
}

}  // namespace

double response_from_concentration(const Calibration& calibration,
                                   double concentration) {
  return calibration.intercept +
         concentration *
             (calibration.slope + concentration * calibration.curvature);
}

// The root is written so that nothing cancels and that it becomes the straight
// line's as the curvature vanishes: 2 d / (b + sqrt(b^2 + 4 c d)), d = y - a.
Outcome<InversePrediction> concentration_from_response(
    const Calibration& calibration, double response, int replicates) {
  const double above = response - calibration.intercept;
  const double discriminant = calibration.slope * calibration.slope +
                              4.0 * calibration.curvature * above;
  if (!(discriminant >= 0.0))
    return NotApplicable{
        "beyond-curve: the response lies beyond the turning point of the "
        "quadratic curve"};
  InversePrediction found;
  found.concentration =
      2.0 * above / (calibration.slope + std::sqrt(discriminant));
  if (!std::isfinite(found.concentration))
    return NotApplicable{"beyond-curve: the concentration has no finite value"};
  found.expanded_uncertainty =
      half_width(calibration, response, found.concentration, replicates);
  return found;
}

// About the centre of the line, mean_x = -Cov(a,b)/Var(b):
//   mean_x + (d +- t s sqrt((1 - g)(1/m + 1/n) + d^2/S)) / (1 - g),
// d the distance of x0 from mean_x, s and S^-1/2 in units of the slope.
Outcome<ConcentrationInterval> fieller_interval(const Calibration& calibration,
                                                double response,
                                                int replicates) {
  const CalibrationSettings& settings = calibration.settings;
  if (settings.model != CalibrationSettings::Model::Linear ||
      settings.weight != CalibrationSettings::Weight::None ||
      settings.intercept != CalibrationSettings::Intercept::Fitted)
    return NotApplicable{
        "not-available: the exact interval is that of an unweighted straight "
        "line"};
  const double b = calibration.slope;
  const double slope_variance = calibration.covariance[1][1];
  const double t = two_sided_t(calibration);
  const double g = t * t * slope_variance / (b * b);
  if (!(g < 1.0))
    return NotApplicable{
        "no-finite-interval: the slope does not differ from zero"};

  const double mean_x = slope_variance > 0.0
                            ? -calibration.covariance[0][1] / slope_variance
                            : 0.0;
  const double distance = (response - calibration.intercept) / b - mean_x;
  const double s = calibration.residual_sd;
  const double variance_of_mean =
      s * s / replicates + variance_along(calibration, {1.0, mean_x, 0.0});
  const double half = t / b *
                      std::sqrt((1.0 - g) * variance_of_mean +
                                distance * distance * slope_variance) /
                      (1.0 - g);
  const double centre = mean_x + distance / (1.0 - g);
  return ConcentrationInterval{centre - half, centre + half};
}

}  // namespace loqsmith
