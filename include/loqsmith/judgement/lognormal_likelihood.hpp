#pragma once

#include <span>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/judgement/censored_value.hpp"

namespace loqsmith {

/// A lognormal distribution fitted to results of which some are only known to
/// lie below or above a value.
struct LognormalFit {
  double log_mean = 0.0;       ///< mu
  double log_deviation = 0.0;  ///< sigma, above zero
  double log_likelihood = 0.0;
  double variance_mean = 0.0;       ///< of mu
  double variance_deviation = 0.0;  ///< of sigma
  double covariance = 0.0;          ///< of mu and sigma
};

/// Maximum likelihood of a lognormal distribution:
///
///     ln L = sum over measured  ln phi((ln x - mu) / sigma) - ln(sigma x)
///          + sum over "< L"     ln Phi((ln L - mu) / sigma)
///          + sum over "> U"     ln Phi((mu - ln U) / sigma)
///
/// climbed by Newton steps in 1/sigma and mu/sigma, in which it has one hill
/// only (R. J. Olsen, Econometrica 46 (1978) 1211). Variances from the observed
/// information.
///
/// @return not applicable: values not above zero, fewer than 3 measured or all
///         of them equal, no maximum found.
///
/// Source: A. C. Cohen, Technometrics 1 (1959) 217, and D. R. Helsel,
/// Statistics for Censored Environmental Data, 2nd edition (2012); from memory.
Outcome<LognormalFit> fit_lognormal(std::span<const CensoredValue> values);

/// Mean exp(mu + sigma^2/2), standard deviation mean sqrt(exp(sigma^2) - 1),
/// percentiles exp(mu + z sigma).
///
/// Upper limit of the mean by Cox's method: the logarithm of the mean, theta =
/// mu + sigma^2/2, has the variance Var(mu) + sigma^2 Var(sigma) + 2 sigma
/// Cov(mu, sigma); the limit is exp(theta + t(0.95, n - 1) SE(theta)).
/// Approximate, and only as good as the lognormal shape. `standard_error` is
/// mean times SE(theta). A spread whose mean no double holds leaves all empty.
/// Sources: C. E. Land, Technometrics 14 (1972) 145, who gives it as Cox's;
/// Student's t in place of the normal quantile: U. Olsson, J. Stat. Educ. 13
/// (2005) 1; from memory.
/// Note "mean-rests-on-shape" where sigma is above 2: there over a third of the
/// mean comes from the uppermost 1 %, which nobody has measured.
CensoredEstimate lognormal_estimate(const LognormalFit& fit, std::size_t n);

}  // namespace loqsmith
