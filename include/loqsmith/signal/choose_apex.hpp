#pragma once

#include <optional>
#include <string>
#include <vector>

#include "loqsmith/signal/learn.hpp"
#include "loqsmith/signal/place_window.hpp"
#include "loqsmith/signal/settings.hpp"
#include "loqsmith/signal/summits.hpp"

namespace loqsmith {

/// Which summit of a trace is the target, if any.
struct ChosenApex {
  std::optional<double> minutes;     ///< nothing: no peak in the window
  double height = 0.0;               ///< smoothed apex above the baseline
  double height_deviation = 0.0;     ///< that height's own standard deviation
  std::vector<Summit> neighbours;    ///< summits that count as peaks
  std::vector<std::string> reasons;  ///< "several-peaks"
  /// A peak nearer than the chosen one whose feet the trace does not hold.
  bool cut = false;
};

/// Looks for the target within its window around the expected time.
///
/// A summit is a peak when its smoothed apex lies above the baseline between
/// its feet by the settings' threshold times that height's own standard
/// deviation, and is at least the settings' minimum width wide at half of that
/// height. Of several, those that no valley parts from a higher one are
/// dropped, and the one nearest to the expected time is taken.
///
ChosenApex choose_apex(const SmoothedStretch& stretch,
                       const TargetSettings& target,
                       const WindowTemplate& window, double expected,
                       const NoiseModel& noise);

}  // namespace loqsmith
