#pragma once

#include "loqsmith/judgement/result_checks.hpp"

namespace loqsmith {

/// Repeat injections and dilutions of one sample: the results in range may
/// differ by at most `replicates` percent (largest minus smallest over their
/// midpoint), and no injection may rule out another (rule_each_other_out()).
/// One row for each sample with two results in range or with a contradiction;
/// where there is none, one row says so. A failure affects every injection of
/// the sample.
///
/// Surrogates are added to vials and differ with their dilution: not checked.
///
/// `results` have been through all other checks: withheld ones never count.
/// Gives nothing where the method does not ask for it.
CheckOutcome check_closeness(const FirstResults& results);

}  // namespace loqsmith
