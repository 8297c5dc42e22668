#pragma once

#include "loqsmith/calibration/calibration.hpp"
#include "loqsmith/calibration/diagnostic_test.hpp"

namespace loqsmith {

/// Whether the residuals could be normal: Shapiro and Wilk's W of the
/// standardised residuals (see influence.hpp, shapiro_wilk.hpp) at 0.05. The
/// residuals of few points are correlated through the fit, which makes the
/// test say less than its p, not more.
///
/// @return not applicable: "few-points" (fewer than three degrees of freedom),
///         "not-defined" without scatter.
Outcome<DiagnosticTest> residual_normality(const Calibration& calibration);

}  // namespace loqsmith
