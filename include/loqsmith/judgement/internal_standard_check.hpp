#pragma once

#include "loqsmith/judgement/result_checks.hpp"

namespace loqsmith {

/// Area of the internal standard, referred to the undiluted one, in percent of
/// its mean over the standards of the result's calibration set. One row for
/// each failure, one for all that passed.
///
/// A failed one affects this analyte's result of the injection: an analyte
/// without internal standard, or with another, is not divided by it and is not
/// affected. An injection that shows none fails, except a solvent blank, which
/// need not contain it (less than a tenth of the mean is carried over).
///
/// Source: area of the internal standard within 50 to 200 % of the
/// calibration's, US EPA SW-846 method 8000D; from memory.
CheckOutcome check_internal_standard(const FirstResults& first);

}  // namespace loqsmith
