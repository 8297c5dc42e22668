#pragma once

#include <vector>

#include "loqsmith/calibration/diagnostic_test.hpp"
#include "loqsmith/calibration/replicate_groups.hpp"

namespace loqsmith {

/// Whether one level scatters more than the others:
///
///     C = s^2_max / sum s^2_i,
///     critical 1 / (1 + (k - 1) / F_{1 - alpha/k}(nu, (k - 1) nu))
///
/// over the k levels with replicates, alpha 0.05, nu = n - 1; its p is k times
/// the upper tail of F at most. With unequal numbers of replicates sums of
/// squares take the place of variances, and the level with the smallest tail is
/// the one named: C = SS_i / sum SS, critical 1 / (1 + (N/nu_i - 1) /
/// F_{1 - alpha/k}(nu_i, N - nu_i)), N the sum of the nu_i.
///
/// Source: ISO 5725-2:1994, 7.3.3; for unequal numbers R. U. E. 't Lam,
/// Analytica Chimica Acta 659 (2010) 68; both from memory.
///
/// @return not applicable: "no-replicates" (at fewer than two levels),
///         "not-defined" where all replicates agree.
Outcome<DiagnosticTest> cochran_test(const std::vector<ReplicateGroup>& groups);

}  // namespace loqsmith
