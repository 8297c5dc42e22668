#pragma once

#include "loqsmith/judgement/result_checks.hpp"

namespace loqsmith {

/// Peaks of the standards above zero of each calibration set, as far as found
/// and not saturated; one row for each limit that the method states, with the
/// worst standard.
///
/// - tailing, plates, resolution: of standards with a signal-to-noise ratio of
///   10 or more (or none stated): below it the shape cannot be measured. Within
///   the resolution only standards that have a neighbour.
/// - signal-to-noise: of all of them, so the lowest decides.
/// - area-rsd: relative standard deviation of the responses (ratios to the
///   internal standard, where there is one) at the level with the most
///   standards in the fit, the highest of these; at least 3. What it may be
///   depends on their number: see repeatability.hpp.
///
/// A value at its limit passes. Affects all results of the analyte in the set.
///
/// Source of the measures: European Pharmacopoeia 2.2.46 and USP <621>; from
/// memory.
CheckOutcome check_suitability(const FirstResults& first);

}  // namespace loqsmith
