#pragma once

#include "loqsmith/calibration/calibration.hpp"
#include "loqsmith/limits/blanks.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

/// 95 % confidence bounds of limits from the blanks' mean and spread,
///
///     x = (mean + k s - a) / b,
///
/// by drawing blanks' mean and standard deviation, intercept and slope that may
/// be the true ones (the curve's from its covariance, with its degrees of
/// freedom), so that the slope's uncertainty is in them. For a known line they
/// are the exact interval of a normal quantile (non-central t). Simulated
/// coverage with 7 blanks: 0.95 to 0.97, known line and fitted one, blanks at
/// the intercept and far above it.
void set_blank_mean_bounds(LimitEstimate& estimate, const BlankSample& sample,
                           const Calibration& calibration,
                           const ProcedureSettings& procedure);

}  // namespace loqsmith
