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
};

/// Looks for the target within its window around the expected time.
///
/// A summit is a peak when its smoothed apex lies above the baseline between
/// its feet by the settings' threshold times that height's own standard
/// deviation, and is at least the settings' minimum width wide at half of that
/// height. Of several, those that no valley parts from a higher one are
/// dropped, and the one nearest to the expected time is taken.
///
/// @param noise  standard deviation of a point, >= 0
ChosenApex choose_apex(const SmoothedStretch& stretch,
                       const TargetSettings& target,
                       const WindowTemplate& window, double expected,
                       double noise);

/// Standard deviation of a smoothed apex above the averaged-feet baseline, for
/// independent noise:
///
///     s sqrt(c0 + (1 - f)^2 / nL + f^2 / nR)
///
/// with c0 the smoothing's middle weight, nL and nR the points that hold the
/// baseline left and right, f the share of the right ones at the apex.
double smoothed_height_deviation(const SmoothedStretch& stretch,
                                 const PlacedWindow& window, double apex,
                                 double noise);

}  // namespace loqsmith
