#pragma once

#include "loqsmith/judgement/result_checks.hpp"

namespace loqsmith {

/// Fortified samples and their duplicates, whose level states the amount added
/// to the sample.
///
/// - Recovery of the added amount, one row an injection: the signed result of
///   the sample itself is subtracted (see native_results(), value_of_sample()).
/// - Relative difference between a fortified duplicate and the fortified
///   sample of the same amount, of the amounts found in all; one row for each
///   injection of a duplicate.
///
/// Neither is judged where the native amount exceeds `native-ratio` times the
/// added one: the difference of two large numbers says little of a small one.
/// Nor is what lies above the range, native or fortified.
///
/// A failed one affects all injections of the sample that was fortified. Where
/// the fortified sample or the sample itself gives no number it failed: nothing
/// shows that the amount was found.
///
/// Source: US EPA SW-846 method 8000D, matrix spikes and their duplicates; four
/// times after US EPA, National Functional Guidelines; from memory.
CheckOutcome check_fortified(const FirstResults& first);

}  // namespace loqsmith
