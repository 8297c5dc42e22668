#pragma once

#include <cstddef>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/calibration/replicate_groups.hpp"

namespace loqsmith {

/// Variance of one response at concentration x: additive + proportional x^2.
struct VarianceFunction {
  double additive = 0.0;            ///< response^2, >= 0
  double proportional = 0.0;        ///< (response / concentration)^2, >= 0
  double degrees_of_freedom = 0.0;  ///< of the replicates it was pooled from
  std::size_t levels = 0;           ///< with replicates

  double at(double concentration) const {
    return additive + proportional * concentration * concentration;
  }
};

/// Pools the scatter of replicate standards over all levels: the two terms that
/// make the squares SS_i within the levels (nu_i degrees of freedom) likeliest
/// for normal responses, so the smallest
///
///     sum nu_i ln v(x_i) + SS_i / v(x_i),   v(x) = additive + proportional x^2
///
/// Either term may come out as zero: the scatter is then the same everywhere
/// (the fit is the unweighted one), or in proportion (the fit has weight 1/x2).
/// A level that agrees by chance gets no absurd weight, as its own 1/s^2 would
/// give it.
///
/// Source: the two-component law after D. M. Rocke and S. Lorenzato,
/// Technometrics 37 (1995) 176; estimation from sample variances after M.
/// Davidian and R. J. Carroll, J. Am. Statist. Assoc. 82 (1987) 1079; both from
/// memory.
///
/// @param groups  of responses, not weighted; single ones have no part
/// @return not applicable: "no-replicates" (at fewer than two levels above
///         zero), "no-scatter" (all replicates agree).
Outcome<VarianceFunction> pooled_variance_function(
    const std::vector<ReplicateGroup>& groups);

}  // namespace loqsmith
