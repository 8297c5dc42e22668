#pragma once

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

/// Limits, in vial concentration, from the standard deviation of the low
/// line's intercept:
///
///     x = k s_a / b,    s_a = s_y/x sqrt(1/n + xm^2 / Sxx)
///
/// with k = 3.3 (detection) and 10 (quantitation) by ICH. The line is an
/// unweighted one through the standards up to `up_to` times the lowest level
/// above zero.
///
/// @return not applicable: no calibration, a quadratic, a line through zero
///         (it has no intercept), fewer than 4 levels in the range, slope not
///         positive, no scatter at all.
///
/// Findings: intercept-not-response, where the rate of blanks at or above the
/// detection limit that line and factor predict,
///
///     P(t_{n-2} >= k s_a / (s_y/x sqrt(1 + 1/n + xm^2 / Sxx))),
///
/// exceeds 2 % (caution): s_a shrinks as standards are added, the scatter of a
/// blank does not; those of judge_low_range.
///
/// Bounds: chi-square, without the slope's uncertainty.
///
/// Source: ICH Q2(R2) (2023) 3.2.3 (standard deviation of intercepts), from
/// memory.
Outcome<LimitEstimate> intercept_deviation(const LimitEvidence& evidence,
                                           const LimitSettings& settings,
                                           const ProcedureSettings& procedure);

}  // namespace loqsmith
