#pragma once

#include <optional>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/low_range_line.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

/// Critical value and detection limit, in vial concentration, from the
/// prediction band of the low line. The upper line at zero is the critical
/// response; the detection limit lies where the lower line reaches it:
///
///     y_C = a + t_{1-alpha} s sqrt(1/m + 1/n + xm^2 / Sxx),  x_C = (y_C - a)/b
///     a + b x_D - t_{1-beta} s sqrt(1/m + 1/n + (x_D - xm)^2 / Sxx) = y_C
///
/// with n - 2 degrees of freedom, s = s_y/x, m measurements averaged. The
/// quantitation limit is 10 s / b. The line is an unweighted one through the
/// standards up to `up_to` times the lowest level above zero; through zero as
/// the calibration, then without 1/n, with xm = 0 and n - 1 degrees of freedom.
///
/// @return not applicable: no calibration, a quadratic, fewer than 4 levels in
///         the range, slope not positive, no scatter at all;
///         no-detection-limit, where b <= t_{1-beta} s / sqrt(Sxx): the lower
///         line never rises to the critical response.
///
/// Findings: those of judge_low_range, no-upper-bound.
///
/// Bounds: chi-square bounds of s put in the place of s, without the slope's
/// uncertainty.
///
/// Source: A. Hubaux and G. Vos, Anal. Chem. 42 (1970) 849, from memory.
Outcome<LimitEstimate> prediction_band(const LimitEvidence& evidence,
                                       const LimitSettings& settings,
                                       const ProcedureSettings& procedure);

/// What of that depends on the residual standard deviation.
struct BandLimit {
  double alpha = 0.05;
  double beta = 0.05;
  double replicates = 1.0;
};

/// x_D for a line with that residual standard deviation; nothing where the
/// lower line never rises to the critical response.
std::optional<double> band_detection_limit(const LowRangeLine& line,
                                           double residual_sd,
                                           const BandLimit& band);

}  // namespace loqsmith
