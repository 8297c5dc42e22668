#pragma once

#include <optional>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/calibration/calibration.hpp"

namespace loqsmith {

struct InversePrediction {
  double concentration = 0.0;  ///< method's unit; may be negative or beyond
  /// Half width of the 95 % interval from the calibration alone; absent where
  /// no finite interval exists.
  std::optional<double> expanded_uncertainty;
};

/// Concentration whose response the curve gives, on its rising branch.
/// @return not applicable: the response lies beyond a quadratic's vertex.
Outcome<InversePrediction> concentration_from_response(
    const Calibration& calibration, double response);

/// The curve itself.
double response_from_concentration(const Calibration& calibration,
                                   double concentration);

}  // namespace loqsmith
