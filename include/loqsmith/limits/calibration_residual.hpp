#pragma once

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

/// Limits, in vial concentration, from the scatter of the standards about the
/// calibration line:
///
///     x = k s_y/x / b
///
/// An unweighted straight line is refitted to the standards up to `up_to`
/// times the lowest level above zero (all of them where absent), at least 4
/// levels; s_y/x and b are that line's, with the calibration's kind of
/// intercept. For a weighted calibration (a mean response factor counts as
/// one) s is the standard deviation of a response at the lowest level,
/// s_w / sqrt(w), but not below the blanks' where there are at least 3 of
/// them, and b the calibration's slope.
///
/// @return not applicable: no calibration, a quadratic, fewer than 4 levels in
///         the range, no scatter at all.
///
/// Findings: variance-grows (refitted range: caution at 5 %, not valid at 1 %),
/// curvature-at-low-end, residuals-exceed-blanks, far-below-standards.
///
/// Source: ICH Q2(R2) (2023) 3.2.3 (residual standard deviation of a line in
/// the range of the limit), from memory.
Outcome<LimitEstimate> calibration_residual(const LimitEvidence& evidence,
                                            const LimitSettings& settings,
                                            const ProcedureSettings& procedure);

}  // namespace loqsmith
