#pragma once

#include "loqsmith/calibration/calibration.hpp"
#include "loqsmith/calibration/diagnostic_test.hpp"

namespace loqsmith {

/// Whether the levels lie off the curve further than replicates scatter:
///
///     F = (SS_lof / (k - p)) / (SS_pe / (n - k))
///
/// SS_pe the squares within the k levels, SS_lof what remains of the residual
/// sum, p the coefficients, all with the weights of the fit; held against
/// F_0.95(k - p, n - k).
///
/// Source: textbook partition of the residual sum (Draper and Smith, Applied
/// Regression Analysis; from memory).
///
/// @return not applicable: "no-replicates", "few-levels" (no more levels than
///         coefficients), "not-defined" where all replicates agree.
Outcome<DiagnosticTest> lack_of_fit(const Calibration& calibration);

}  // namespace loqsmith
