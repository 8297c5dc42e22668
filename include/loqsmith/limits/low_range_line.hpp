#pragma once

#include <optional>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/calibration/calibration.hpp"
#include "loqsmith/limits/leverage.hpp"

namespace loqsmith {

/// An unweighted straight line through the low end of a calibration.
struct LowRangeLine {
  std::vector<double> concentrations;  ///< of the points, ascending
  std::vector<double> responses;       ///< of the points, same order
  double intercept = 0.0;              ///< zero through zero
  double slope = 0.0;                  ///< above zero
  double residual_sd = 0.0;            ///< s_y/x, above zero
  int degrees_of_freedom = 0;
  std::size_t levels = 0;  ///< above zero, at least 4
  double highest = 0.0;    ///< highest level taken
  bool through_zero = false;
  Leverage leverage;

  /// s_a = s_y/x sqrt(h(0)); zero through zero.
  double intercept_sd() const;
  /// Standard deviation of the mean of m responses to no analyte less the
  /// intercept, s_y/x sqrt(1/m + h(0)).
  double blank_reading_sd(double replicates) const;
};

/// Refits the used standards with concentration up to `up_to` times the lowest
/// level above zero (nothing: all), those at zero included, with fitted or
/// zero intercept as the calibration's.
/// @return not applicable: fewer than 4 levels above zero in the range, slope
///         not positive, points exactly on a line.
Outcome<LowRangeLine> fit_low_range(const Calibration& calibration,
                                    std::optional<double> up_to);

}  // namespace loqsmith
