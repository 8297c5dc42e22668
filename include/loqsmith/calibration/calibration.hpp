#pragma once

#include <array>
#include <cstddef>
#include <optional>
#include <string>
#include <vector>

#include "loqsmith/calibration/settings.hpp"
#include "loqsmith/calibration/variance_function.hpp"

namespace loqsmith {

/// One standard injection of one analyte, before and after the fit.
struct StandardPoint {
  int injection = 0;
  std::string level;
  double concentration = 0.0;  ///< nominal, method's unit, >= 0
  double response = 0.0;  ///< detector units, or ratio to the internal standard
  bool used = true;       ///< false: not in the fit; `note` says why
  std::string note;       ///< reason words, separated by ';'

  // Filled by the fit.
  double weight = 0.0;  ///< as used in the fit, before any scaling
  std::optional<double> back_calculated;    ///< concentration from the curve
  std::optional<double> deviation_percent;  ///< 100 (back - nominal)/nominal
};

/// One level (standards of equal nominal concentration), above zero.
struct CalibrationLevel {
  double concentration = 0.0;
  std::size_t points = 0;  ///< used in the fit
  std::optional<double> mean_deviation_percent;
  bool accepted = false;  ///< used, and its mean back-calculation passes
};

/// How blank responses scatter.
struct BlankSpread {
  double sd = 0.0;                  ///< response units
  double degrees_of_freedom = 0.0;  ///< at least 1
};

/// y = intercept + slope x + curvature x^2; y in response units, x in the
/// method's concentration unit.
struct Calibration {
  CalibrationSettings settings;
  double intercept = 0.0;
  double slope = 0.0;
  double curvature = 0.0;
  /// sqrt(sum w r^2 / (n - p)); for a response factor the standard deviation
  /// of the factors.
  double residual_sd = 0.0;
  double r2 = 0.0;  ///< weighted; through zero: on sum w y^2 (NIST convention)
  std::optional<double> relative_standard_error;  ///< percent
  int degrees_of_freedom = 0;
  /// Covariance of (intercept, slope, curvature), zero where not fitted.
  std::array<std::array<double, 3>, 3> covariance{};
  std::vector<StandardPoint> points;     ///< all standards, used or not
  std::vector<CalibrationLevel> levels;  ///< ascending, concentration > 0
  double lowest = 0.0;  ///< lowest and highest level in the fit
  double highest = 0.0;
  std::optional<double> accepted_lowest;  ///< range by accepted levels
  std::optional<double> accepted_highest;
  std::vector<std::string> notes;  ///< reason words
  /// What weight 1/s2 was taken from; the other weights have none.
  std::optional<VarianceFunction> variance;
  /// Blank responses where there are any: of weighted fits they give the least
  /// that a response scatters by.
  std::optional<BlankSpread> blanks;

  std::size_t used_points() const;
  std::size_t used_levels() const;
  std::size_t accepted_levels() const;
};

}  // namespace loqsmith
