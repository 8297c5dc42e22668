#pragma once

#include <optional>

#include "loqsmith/limits/blanks.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/low_range_line.hpp"

namespace loqsmith {

/// Ratio of the responses' variance at the upper half of the levels to that at
/// the lower half, and the probability of a ratio at least as large where the
/// variance is the same throughout.
struct VarianceRatio {
  double ratio = 0.0;
  double probability = 1.0;
};

/// Pooled within-level variances where both halves have replicates, otherwise
/// the residual variances of a line of its own through each half (at least 3
/// points each); the middle level is left out where the number is odd.
/// @return nothing where neither can be had or the lower half has no spread.
///
/// Source: S. M. Goldfeld and R. E. Quandt, J. Am. Stat. Assoc. 60 (1965) 539,
/// from memory; with replicates the F test of ISO 8466-1, from memory.
std::optional<VarianceRatio> variance_ratio(const LowRangeLine& line);

/// variance-grows: caution below 5 % probability, not valid below 1 %.
void judge_variance(LimitEstimate& estimate, const LowRangeLine& line);

/// curvature-at-low-end: the quadratic term differs from zero (t test, 1 %).
void judge_curvature(LimitEstimate& estimate, const LowRangeLine& line);

/// residuals-exceed-blanks: the line's residual variance is larger than the
/// blanks' (F test, 1 %), so the limit says more of the standards than of the
/// low end.
void judge_against_blanks(LimitEstimate& estimate, double residual_sd,
                          double degrees_of_freedom, const BlankSample& blanks);

}  // namespace loqsmith
