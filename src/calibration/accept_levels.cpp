#include <cmath>

#include "loqsmith/calibration/fit_calibration.hpp"

namespace loqsmith {
namespace {

bool passes(const CalibrationLevel& level, std::optional<double> percent) {
  if (level.points == 0) return false;
  if (!percent) return true;
  return level.mean_deviation_percent &&
         std::abs(*level.mean_deviation_percent) <= *percent;
}

}  // namespace

void accept_levels(Calibration& calibration, std::optional<double> percent,
                   std::optional<double> lowest_percent) {
  calibration.accepted_lowest.reset();
  calibration.accepted_highest.reset();
  for (CalibrationLevel& level : calibration.levels) {
    const bool is_lowest = level.concentration == calibration.lowest;
    level.accepted =
        passes(level, is_lowest && lowest_percent ? lowest_percent : percent);
    if (!level.accepted) continue;
    if (!calibration.accepted_lowest)
      calibration.accepted_lowest = level.concentration;
    calibration.accepted_highest = level.concentration;
  }
}

}  // namespace loqsmith
