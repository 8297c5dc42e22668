#pragma once

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

/// Limit of blank (the critical value) and limit of detection, in vial
/// concentration, from blanks and low spikes:
///
///     critical value   mean_blank + c_p s_blank           (limit_of_blank.hpp)
///     detection        critical value + c_p s_low
///     quantitation     that of low-level-precision
///
/// Blank concentrations are (response - a) / b, signed, the blanks of one
/// preparation being one blank sample; preparations with a single blank count
/// together as one. The low spikes of one level are one low sample; s_low pools
/// the levels up to 4 times the lowest. With `ranks` the critical value is a
/// rank of the blanks, and the detection limit the median of the lowest level
/// of which no more than the part beta lies below it.
///
/// All results count as measured with one lot of reagents.
///
/// @return not applicable: no calibration, slope not positive, fewer than 3
///         blanks, no level with 3 low spikes, no spread, a critical value at
///         or below zero; with ranks: rank above the number of blanks, no level
///         high enough.
///
/// Findings: few-results (blanks or low spikes below 60 caution, below 20 not
/// valid), spread-differs (Cochran: caution at 5 %, not valid at 1 %),
/// spike-level (above 10 times the detection limit), no-quantitation, those of
/// judge_blanks().
///
/// Its false positives and negatives are not alpha and beta: the factors take
/// the standard deviations for known. See the contributor's guide for what a
/// simulation gives.
///
/// Source: CLSI EP17-A2 (2012), classical approach; from memory.
Outcome<LimitEstimate> blank_and_low_level(const LimitEvidence& evidence,
                                           const LimitSettings& settings,
                                           const ProcedureSettings& procedure);

}  // namespace loqsmith
