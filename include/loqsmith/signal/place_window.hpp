#pragma once

#include <cstddef>
#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/signal/summits.hpp"

namespace loqsmith {

/// Where a window is to be placed and how long its sides are, in minutes.
struct Placement {
  double apex = 0.0;
  double left = 0.0;   ///< apex minus left foot, > 0
  double right = 0.0;  ///< right foot minus apex, > 0
  double width_half = 0.0;
  bool found = true;   ///< false: the expected time of a peak not seen
  double noise = 0.0;  ///< standard deviation of a point
};

/// One end of a placed window.
struct Foot {
  double minutes = 0.0;
  bool dropped = false;    ///< a neighbour's valley, not the template's foot
  bool crowded = false;    ///< the baseline is held beyond a neighbour
  bool shortened = false;  ///< fewer points for the baseline than wanted
  /// Points [first, last) of the stretch whose mean holds the baseline; none
  /// where a neighbour or the end of the trace leaves no room.
  std::size_t first = 0;
  std::size_t last = 0;
  double anchor_minutes = 0.0;  ///< their means
  double anchor_signal = 0.0;

  std::size_t points() const { return last - first; }
};

/// A window with its straight baseline.
struct PlacedWindow {
  Foot left;
  Foot right;
  /// "overlapped", "baseline-shortened", "baseline-one-sided",
  /// "baseline-at-valley".
  std::vector<std::string> reasons;

  double baseline_at(double minutes) const;
  /// Share of the right anchor in the baseline at a time; the left has the
  /// rest.
  double right_share(double minutes) const;
};

/// Places feet and baseline around an apex.
///
/// The baseline runs through the mean of the points just outside each foot,
/// over half a width at half height and at least 5 points, but not onto a
/// neighbour's flank. A neighbour whose flank begins inside the window bounds
/// it at the valley (perpendicular drop); the baseline then runs on below the
/// neighbour to the first free stretch beyond it, as far from the neighbour's
/// apex as the foot is from ours (at least 1.7 widths at half height). With no
/// free stretch on one side the baseline is level with the other side; with
/// none on either it goes through the valleys.
///
/// @param neighbours  summits that count as peaks, in order of time; those
///                    nearer to the apex than half a width (three quarters
///                    where no peak was found) are the target itself
/// @return not applicable: "window-not-covered"
Outcome<PlacedWindow> place_window(const SmoothedStretch& stretch,
                                   const std::vector<Summit>& neighbours,
                                   const Placement& placement);

/// Summits that stand out by `multiple` standard deviations of the difference
/// of two smoothed points; the noise is the given one or, where larger, the
/// point-to-point noise within a width at half height around the summit. What
/// smoothing makes of a tall peak's foot is left out (ringing.hpp).
std::vector<Summit> significant_summits(const SmoothedStretch& stretch,
                                        const std::vector<Summit>& summits,
                                        double multiple, double noise,
                                        double width_half);

}  // namespace loqsmith
