#pragma once

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

/// Decision limit (critical value), detection limit and quantitation limit of
/// DIN 32645, in vial concentration. From the calibration (`way` calibration),
/// with s_x0 = s_y/x / b, t with n - 2 degrees of freedom, m measurements
/// averaged:
///
///     w(x)  = sqrt(1/m + 1/n + (x - xm)^2 / Qx)
///     x_NG  = s_x0 t_{1-alpha} w(0)
///     x_EG  = x_NG + s_x0 t_{1-beta} w(0)
///     x_BG  = k s_x0 t_{1-alpha/2} w(x_BG)
///
/// from an unweighted line through the standards up to `up_to` times the
/// lowest level above zero; through zero as the calibration, then without 1/n,
/// with xm = 0 and n - 1 degrees of freedom. x_BG is the limit of the
/// standard's iteration, in closed form.
///
/// From n blanks (`way` blank), with their standard deviation s_L, the
/// calibration's slope b and t with n - 1 degrees of freedom:
///
///     x_NG = s_L / b t_{1-alpha} sqrt(1/m + 1/n)
///     x_EG = x_NG + s_L / b t_{1-beta} sqrt(1/m + 1/n)
///     x_BG = k s_L / b t_{1-alpha/2} sqrt(1/m + 1/n)
///
/// the last being the calibration's rule without the part of the line, our own
/// reading of the standard.
///
/// Defaults of the standard: alpha and beta 0.01, k 3 (half the result's
/// confidence interval is a third of the result).
///
/// @return not applicable: no calibration, slope not positive; from the
///         calibration a quadratic, fewer than 4 levels in the range, no
///         scatter at all; from blanks fewer than 3 or all equal.
///
/// Findings: those of judge_low_range, quantitation-absent (the iteration
/// diverges where k t s_x0 >= sqrt(Qx)), no-upper-bound,
/// range-above-ten-limits (note: the standard wants levels up to 10 times the
/// decision limit); from blanks those of judge_blanks and of the blanks' mean.
///
/// Bounds: chi-square bounds of the standard deviation, without the slope's
/// uncertainty.
///
/// Source: DIN 32645 (2008) 5.5 to 5.7 and 6, formulas from memory.
Outcome<LimitEstimate> din_32645(const LimitEvidence& evidence,
                                 const LimitSettings& settings,
                                 const ProcedureSettings& procedure);

}  // namespace loqsmith
