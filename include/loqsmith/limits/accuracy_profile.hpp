#pragma once

#include <optional>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

/// One level of an accuracy profile: where a part beta of future results is
/// expected, in percent of the nominal amount.
struct ProfilePoint {
  double concentration = 0.0;
  double lower_percent = 0.0;
  double upper_percent = 0.0;
};

/// The concentration from which on both bounds lie within the acceptance
/// limits at every level. Between the last level that fails and the next one
/// the bounds are straight lines, and the highest crossing counts; where the
/// lowest level passes, it is that level, and the true limit lies at or below.
///
/// @param profile  ascending
/// @return nothing: the highest level fails, or there is none.
std::optional<double> profile_limit(const std::vector<ProfilePoint>& profile,
                                    double low_percent, double high_percent);

/// Quantitation limit, in vial concentration, from an accuracy profile: low
/// spikes of several levels in three or more preparations, which are the runs
/// of tolerance_interval.hpp. There is no detection limit.
///
/// No confidence bounds: drawn from the variances and means that the runs leave
/// open, they held the true limit of four levels of 4 x 3 spikes in 62 to 77 of
/// 100 simulated studies only, because the worse of two bounds decides.
///
/// `beta`: part of future results (0.80); `acceptance`: recovery, percent
/// ("80 120").
///
/// @return not applicable: no calibration, slope not positive, no level with 3
///         preparations and replicates, no spread at a level, the highest level
///         fails.
///
/// Findings: one-night (always: what differs between days does not enter),
/// levels-left-out, at-lowest-level, unequal-runs, own-bounds,
/// far-below-standards.
///
/// Source: Ph. Hubert et al., J. Pharm. Biomed. Anal. 36 (2004) 579; from
/// memory.
Outcome<LimitEstimate> accuracy_profile(const LimitEvidence& evidence,
                                        const LimitSettings& settings,
                                        const ProcedureSettings& procedure);

}  // namespace loqsmith
