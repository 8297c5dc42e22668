#pragma once

#include <cstddef>
#include <span>
#include <vector>

#include "loqsmith/calibration/diagnostic_test.hpp"
#include "loqsmith/calibration/replicate_groups.hpp"

namespace loqsmith {

/// Grubbs' test for one outlying value on either side.
struct Grubbs {
  double g = 0.0;         ///< largest |x - mean| / s
  std::size_t place = 0;  ///< which value that is
  double critical = 0.0;
  double p = 0.0;  ///< at most 1; 2 n times the tail of t, an upper bound
};

/// Two-sided:
///
///     critical (n - 1)/sqrt(n) sqrt(t^2 / (n - 2 + t^2)),
///     t the 1 - significance/(2 n) quantile with n - 2 degrees of freedom
///
/// Source: F. E. Grubbs, Technometrics 11 (1969) 1; NIST/SEMATECH e-Handbook,
/// 1.3.5.17; from memory.
///
/// @return not applicable: "few-points" (fewer than 3), "not-defined" where all
///         values, or all but the outlying one, are equal.
Outcome<Grubbs> grubbs_test(std::span<const double> values,
                            double significance = 0.05);

/// The critical value itself; n at least 3.
double grubbs_critical(std::size_t n, double significance);

/// The test at each level with three replicates or more, ascending. Where there
/// is none, one that is not applicable ("no-replicates").
std::vector<NamedDiagnostic> grubbs_by_level(
    const std::vector<ReplicateGroup>& groups);

}  // namespace loqsmith
