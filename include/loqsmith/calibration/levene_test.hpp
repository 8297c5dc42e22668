#pragma once

#include <vector>

#include "loqsmith/calibration/diagnostic_test.hpp"
#include "loqsmith/calibration/replicate_groups.hpp"

namespace loqsmith {

/// Where Levene's test takes its distances from.
enum class LeveneCentre { Median, Mean };

/// Whether levels scatter differently: analysis of variance of the distances
/// |y - centre of the level|, F_0.95(k - 1, N - k), over the k levels with at
/// least three replicates (the two distances from the centre of two are always
/// equal and say nothing). Not misled by values that are not normal.
///
/// Source: H. Levene (1960), mean; M. B. Brown and A. B. Forsythe, J. Am.
/// Statist. Assoc. 69 (1974) 364, median; from memory.
///
/// @return not applicable: "few-replicates" (three at fewer than two levels),
///         "not-defined" where the distances within each level agree.
Outcome<DiagnosticTest> levene_test(const std::vector<ReplicateGroup>& groups,
                                    LeveneCentre centre = LeveneCentre::Median);

}  // namespace loqsmith
