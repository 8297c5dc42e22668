#pragma once

#include <cstddef>
#include <functional>
#include <vector>

#include "loqsmith/judgement/result_checks.hpp"

namespace loqsmith {

/// Recovery of a surrogate, percent:
///
///     100 c d / c_added
///
/// c is its concentration in the vial, d the vial's dilution, c_added what the
/// method says was added, in the undiluted vial.
///
/// Judged in everything that was prepared (samples, method blanks, controls,
/// fortified ones, duplicates, low spikes), but where a level states an amount
/// of the surrogate itself: then the level says what is there. Standards, check
/// standards, second sources and solvent blanks pass through no preparation.
///
/// A failed one affects every analyte's result of the injection. Without a
/// number, or without a calibration, it failed: other analytes' results would
/// leave on nothing.
///
/// Source: US EPA SW-846 method 8000D, surrogate recovery; from memory.
CheckOutcome check_surrogate(const FirstResults& first);

/// Judges one analyte, given what others' surrogates showed.
using JudgeOne = std::function<AnalyteJudgement(
    std::size_t analyte, const std::vector<CheckEffect>& from_others)>;

/// Judges all analytes, surrogates first: what one shows of an injection holds
/// for every other analyte, surrogates among them.
/// @param is_surrogate  of each analyte
std::vector<AnalyteJudgement> judge_surrogates_first(
    const std::vector<bool>& is_surrogate, const JudgeOne& judge);

}  // namespace loqsmith
