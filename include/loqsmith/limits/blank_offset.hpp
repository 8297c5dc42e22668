#pragma once

#include "loqsmith/calibration/calibration.hpp"
#include "loqsmith/limits/blanks.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"

namespace loqsmith {

// What a limit that takes the blanks' spread, but not their mean, has to say of
// that mean.

/// Adds, as a term, the rate of blank samples at or above the estimate's
/// detection limit that blanks and curve predict; and
/// blank-differs-from-intercept where the blanks' mean differs from the
/// intercept by more than chance (two-sided t, 95 %): a note, caution above
/// 2 %, not valid above 5 %.
void judge_blank_offset(LimitEstimate& estimate, const BlankSample& sample,
                        const Calibration& calibration);

/// baseline-biases-blanks: an estimated baseline shifts blanks (not valid).
void judge_baseline_without_offset(LimitEstimate& estimate,
                                   const LimitEvidence& evidence);

}  // namespace loqsmith
