#pragma once

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

/// Critical value, minimum detectable value and quantitation limit, in vial
/// concentration, for the mean of K measurements (`replicates`).
///
/// `variance` constant, from an unweighted line through N standards up to
/// `up_to` times the lowest level above zero, s = s_y/x, nu = N - 2:
///
///     x_C = t_{1-alpha, nu} s q / b,     q = sqrt(1/K + 1/N + xm^2 / Sxx)
///     x_D = delta_{alpha, beta, nu} s q / b
///     x_Q = 10 s / b sqrt(1/K + 1/N + (x_Q - xm)^2 / Sxx)
///
/// with delta of detectable_noncentrality. x_D is what is truly detectable
/// with sigma = s; the approximation 2 t s q / b is larger.
///
/// `variance` linear, with sigma(x) = c + d x from the levels' replicates
/// (fit_linear_deviation), weights 1 / sigma(x)^2, T and xm, S of
/// leverage_of, v the residual variance of the weighted line (about 1):
///
///     x_C = t sqrt(c^2 / K + v h(0)) / b
///     x_D = delta sqrt((c + d x_D)^2 / K + v h(0)) / b
///     x_Q = 10 sqrt((c + d x_Q)^2 / K + v h(x_Q)) / b
///
/// x_D and x_Q in closed form, the limits of the source's iteration. t does not
/// know that c is an estimate of few degrees of freedom. Simulated for six
/// levels with alpha and beta 0.05, false positives are 0.16, 0.10, 0.08, 0.065
/// and 0.06 with 2, 3, 4, 6 and 10 replicates a level; false negatives at the
/// truly detectable value stay below beta (0.015 to 0.04).
///
/// Through zero as the calibration: h(x) = x^2 / S, nu = N - 1.
///
/// @return not applicable: no calibration, a quadratic, fewer than 4 levels in
///         the range, slope not positive, no scatter at all; no-noncentrality;
///         with linear variance where fit_linear_deviation is not, and
///         no-minimum-detectable-value where delta d >= b sqrt(K): the
///         iteration diverges.
///
/// Findings: those of judge_low_range with constant variance, of judge_place
/// with linear; quantitation-absent, no-upper-bound; with linear variance
/// few-replicates-at-zero (caution: fewer than 4 replicates of a level, or a
/// rate of blanks at or above the critical value that exceeds 1.2 alpha, by
/// Welch and Satterthwaite for the variance behind x_C), scatter-exceeds-model
/// (chi-square, 1 %) and the note bounds-absent.
///
/// Bounds (constant variance): chi-square bounds of s put in the place of s,
/// without the slope's uncertainty.
///
/// Source: L. A. Currie, Pure Appl. Chem. 67 (1995) 1699; ISO 11843-2 (2000)
/// with Corrigendum 1 (2007), 5.2 and 5.3; formulas from memory.
Outcome<LimitEstimate> critical_and_detectable(
    const LimitEvidence& evidence, const LimitSettings& settings,
    const ProcedureSettings& procedure);

}  // namespace loqsmith
