#include "loqsmith/signal/response_noise.hpp"

namespace loqsmith {
namespace {

constexpr double kClearlyNoisier = 1.3;

NoiseModel raised(const NoiseModel& whole, const NoiseModel& here) {
  const double known = whole.point_to_point();
  const double seen = here.point_to_point();
  if (!(seen > kClearlyNoisier * known)) return whole;
  return known > 0.0 ? whole.scaled(seen / known) : white_noise(seen);
}

}  // namespace

Outcome<double> predict_response_noise(const std::vector<double>& weights,
                                       const NoiseModel& here,
                                       const NoiseEstimate& noise) {
  if (!noise.whole) return NotApplicable{noise.whole.reason()};
  return weighted_noise(weights, raised(*noise.whole, here));
}

}  // namespace loqsmith
