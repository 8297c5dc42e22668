#pragma once

#include <string_view>

#include "loqsmith/judgement/result_checks.hpp"

namespace loqsmith {

/// The reason of results that a failed method blank affects; they get the
/// letter B, "found in the blank", behind that of their status.
inline constexpr std::string_view kMethodBlankFailed = "method-blank-failed";

/// What method blanks contain, one row each; one unchecked row for each
/// preparation batch without method blank.
///
/// A failed one affects, of the prepared injections with its `prep` (those
/// without one stand together), the detected results up to `sample-ratio` times
/// its own result; a result at that ratio is affected. Where the two results
/// have different units the concentrations in the vial are compared. A response
/// beyond the curve has no number and is not affected.
///
/// Source: blank rule of the US EPA National Functional Guidelines (results
/// below a multiple of the blank's are qualified, those that were not detected
/// are not), from memory.
CheckOutcome check_method_blanks(const FirstResults& first);

}  // namespace loqsmith
