#include "loqsmith/calibration/calibration.hpp"

#include <algorithm>

namespace loqsmith {

std::size_t Calibration::used_points() const {
  return static_cast<std::size_t>(std::count_if(
      points.begin(), points.end(), [](const auto& p) { return p.used; }));
}

std::size_t Calibration::used_levels() const {
  return static_cast<std::size_t>(
      std::count_if(levels.begin(), levels.end(),
                    [](const auto& level) { return level.points > 0; }));
}

std::size_t Calibration::accepted_levels() const {
  return static_cast<std::size_t>(std::count_if(
      levels.begin(), levels.end(), [](const auto& l) { return l.accepted; }));
}

}  // namespace loqsmith
