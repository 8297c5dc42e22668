#include <cmath>

#include "loqsmith/calibration/inverse.hpp"
#include "loqsmith/numerics/distributions.hpp"

namespace loqsmith {

// About the centre of the line, mean_x = -Cov(a,b)/Var(b):
//   mean_x + (d +- t s sqrt((1 - g)(1/m + 1/n) + d^2/S)) / (1 - g),
// d the distance of x0 from mean_x, s and S^-1/2 in units of the slope. Through
// zero there is no 1/n and the centre is the origin.
Outcome<ConcentrationInterval> fieller_interval(const Calibration& calibration,
                                                double response,
                                                int replicates) {
  const CalibrationSettings& settings = calibration.settings;
  if (settings.model != CalibrationSettings::Model::Linear ||
      settings.weight != CalibrationSettings::Weight::None)
    return NotApplicable{
        "not-available: the closed form is that of an unweighted straight "
        "line"};
  const double b = calibration.slope;
  const double slope_variance = calibration.covariance[1][1];
  const double t = student_t_quantile(0.975, calibration.degrees_of_freedom);
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
      s * s / replicates + curve_variance(calibration, mean_x);
  const double half = t / b *
                      std::sqrt((1.0 - g) * variance_of_mean +
                                distance * distance * slope_variance) /
                      (1.0 - g);
  const double centre = mean_x + distance / (1.0 - g);
  if (!std::isfinite(centre) || !std::isfinite(half))
    return NotApplicable{"no-finite-interval: beyond the range of numbers"};
  return ConcentrationInterval{centre - half, centre + half};
}

}  // namespace loqsmith
