#pragma once

#include "loqsmith/calibration/calibration.hpp"
#include "loqsmith/judgement/measured_analyte.hpp"
#include "loqsmith/judgement/result_checks.hpp"

namespace loqsmith {

/// What stays behind after the highest standard: the response of each blank
/// right after a standard of the night's highest level, in percent of the mean
/// response of the standards at the lowest accepted level.
///
/// A failed one affects low results that follow something high: the detected
/// ones to which the injection right before them carries over a tenth of their
/// response or more, in the proportion of that blank to the curve at the
/// highest standard (the worst blank, where several fail).
///
/// Source: carry-over against the lower limit of quantification, at most 20 %,
/// ICH M10 (2022), 3.2.4; from memory.
CheckOutcome check_carry_over(const FirstResults& first);

/// Whether the method asks for the check, there is such a blank, and all of
/// them pass: then blanks after high injections are blanks like others.
bool carry_over_passes(const MeasuredAnalyte& night,
                       const Calibration& calibration);

}  // namespace loqsmith
