#pragma once

#include <optional>
#include <vector>

#include "loqsmith/calibration/calibration.hpp"
#include "loqsmith/calibration/diagnostic_test.hpp"

namespace loqsmith {

/// How much one used standard weighs in the curve, and how far it lies off.
struct PointInfluence {
  int injection = 0;
  double concentration = 0.0;
  double leverage = 0.0;  ///< 0 to 1, sum over the points = coefficients
  /// Weighted residual over its own standard deviation s sqrt(1 - leverage).
  double standardised_residual = 0.0;
  /// The same with s from the fit without the point: Student's t with
  /// n - p - 1 degrees of freedom. Absent where the others lie on the curve.
  std::optional<double> deleted_residual;
  double cooks_distance = 0.0;
  bool high_leverage = false;  ///< above 2 coefficients / n
  bool influential = false;    ///< Cook's distance above F_0.5(p, n - p)
};

/// Each used standard in run order:
///
///     h_i = w_i v^T Cov v / s^2,  r_i = sqrt(w_i) e_i / (s sqrt(1 - h_i)),
///     D_i = r_i^2 h_i / ((1 - h_i) p)
///
/// Source: R. D. Cook, Technometrics 19 (1977) 15; D. C. Hoaglin and R. E.
/// Welsch, American Statistician 32 (1978) 17; from memory.
///
/// @return not applicable: "not-defined" where the standards lie exactly on
///         the curve, or one of them alone determines a coefficient
///         (leverage 1).
Outcome<std::vector<PointInfluence>> point_influence(
    const Calibration& calibration);

/// The largest leverage against 2 p / n, a rule without a probability.
/// @return as above; "few-points" where n is not above 2 p.
Outcome<DiagnosticTest> largest_leverage(const Calibration& calibration);

/// The largest Cook's distance against F_0.5(p, n - p); p is the tail of that
/// distribution, which here is a yardstick only.
Outcome<DiagnosticTest> largest_cooks_distance(const Calibration& calibration);

/// The largest deleted residual against Student's t at 0.05 / n, two-sided
/// (Bonferroni): whether one standard lies off the curve through the others.
/// @return as above; "few-points" below two degrees of freedom, "not-defined"
///         where the others lie exactly on a curve.
Outcome<DiagnosticTest> outlying_residual(const Calibration& calibration);

}  // namespace loqsmith
