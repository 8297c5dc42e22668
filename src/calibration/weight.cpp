#include "loqsmith/calibration/weight.hpp"

#include <algorithm>
#include <cmath>

namespace loqsmith {
namespace {

std::optional<double> inverse_power(double concentration, bool squared) {
  if (!(concentration > 0.0)) return std::nullopt;
  return squared ? 1.0 / (concentration * concentration) : 1.0 / concentration;
}

}  // namespace

bool is_weighted(const CalibrationSettings& settings) {
  return settings.model == CalibrationSettings::Model::ResponseFactor ||
         settings.weight != CalibrationSettings::Weight::None;
}

std::optional<double> calibration_weight(
    const CalibrationSettings& settings,
    const std::optional<VarianceFunction>& variance, double concentration) {
  if (settings.model == CalibrationSettings::Model::ResponseFactor)
    return inverse_power(concentration, true);
  switch (settings.weight) {
    case CalibrationSettings::Weight::None:
      return 1.0;
    case CalibrationSettings::Weight::InverseX:
      return inverse_power(concentration, false);
    case CalibrationSettings::Weight::InverseXSquared:
      return inverse_power(concentration, true);
    case CalibrationSettings::Weight::InverseVariance:
      if (!variance || !(variance->at(concentration) > 0.0))
        return std::nullopt;
      return 1.0 / variance->at(concentration);
  }
  return std::nullopt;
}

std::optional<double> calibration_weight(const Calibration& calibration,
                                         double concentration) {
  return calibration_weight(calibration.settings, calibration.variance,
                            concentration);
}

double response_sd_at(const Calibration& calibration, double concentration) {
  const double at = std::max(concentration, calibration.lowest);
  const double weight = calibration_weight(calibration, at).value();
  const double fitted = calibration.residual_sd / std::sqrt(weight);
  if (!calibration.blanks || !is_weighted(calibration.settings)) return fitted;
  return std::max(fitted, calibration.blanks->sd);
}

}  // namespace loqsmith
