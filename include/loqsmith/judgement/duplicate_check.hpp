#pragma once

#include "loqsmith/judgement/result_checks.hpp"

namespace loqsmith {

/// Duplicates of samples: one row for each injection of one, held against the
/// sample that it repeats (see value_of_sample() for one that was injected
/// several times).
///
/// - Both results at or above their quantitation limits: the relative
///   difference, percent, at most the method's.
/// - Otherwise the absolute difference, in the result's unit, at most the
///   larger of both quantitation limits: so far apart are results there by
///   their scatter alone.
///
/// A failed one affects all injections of the sample repeated. Without a number
/// it failed; it is not judged where either one lies above the range, for then
/// there is a number for neither, and a dilution is what will be reported.
///
/// Source: the two ways after US EPA, National Functional Guidelines, duplicate
/// sample analysis; from memory.
CheckOutcome check_duplicates(const FirstResults& first);

}  // namespace loqsmith
