#include "loqsmith/calibration/model_powers.hpp"

namespace loqsmith {

ModelPowers model_powers(const CalibrationSettings& settings) {
  const bool zero = settings.intercept == CalibrationSettings::Intercept::Zero;
  switch (settings.model) {
    case CalibrationSettings::Model::Linear:
      return {zero ? 1 : 0, 1};
    case CalibrationSettings::Model::Quadratic:
      return {zero ? 1 : 0, 2};
    case CalibrationSettings::Model::ResponseFactor:
      return {1, 1};
  }
  return {0, 1};
}

}  // namespace loqsmith
