#pragma once

#include <optional>

#include "loqsmith/calibration/calibration.hpp"
#include "loqsmith/judgement/measured_analyte.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/governing.hpp"

namespace loqsmith {

/// Which kind of blank an injection is: a solvent blank, a method blank, or a
/// standard of concentration zero; nothing: none. A method blank holds a
/// surrogate and is none of it.
std::optional<BlankKind> blank_kind(const InjectionResponse& one,
                                    const MeasuredAnalyte& analyte);

/// What the night knows about the low end of one analyte.
///
/// - Blanks: signed responses of solvent blanks, method blanks and standards of
///   concentration zero. `after_high`: the injection right before it in the
///   sequence (conditioning counts as one) lies above half the range, that is
///   above half the highest accepted standard, by what its level states in the
///   vial or by its response. Where the method checks carry-over and it passes,
///   such blanks count (`carry_over_passed`).
/// - Low spikes: found concentrations from the curve, uncensored, in the vial;
///   what the level states in the sample is brought to the vial with the
///   injection's own dilution and preparation.
/// - Heights: standards above zero with a found, unsaturated peak.
/// - Noise: median over those of them within 10 times the lowest (the stretch
///   over which the signal-to-noise procedure draws its line).
LimitEvidence gather_limit_evidence(const MeasuredAnalyte& analyte,
                                    const Calibration& calibration);

/// Says beside each blank-based estimate that blanks without internal standard
/// took the standards' mean.
void note_mean_internal_standard(const MeasuredAnalyte& analyte,
                                 LimitsOfAnalyte& limits);

}  // namespace loqsmith
