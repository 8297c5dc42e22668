#pragma once

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/signal/place_window.hpp"
#include "loqsmith/signal/settings.hpp"

namespace loqsmith {

/// Feet of a peak that a person set, in minutes; the end lies behind the start.
struct ManualBounds {
  double start_minutes = 0.0;
  double end_minutes = 0.0;

  double middle() const { return 0.5 * (start_minutes + end_minutes); }
};

/// The target as it is measured between bounds set by hand: looked for between
/// them, not parted from any neighbour, and by its area where the learned shape
/// would be the response, since that shape spans other feet.
TargetSettings between_bounds(TargetSettings target,
                              const ManualBounds& bounds);

/// Exactly these feet, whatever neighbours there are, and the baseline through
/// the means of the points just outside them (or the estimated one).
/// @return not applicable: "window-not-covered"
Outcome<PlacedWindow> place_by_hand(const SmoothedStretch& stretch,
                                    const ManualBounds& bounds,
                                    double width_half, double noise);

}  // namespace loqsmith
