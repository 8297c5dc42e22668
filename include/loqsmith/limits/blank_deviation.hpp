#pragma once

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

/// Limits, in vial concentration, from the spread of blank responses and the
/// slope.
///
///     x = k s_blank / b
///     x = (mean_blank + k s_blank - a) / b     with offset="blank-mean"
///
/// k: 3 (detection) and 10 (quantitation) by IUPAC convention, 3.3 and 10 by
/// ICH. b: slope of the calibration at zero; a: its intercept.
///
/// @return not applicable: no calibration, fewer than 3 usable blanks, blanks
///         all equal, a limit at or below zero.
///
/// Findings: few-blanks, own-bounds, blank-outlier, blanks-drift;
/// blank-differs-from-intercept, where the blanks' mean differs from the
/// intercept by more than chance (two-sided t, 95 %), with the rate of false
/// positives that this predicts for blank samples at the detection limit
/// (caution above 2 %, not valid above 5 %); baseline-biases-blanks;
/// far-below-standards.
///
/// Valid where the spread at the limit equals that of the blanks. Not the
/// critical value, which guards against false positives alone.
///
/// Source: IUPAC, Nomenclature for Automated Analysis, limit of detection
/// (1978), k = 3 from memory; ICH Q2(R2) (2023) 3.2.3, from memory.
Outcome<LimitEstimate> blank_deviation(const LimitEvidence& evidence,
                                       const LimitSettings& settings,
                                       const ProcedureSettings& procedure);

}  // namespace loqsmith
