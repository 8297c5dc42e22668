#pragma once

#include <functional>
#include <optional>
#include <span>
#include <vector>

#include "loqsmith/base/outcome.hpp"

namespace loqsmith {

/// Logarithm of a likelihood at p parameters, with its derivatives.
struct LikelihoodAt {
  double value = 0.0;
  std::vector<double> gradient;     ///< p
  std::vector<double> information;  ///< p x p: minus the second derivatives
  /// p values above zero in the unit of the information's diagonal: how the
  /// parameters compare where the information itself is not positive.
  std::vector<double> scale;
};

/// Nothing where the parameters are out of range: the search steps back.
using Likelihood =
    std::function<std::optional<LikelihoodAt>(std::span<const double>)>;

struct MaximumLikelihood {
  std::vector<double> parameters;
  double value = 0.0;  ///< logarithm of the likelihood
  /// Inverse of the observed information, p x p.
  std::vector<double> covariance;
  int evaluations = 0;
};

/// Parameters of the largest likelihood near the start: Newton steps on the
/// observed information, to which a multiple of the scale is added where it is
/// not positive definite or where a step does not climb (Levenberg). Only ever
/// climbs, and takes the same way every time.
///
/// Converged means: the next step promises less than `tolerance` of
/// log-likelihood, and the information is positive definite.
///
/// @param longest  greatest change of each parameter in one step, so that the
///                 climb stays on the hill it began on; empty: any
/// @return not applicable: start out of range, evaluations used up, no
///         maximum (information not positive definite where nothing climbs).
///
/// Source: D. W. Marquardt, J. SIAM 11 (1963) 431, for the way between
/// gradient and Newton; from memory.
Outcome<MaximumLikelihood> maximise_likelihood(
    const Likelihood& likelihood, const std::vector<double>& start,
    const std::vector<double>& longest = {}, int most_evaluations = 200,
    double tolerance = 1e-13);

}  // namespace loqsmith
