#pragma once

#include <optional>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/calibration/calibration.hpp"

namespace loqsmith {

struct InversePrediction {
  double concentration = 0.0;  ///< method's unit; may be negative or beyond
  /// Half width of the 95 % interval from the calibration alone; absent where
  /// no finite interval exists.
  std::optional<double> expanded_uncertainty;
};

/// Concentration whose response the curve gives, on its rising branch, with the
/// half width of its 95 % interval by propagation of errors:
///
///     x0 +- t_{0.975, nu} sqrt(s(x0)^2 / m + v^T Cov v) / y'(x0)
///
/// v = (1, x0, x0^2), y' the curve's derivative, s(x0) the standard deviation
/// of one response (see weight.hpp), m the number of responses averaged. For
/// the straight line this is the usual textbook formula (Miller and Miller,
/// Statistics and Chemometrics for Analytical Chemistry, calibration chapter).
///
/// The half width is absent where the interval has no finite end: the slope
/// does not differ from zero at this confidence (Fieller's g >= 1), or the
/// upper end lies beyond a quadratic's vertex.
///
/// @param replicates  m >= 1: `response` is the mean of so many
/// @return not applicable: the response lies beyond a quadratic's vertex, the
///         concentration is too large for a double.
Outcome<InversePrediction> concentration_from_response(
    const Calibration& calibration, double response, int replicates = 1);

struct ConcentrationInterval {
  double lower = 0.0;
  double upper = 0.0;
};

/// The exact 95 % interval (Fieller 1954) of a concentration from an unweighted
/// straight line with fitted intercept; it is not symmetric.
/// @return not applicable: another model, no finite interval (g >= 1).
Outcome<ConcentrationInterval> fieller_interval(const Calibration& calibration,
                                                double response,
                                                int replicates = 1);

/// The curve itself.
double response_from_concentration(const Calibration& calibration,
                                   double concentration);

}  // namespace loqsmith
