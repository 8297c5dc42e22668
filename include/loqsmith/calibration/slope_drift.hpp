#pragma once

#include "loqsmith/calibration/calibration.hpp"
#include "loqsmith/calibration/diagnostic_test.hpp"

namespace loqsmith {

/// Trend of the slope over the sequence, by run order of the standards.
struct SlopeDrift {
  double percent_per_injection = 0.0;
  double percent_over_standards = 0.0;  ///< from the first to the last used
  DiagnosticTest test;
};

/// Whether the slope changes with the injection number o: the fit once more
/// with the term d x (o - mean o), same weights, and t = d / se(d) with
/// n - p - 1 degrees of freedom, two-sided 0.05. Percentages are of the slope
/// at the mean. Exact for normal responses, whatever the order of the levels,
/// as long as order and level are not one and the same.
///
/// Source: t test of one added term, any textbook of regression.
///
/// @return not applicable: "few-points" (no degree of freedom left),
///         "order-follows-level" (the term cannot be told from the model),
///         "not-defined" without scatter.
Outcome<SlopeDrift> slope_drift(const Calibration& calibration);

}  // namespace loqsmith
