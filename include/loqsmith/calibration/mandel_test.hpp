#pragma once

#include "loqsmith/calibration/calibration.hpp"
#include "loqsmith/calibration/diagnostic_test.hpp"

namespace loqsmith {

/// Mandel's test of a straight line against a quadratic over the same
/// standards, with the same weights and the same intercept:
///
///     F = ((n - p) s1^2 - (n - p - 1) s2^2) / s2^2,  F_0.99(1, n - p - 1)
///
/// s1 and s2 the residual standard deviations of line and quadratic, p the
/// line's coefficients (2 with intercept). Above the critical value the
/// quadratic describes the standards better. Passed: the model in use is
/// borne out, the line by a smaller F, the quadratic by a larger one.
///
/// Source: ISO 8466-1 and DIN 38402-51 for the unweighted line with intercept;
/// from memory.
///
/// @return not applicable: "few-points" or "few-levels" for a quadratic,
///         "not-defined" where the quadratic goes through all points.
Outcome<DiagnosticTest> mandel_test(const Calibration& calibration);

}  // namespace loqsmith
