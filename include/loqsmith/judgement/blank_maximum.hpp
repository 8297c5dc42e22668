#pragma once

#include "loqsmith/judgement/check_rows.hpp"
#include "loqsmith/judgement/rows.hpp"
#include "loqsmith/judgement/settings.hpp"

namespace loqsmith {

/// Holds one blank's signed result against the most that it may contain; both
/// in the unit of that result. A blank that reaches its own detection or
/// quantitation limit fails, as a sample there would count as at or above it; a
/// number is itself allowed. Not checked where the blank has no result or no
/// limit governs.
///
/// @param row  of the check, named but empty
CheckRow judge_blank(CheckRow row, const ResultRow& blank,
                     const BlankMaximum& maximum);

}  // namespace loqsmith
