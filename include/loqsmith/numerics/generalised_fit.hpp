#pragma once

#include <vector>

#include "loqsmith/base/outcome.hpp"

namespace loqsmith {

/// Covariance of successive observations: independent noise and first-order
/// Markov noise,
///
///     G(i, j) = white (i = j) + creeping correlation^|i - j|
///
/// white, creeping >= 0, not both zero; 0 <= correlation < 1.
struct MarkovCovariance {
  double white = 1.0;
  double creeping = 0.0;
  double correlation = 0.0;
};

/// G^-1 v, exact but for rounding, in a number of steps that grows with the
/// length of v: the inverse K of the Markov part alone is tridiagonal, and
///
///     (white I + creeping K^-1)^-1 = (white K + creeping I)^-1 K
std::vector<double> solve_covariance(const MarkovCovariance& covariance,
                                     const std::vector<double>& v);

/// Generalised least squares as linear estimators: coefficient j of the fit of
/// the columns X to any observations y is the sum of weights[j] times y, with
///
///     weights = (X' G^-1 X)^-1 X' G^-1,
///
/// the unbiased linear estimators of least variance where G is, but for a
/// factor, the covariance of the observations.
///
/// Source: A. C. Aitken, Proc. R. Soc. Edinburgh 55 (1936) 42; from memory.
struct GeneralisedFit {
  std::vector<std::vector<double>> weights;  ///< one row a coefficient

  std::vector<double> coefficients(const std::vector<double>& y) const;
};

/// @param columns  p columns of n finite values each, n > p
/// @return not applicable: too few observations, columns that depend on each
///         other
Outcome<GeneralisedFit> generalised_fit(
    const std::vector<std::vector<double>>& columns,
    const MarkovCovariance& covariance);

/// r' G^-1 r: chi-square distributed for normal r of covariance G; with n - p
/// degrees of freedom for residuals of a fit of p coefficients.
double covariance_form(const MarkovCovariance& covariance,
                       const std::vector<double>& r);

}  // namespace loqsmith
