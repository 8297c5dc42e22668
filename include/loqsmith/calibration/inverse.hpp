#pragma once

#include <optional>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/calibration/calibration.hpp"

namespace loqsmith {

struct ConcentrationInterval {
  double lower = 0.0;
  double upper = 0.0;
};

struct InversePrediction {
  double concentration = 0.0;  ///< method's unit; may be negative or beyond
  /// The exact 95 % interval from the calibration alone; not symmetric. Absent
  /// where it has no finite end on either side.
  std::optional<ConcentrationInterval> interval;
  /// One number for the interval: its larger side, so that concentration +-
  /// this contains it and covers at least as often. Half of its length would
  /// cover less than 95 % of the time on one side.
  std::optional<double> expanded_uncertainty;
  /// For comparison the half width by propagation of errors:
  ///
  ///     t_{0.975, nu} sqrt(variance(x0)) / y'(x0)
  ///
  /// variance as in prediction_spread.hpp, y' the curve's derivative. For the
  /// straight line this is the usual textbook formula (Miller and Miller,
  /// Statistics and Chemometrics for Analytical Chemistry, calibration
  /// chapter).
  std::optional<double> propagated_half_width;
};

/// Concentration whose response the curve gives, on its rising branch, with its
/// interval: of the straight line Fieller's (1954), see fieller_interval(), of
/// every other curve the profile interval, see profile_interval().
///
/// The interval is absent where it has no finite end: the slope does not differ
/// from zero at this confidence (Fieller's g >= 1), or an end lies beyond a
/// quadratic's vertex.
///
/// @param replicates  m >= 1: `response` is the mean of so many
/// @return not applicable: the response lies beyond a quadratic's vertex, the
///         concentration is too large for a double.
Outcome<InversePrediction> concentration_from_response(
    const Calibration& calibration, double response, int replicates = 1);

/// The concentration alone, without its interval; refusals as above.
Outcome<double> point_on_curve(const Calibration& calibration, double response);

/// The exact 95 % interval (E. C. Fieller, J. R. Statist. Soc. B 16 (1954) 175)
/// of a concentration from an unweighted straight line, in closed form, with or
/// without intercept. It is the interval of profile_interval().
/// @return not applicable: another model, no finite interval (g >= 1).
Outcome<ConcentrationInterval> fieller_interval(const Calibration& calibration,
                                                double response,
                                                int replicates = 1);

/// The concentrations x that a t test at 5 % does not refuse, given a response:
///
///     (y0 - f(x))^2 <= t_{0.975, nu}^2 variance(x)
///
/// variance as in prediction_spread.hpp: s(x)^2 / m + v(x)^T Cov v(x) where the
/// weights hold. Since f is linear in its coefficients, this is the profile of
/// the sum of squares over them, and for normal responses it covers exactly
/// 95 % of the time. The variance is taken at each trial end x and not at the
/// estimate: what is tested is whether the sample may lie at x, and there the
/// responses would scatter by s(x). With additive and proportional errors,
/// weight 1/x2 and seven blanks it covers between 0.93 and 0.97 from the lowest
/// standard up as long as the additive part at the lowest is at most four times
/// the proportional one.
///
/// Ends are found by bisection to the last bit.
///
/// @return not applicable: "no-finite-interval" where the slope does not differ
///         from zero, or an end lies beyond a quadratic's vertex.
Outcome<ConcentrationInterval> profile_interval(const Calibration& calibration,
                                                double response,
                                                int replicates = 1);

/// The curve itself.
double response_from_concentration(const Calibration& calibration,
                                   double concentration);

/// v^T Cov v for v = (1, x, x^2): the variance of the curve at x.
double curve_variance(const Calibration& calibration, double concentration);

}  // namespace loqsmith
