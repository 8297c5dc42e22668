#pragma once

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

/// Limits, in vial concentration, from peak heights and baseline noise: the
/// concentration at which the line of height on concentration has the wanted
/// signal-to-noise ratio T,
///
///     H = T h / 2   (half-peak-to-peak: S/N = 2H/h)
///     H = T h       (peak-to-peak: H/h; standard deviation: H/sd)
///     x = (H - a) / b
///
/// The line goes, unweighted, through the standards with a found peak up to 10
/// times the lowest of them; through zero (x = T c / r of the old rule) where
/// these have fewer than 3 levels.
///
/// @return not applicable: noise not measured or zero, no found peak, heights
///         that do not rise, a limit at or below zero.
///
/// Findings: height-over-noise (H/h at the limits, which is half the ratio of
/// the pharmacopoeias), line-through-zero, far-below-standards.
///
/// No confidence bounds: how the noise figure itself scatters is not known, and
/// it would be the larger part of them.
///
/// Source: ICH Q2(R2) (2023) 3.2.2 (3:1 and 10:1); Ph. Eur. 2.2.46 and USP
/// <621>, S/N = 2H/h; from memory.
Outcome<LimitEstimate> signal_to_noise_limit(
    const LimitEvidence& evidence, const LimitSettings& settings,
    const ProcedureSettings& procedure);

}  // namespace loqsmith
