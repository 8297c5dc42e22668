#pragma once

#include "loqsmith/base/outcome.hpp"

namespace loqsmith {

/// Distribution function of the non-central t: P(T' <= t) for
///
///     T' = (Z + delta) / sqrt(chi2_nu / nu)
///
/// with Z standard normal and chi2_nu independent of it. Some 12 digits for
/// |delta| up to 1000; NaN where the degrees of freedom are not above zero or
/// |delta| exceeds 60000. Not to be confused with a t that is shifted by delta.
double noncentral_t_cdf(double t, double degrees_of_freedom,
                        double noncentrality);

/// The non-centrality at which a t test of one-sided level alpha misses with
/// probability beta:
///
///     P(T'_{nu, delta} <= t_{1-alpha, nu}) = beta
///
/// What is truly delta standard deviations (of what is compared with zero)
/// high is found with probability 1 - beta. For many degrees of freedom delta
/// nears z_{1-alpha} + z_{1-beta}.
///
/// @param alpha, beta  above 0, below 0.5
/// @param degrees_of_freedom  above 0
/// @return above zero, |P - beta| < 1e-10; not applicable outside these
///         ranges, and where delta would exceed 60000 (1 degree of freedom
///         with alpha and beta below 1e-4).
///
/// Source: L. A. Currie, Pure Appl. Chem. 67 (1995) 1699, 3.7.4, from memory;
/// ISO 11843-2 (2000), from memory.
Outcome<double> detectable_noncentrality(double alpha, double beta,
                                         double degrees_of_freedom);

}  // namespace loqsmith
