#pragma once

#include "loqsmith/judgement/result_checks.hpp"

namespace loqsmith {

/// Standards of another source, whose level states the concentration in the
/// vial: the recovery of each. One that fails, or gives no number, affects all
/// results of the analyte, whatever its calibration set: the standards' own
/// stock is in doubt.
///
/// Source: initial calibration verification as in US EPA SW-846 method 8000D;
/// from memory.
CheckOutcome check_second_source(const FirstResults& first);

}  // namespace loqsmith
