#pragma once

#include "loqsmith/judgement/result_checks.hpp"

namespace loqsmith {

/// Ratio of the analyte's peak in its second trace to that in its first, by
/// height where the response is the height, otherwise by area; it must agree
/// with the method's within the tolerance, percent of the ratio. One row for
/// each failure, one for all that passed.
///
/// Looked at wherever the analyte is detected and its peak found: another
/// substance at the same time rarely has the same ratio. No peak in the second
/// trace is a failure, a ratio exactly at the tolerance is none.
///
/// Source: identification by the ratio of two signals, as in Regulation (EU)
/// 2021/808 for qualifier and quantifier ions; from memory.
CheckOutcome check_second_trace(const FirstResults& first);

}  // namespace loqsmith
