#pragma once

#include <optional>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/calibration/calibration.hpp"
#include "loqsmith/calibration/inverse.hpp"

namespace loqsmith {

/// What a line of responses on added amounts says of the sample itself.
struct StandardAddition {
  /// a / b, in the unit of the added amounts; may come out below zero.
  double amount = 0.0;
  double standard_error = 0.0;
  /// t_{0.975, n - 2} times the standard error: the textbook's interval.
  double propagated_half_width = 0.0;
  /// The exact 95 % interval; not applicable where the slope does not differ
  /// from zero ("no-finite-interval").
  Outcome<ConcentrationInterval> interval = NotApplicable{"not computed"};
  /// Its larger side, so that amount +- this contains it; nothing where it
  /// does not exist.
  std::optional<double> expanded_uncertainty;
};

/// The unweighted straight line through the responses of a sample (added
/// amount 0) and of portions of it with known amounts added. The points'
/// `concentration` is the amount added, in the vial. The line is unweighted
/// with a fitted intercept whatever the method says of its standards: the
/// intercept is what is sought, and weights in the added amount have no value
/// at zero.
///
/// @return not applicable: no point without addition ("no-sample-response"),
///         fewer than two different amounts added ("few-additions": two points
///         make a line that nothing can contradict), slope not above zero
///         ("slope-not-positive").
Outcome<Calibration> fit_addition_line(std::vector<StandardPoint> points);

/// Amount in the sample, where the line y = a + b x meets y = 0:
///
///     x_E = a / b,   s_xE = (s / b) sqrt(1/n + mean_y^2 / (b^2 S_xx))
///
/// with the exact interval of Fieller (1954) for that crossing:
///
///     -mean_x + (mean_y +- t s sqrt((1 - g)/n + mean_y^2/(b^2 S_xx)))
///               / (b (1 - g)),      g = t^2 s^2 / (b^2 S_xx) < 1
///
/// Valid for a straight line through zero in the total amount: what the sample
/// holds beside the analyte must raise no signal of its own.
///
/// Source: method of standard additions, Miller and Miller, Statistics and
/// Chemometrics for Analytical Chemistry, regression chapter; from memory.
StandardAddition amount_by_addition(const Calibration& line);

}  // namespace loqsmith
