#pragma once

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/settings.hpp"
#include "loqsmith/limits/two_component_model.hpp"

namespace loqsmith {

/// Limits, in vial concentration, from an error model with an additive and a
/// proportional part, fitted to the standards (two_component_model.hpp). With
/// s0 = additive_sd / slope, the variance V of the proportional part, z the
/// upper alpha point of the normal distribution, r replicates in a mean:
///
///     critical value   z s0 / sqrt(r)
///     detection        x = z s0 + z sqrt(s0^2 + x^2 V)
///     quantitation     s0 / sqrt(rho^2 - V)
///
/// rho: the wanted relative standard deviation (`relative_deviation`). There
/// is no detection limit where z^2 V >= 1, and no quantitation limit where
/// V >= rho^2: the relative deviation falls to sqrt(V), never below it.
struct TwoComponentLimits {
  double critical_value = 0.0;
  std::optional<double> detection;
  std::optional<double> quantitation;
};
TwoComponentLimits two_component_limits(const TwoComponentModel& model,
                                        const ProcedureSettings& procedure);

/// The same as one procedure among the others. alpha = beta = 0.05, one
/// replicate, unless the procedure's settings say otherwise.
///
/// @return not applicable: no calibration, slope not positive, a curved
///         calibration, fewer than 8 standards, a range of less than two
///         decades ("range-too-short"), no replicates at the low or the high
///         end, replicates all equal, no detection limit.
///
/// Findings: quantitation-absent (caution); critical-value-optimistic, with the
/// rate of false positives that the estimation error predicts and the critical
/// value that would keep to alpha (note, caution above 2 alpha);
/// moment-estimates (the likelihood has no peak: limits from moments, without
/// bounds; caution); additive-error-uncertain (fewer than 4 degrees of freedom:
/// caution, fewer than 1.5: not valid); proportional-error-not-seen;
/// far-below-standards.
///
/// Bounds (95 %): the chi-square interval with the degrees of freedom that the
/// observed information gives for the logarithm of the limit (delta method);
/// two_component_precision.hpp.
///
/// Experimental: governs only where the method names it. Not a method limit
/// where standards in solvent know nothing of the samples' preparation.
///
/// Source: D. M. Rocke and S. Lorenzato, Technometrics 37 (1995) 176.
Outcome<LimitEstimate> two_component_limit(const LimitEvidence& evidence,
                                           const LimitSettings& settings,
                                           const ProcedureSettings& procedure);

}  // namespace loqsmith
