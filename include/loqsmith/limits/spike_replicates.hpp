#pragma once

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

/// Method detection limit, in vial concentration, from replicate low spikes and
/// method blanks that went through the whole preparation:
///
///     detection     max(t_{c, n-1} s_spikes, max(mean_b, 0) + t_{c, m-1} s_b)
///     quantitation  k s_spikes
///
/// c: 0.99; k: 10; n spikes of one level (usable_spikes()), m blanks, which are
/// method blanks unless the method names others; blank concentrations are
/// (response - a) / b, signed. Every blank has a number here, because responses
/// are measured over the template window whether a peak is seen or not.
///
/// The bounds are those of t s_spikes; where the blanks decide, those of a
/// bootstrap over mean and standard deviation that the blanks may truly have.
///
/// @return not applicable: no calibration, slope not positive, fewer than 3
///         spikes or blanks, spikes or blanks all equal.
///
/// Findings: one-night (always: the rule wants 3 batches prepared and measured
/// on 3 dates), few-spikes (below 7), spike-level (against `spike-ratio`),
/// spike-not-seen, blanks-decide; those of judge_blanks().
///
/// The blanks' rule leaves out that their mean is estimated: for n = 7 it lets
/// 1.3 % of blanks pass, not 1 %.
///
/// Source: US EPA 40 CFR 136 Appendix B, Revision 2 (2016), II 2; from memory.
Outcome<LimitEstimate> spike_replicates(const LimitEvidence& evidence,
                                        const LimitSettings& settings,
                                        const ProcedureSettings& procedure);

}  // namespace loqsmith
