#pragma once

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

/// Limits, in vial concentration, from the spread of single results near zero,
/// corrected for what routine averages:
///
///     s0' = s0 sqrt(1/n)           without blank correction
///     s0' = s0 sqrt(1/n + 1/n_b)   with the mean of n_b blanks taken off
///     detection 3 s0', quantitation k s0'
///
/// n: `replicates` averaged into one result; n_b: `blank-replicates`, 0 where
/// results are not corrected; k: 10 (5 and 6 are in use as well). s0: of the
/// low spikes of one level where at least 6 of them are there (see
/// usable_spikes()), otherwise of the blanks; of the blanks where the method
/// names them on this procedure.
///
/// @return not applicable: no calibration, slope not positive, fewer than 3
///         spikes and fewer than 3 blanks, no spread.
///
/// Findings: few-results (below 6 not valid, below 10 a note), spike-level
/// (above 10 times the detection limit), those of judge_blanks(), and of
/// judge_blank_offset() where single results without correction are compared
/// with the limit.
///
/// Source: Eurachem, The Fitness for Purpose of Analytical Methods, 2nd edition
/// (2014), 6.2; from memory.
Outcome<LimitEstimate> low_level_precision(const LimitEvidence& evidence,
                                           const LimitSettings& settings,
                                           const ProcedureSettings& procedure);

}  // namespace loqsmith
