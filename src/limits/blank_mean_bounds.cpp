#include "loqsmith/limits/blank_mean_bounds.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <optional>

#include "loqsmith/limits/bootstrap_ratio_bounds.hpp"
#include "loqsmith/limits/drawn_truth.hpp"

namespace loqsmith {
namespace {

struct Line {
  double intercept = 0.0;
  double slope = 0.0;
};

// Intercept and slope at zero that may be the true ones: Student's t of two
// dimensions about the fitted ones.
Line drawn_line(RandomStream& random, const Calibration& fitted) {
  const int nu = std::max(1, fitted.degrees_of_freedom);
  const double scale =
      std::sqrt(static_cast<double>(nu) / drawn_chi_square(random, nu));
  const double along = scale * random.normal();
  const double across = scale * random.normal();
  const double var_a = fitted.covariance[0][0];
  const double var_b = fitted.covariance[1][1];
  Line line{fitted.intercept, fitted.slope};
  if (var_a > 0.0) {
    const double common = fitted.covariance[0][1] / std::sqrt(var_a);
    const double own = std::max(0.0, var_b - common * common);
    line.intercept += std::sqrt(var_a) * along;
    line.slope += common * along + std::sqrt(own) * across;
  } else {
    line.slope += std::sqrt(std::max(0.0, var_b)) * across;
  }
  return line;
}

std::optional<double> ratio(const std::optional<double>& limit, double factor,
                            const NormalPopulation& blanks, const Line& line) {
  if (!limit || !(line.slope > 0.0)) return std::nullopt;
  const double drawn =
      (blanks.mean + factor * blanks.sd - line.intercept) / line.slope;
  if (!(drawn > 0.0)) return std::numeric_limits<double>::infinity();
  return *limit / drawn;
}

}  // namespace

void set_blank_mean_bounds(LimitEstimate& estimate, const BlankSample& sample,
                           const Calibration& calibration,
                           const ProcedureSettings& procedure) {
  const std::optional<double> detection = estimate.detection;
  const std::optional<double> quantitation = estimate.quantitation;
  set_bootstrap_bounds(estimate, procedure.name, [&](RandomStream& random) {
    const NormalPopulation blanks =
        drawn_population(random, sample.mean, sample.sd, sample.n());
    const Line line = drawn_line(random, calibration);
    return DrawnRatios{
        ratio(detection, procedure.detection_factor, blanks, line),
        ratio(quantitation, procedure.quantitation_factor, blanks, line)};
  });
}

}  // namespace loqsmith
