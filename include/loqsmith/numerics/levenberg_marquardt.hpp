#pragma once

#include <cstddef>
#include <functional>
#include <span>
#include <vector>

#include "loqsmith/base/outcome.hpp"

namespace loqsmith {

/// What is to be fitted: n residuals of p parameters.
struct NonlinearProblem {
  std::size_t residuals = 0;  ///< n, more than p
  /// Writes the n residuals (modelled minus observed).
  std::function<void(std::span<const double> parameters, std::span<double>)>
      residuals_at;
  /// Writes the n x p derivatives of the residuals, column after column.
  std::function<void(std::span<const double> parameters, std::span<double>)>
      derivatives_at;
};

struct NonlinearFit {
  std::vector<double> parameters;  ///< p, all finite
  double residual_sum = 0.0;       ///< sum of squares
  int evaluations = 0;             ///< of the residuals
  /// (J'J)^-1 at the parameters, p x p, row after row: their covariance for
  /// independent residuals of variance 1.
  std::vector<double> inverse;
};

/// Parameters that make the sum of squared residuals smallest, from a start
/// that is near enough, by the trust-region method of Levenberg and Marquardt
/// in the form of MINPACK (J. J. More, 1978), which scales the parameters by
/// its own derivatives. Points where the residuals are not finite count as
/// infinitely bad and are stepped back from.
///
/// Converged means: neither the sum of squares nor the parameters (relative to
/// their own size) change by more than `tolerance` any more, or rounding
/// allows no further step.
///
/// @param most_evaluations  of the residuals
/// @return not applicable, saying why not: no more residuals than parameters,
///         residuals not finite at the start, evaluations used up, parameters
///         that the residuals do not determine. Never a NaN.
Outcome<NonlinearFit> minimise_squares(const NonlinearProblem& problem,
                                       const std::vector<double>& start,
                                       int most_evaluations = 200,
                                       double tolerance = 1e-10);

}  // namespace loqsmith
