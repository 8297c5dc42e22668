#include "loqsmith/limits/leverage.hpp"

#include <cstddef>

namespace loqsmith {
namespace {

double weight_of(const std::vector<double>& weights, std::size_t i) {
  return weights.empty() ? 1.0 : weights[i];
}

}  // namespace

double Leverage::at(double concentration) const {
  const double distance = concentration - centre;
  return inverse_weight + distance * distance * inverse_squares;
}

Leverage leverage_of(const std::vector<double>& concentrations,
                     const std::vector<double>& weights, bool through_zero) {
  Leverage leverage;
  if (!through_zero) {
    double sum = 0.0, moment = 0.0;
    for (std::size_t i = 0; i < concentrations.size(); ++i) {
      sum += weight_of(weights, i);
      moment += weight_of(weights, i) * concentrations[i];
    }
    leverage.inverse_weight = 1.0 / sum;
    leverage.centre = moment / sum;
  }
  double squares = 0.0;
  for (std::size_t i = 0; i < concentrations.size(); ++i) {
    const double distance = concentrations[i] - leverage.centre;
    squares += weight_of(weights, i) * distance * distance;
  }
  leverage.inverse_squares = 1.0 / squares;
  return leverage;
}

}  // namespace loqsmith
