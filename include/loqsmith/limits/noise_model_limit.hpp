#pragma once

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

/// Limits, in vial concentration, from the response noise that the blanks'
/// baseline predicts, without replicates: a single blank will do.
///
///     x = k sd / b
///
/// sd: root mean square, over the blanks of the kind, of the predicted standard
/// deviation of the response at zero amount; b: slope of the calibration at
/// zero. k: 3.29 (detection: 1.645 against false positives and 1.645 against
/// false negatives, where the spread at the limit is that at zero; a relative
/// standard deviation of 30 % there) and 10 (quantitation).
///
/// @return not applicable: no calibration, slope not positive, no blank of the
///         kind, traces too short for the noise model ("noise-trace-short"),
///         noise of zero, a baseline that is no weighted sum of points.
///
/// Finding: instrument-noise-only (caution). Injection, preparation and what
/// blanks contain do not enter, so this is the least that a method limit can
/// be, and no method limit. No confidence bounds: the prediction's own degrees
/// of freedom are not known.
///
/// Not to be confused with the signal-to-noise ratio, which knows nothing of
/// how the noise of neighbouring points hangs together. Experimental: governs
/// only where the method names it.
///
/// Source: ISO 11843-7:2018 (spread from the noise's covariance) with the
/// factor of ISO 11843-5:2008; from memory.
Outcome<LimitEstimate> noise_model_limit(const LimitEvidence& evidence,
                                         const LimitSettings& settings,
                                         const ProcedureSettings& procedure);

}  // namespace loqsmith
