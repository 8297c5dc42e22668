#pragma once

#include "loqsmith/judgement/result_checks.hpp"

namespace loqsmith {

/// Laboratory control samples, whose level states the amount in the sample:
/// the recovery of each. One that fails, or gives no number, affects the
/// preparation batch that it stands in.
///
/// A control beyond the calibration's range is judged by the number that the
/// curve gives for it.
///
/// Source: US EPA SW-846 method 8000D, laboratory control sample; from memory.
CheckOutcome check_controls(const FirstResults& first);

}  // namespace loqsmith
