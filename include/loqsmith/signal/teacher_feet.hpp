#pragma once

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/chromatogram/trace.hpp"
#include "loqsmith/signal/settings.hpp"

namespace loqsmith {

/// Feet and shape of one peak that is known to be there.
struct TeacherFeet {
  double apex = 0.0;
  double left = 0.0;   ///< apex minus left foot
  double right = 0.0;  ///< right foot minus apex
  double width_half = 0.0;
  double height = 0.0;
  double baseline_left = 0.0;  ///< signal of the baseline at the feet
  double baseline_right = 0.0;
  double noise = 0.0;  ///< standard deviation of a point beside the peak
  bool saturated = false;
  bool left_overlapped = false;
  bool right_overlapped = false;
  double sigma = 0.0;  ///< of the fitted peak, overlap `model` only; 0: none
  double tau = 0.0;
};

/// Where a peak begins and ends.
///
/// Its own feet are found as own_feet.hpp has it; a neighbour's valley counts
/// as overlap when the signal there is still above 2.5 % of the height. Where
/// the settings' overlap is `model` the peak is fitted together with its
/// neighbours. Where one overlaps, width and overlapped feet are those of the
/// fitted peak (0.1 % of its height), so that the template spans a whole peak
/// even where none of the standards shows one.
///
/// @param apex        as seen so far, minutes
/// @param width_half  as seen so far
/// @return not applicable: "no-peak", "window-not-covered"
Outcome<TeacherFeet> find_teacher_feet(const Trace& trace,
                                       const TargetSettings& target,
                                       double apex, double width_half);

}  // namespace loqsmith
