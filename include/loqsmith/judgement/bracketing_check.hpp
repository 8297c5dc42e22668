#pragma once

#include "loqsmith/judgement/calibration_sets.hpp"
#include "loqsmith/judgement/judge_set.hpp"
#include "loqsmith/judgement/rows.hpp"

namespace loqsmith {

/// Tests whether the standards before and after a bracket's samples follow the
/// one curve that was fitted to both (see curve_difference.hpp) and adds a row
/// "bracketing" with F and its critical value to the checks. Where they differ
/// the results keep their numbers with the reason "brackets-differ": the
/// sensitivity changed between the two, and where among the samples nobody
/// knows.
///
/// Results of samples and their like outside the standards of their bracket get
/// "no-opening-standards" or "no-closing-standards" (see judge_result); so do
/// those after the one block of a night that has no second.
void check_bracket(SetVerdict& verdict, const SetMembers& members,
                   const CalibrationSet& set);

}  // namespace loqsmith
