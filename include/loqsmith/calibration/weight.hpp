#pragma once

#include <optional>

#include "loqsmith/calibration/calibration.hpp"

namespace loqsmith {

/// A mean response factor counts as weighted: it is so by definition.
bool is_weighted(const CalibrationSettings& settings);

/// The weight function at a concentration: 1, 1/x, 1/x^2, or one over the
/// variance function. A mean response factor is the line through zero with
/// weight 1/x^2, whatever weight the settings name.
/// @param variance  needed with 1/s2 alone
/// @return nothing where the weight has no value: x not above zero with 1/x or
///         1/x^2, a variance of zero, 1/s2 without a variance function.
std::optional<double> calibration_weight(
    const CalibrationSettings& settings,
    const std::optional<VarianceFunction>& variance, double concentration);

/// The same of a fitted curve.
std::optional<double> calibration_weight(const Calibration& calibration,
                                         double concentration);

/// Standard deviation of single responses at a concentration, as the fit sees
/// it: residual_sd / sqrt(w), the weight taken at the lowest level of the fit
/// for everything below it, where it would otherwise have no value at zero; of
/// a weighted fit never below that of the blanks, where it knows any.
double response_sd_at(const Calibration& calibration, double concentration);

}  // namespace loqsmith
