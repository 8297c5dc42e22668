#pragma once

namespace loqsmith {

/// How standards become a curve (`<calibration>` of the method).
struct CalibrationSettings {
  enum class Model { Linear, Quadratic, ResponseFactor };
  enum class Weight { None, InverseX, InverseXSquared, InverseVariance };
  enum class Intercept { Fitted, Zero };
  enum class Sets { One, Bracketing, Latest };

  Model model = Model::Linear;
  Weight weight = Weight::None;
  Intercept intercept = Intercept::Fitted;
  Sets sets = Sets::One;
};

}  // namespace loqsmith
