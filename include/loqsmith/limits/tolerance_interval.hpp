#pragma once

#include <vector>

#include "loqsmith/base/outcome.hpp"

namespace loqsmith {

/// Where a part beta of future single results is expected, from p runs of n
/// replicates each:
///
///     mean +- k s_IP,  s_IP^2 = s_r^2 + s_L^2
///     s_r^2 = MSW,  s_L^2 = (MSB - MSW) / n
///     R = s_L^2 / s_r^2,  B^2 = (R + 1) / (n R + 1)
///     nu = (R + 1)^2 / ((R + 1/n)^2 / (p - 1) + (1 - 1/n) / (p n))
///     k = t_{(1 + beta)/2, nu} sqrt(1 + 1/(p n B^2))
///
/// Where MSB < MSW: s_L^2 = 0 and s_r^2 the variance of all results. Runs of
/// unequal size: n is (N - sum n_i^2 / N) / (p - 1) and p n is N, which is an
/// approximation.
struct ToleranceInterval {
  double mean = 0.0;
  double mean_square_between = 0.0;  ///< MSB
  double mean_square_within = 0.0;   ///< MSW
  double intermediate_sd = 0.0;      ///< s_IP, above zero
  double variance_ratio = 0.0;       ///< R; zero where s_r^2 is zero as well
  double b_squared = 0.0;            ///< B^2
  double degrees_of_freedom = 0.0;   ///< nu
  double lower = 0.0;
  double upper = 0.0;
  bool balanced = true;
};

/// @param runs  at least 2, none empty, at least one with 2 results
/// @param beta  part of future results, above 0 and below 1
/// @return not applicable: fewer runs or no replicates; all results equal.
///
/// Source: R. W. Mee, Technometrics 26 (1984) 251; Ph. Hubert et al., J. Pharm.
/// Biomed. Anal. 36 (2004) 579 and 45 (2007) 70; from memory.
Outcome<ToleranceInterval> beta_expectation_interval(
    const std::vector<std::vector<double>>& runs, double beta);

}  // namespace loqsmith
