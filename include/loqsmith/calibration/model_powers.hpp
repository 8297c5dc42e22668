#pragma once

#include "loqsmith/calibration/settings.hpp"

namespace loqsmith {

/// The powers of the concentration in a model, without a gap between them.
struct ModelPowers {
  int lowest = 0;   ///< 0 with a fitted intercept, 1 through zero
  int highest = 1;  ///< 2 for a quadratic
  int count() const { return highest - lowest + 1; }
};

/// A mean response factor is a line through zero.
ModelPowers model_powers(const CalibrationSettings& settings);

}  // namespace loqsmith
