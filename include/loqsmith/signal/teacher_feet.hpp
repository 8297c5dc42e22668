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
/// A first baseline is laid three widths at half height away on either side
/// (nearer where a neighbour or the end of the trace is). Going outwards from
/// the apex, the foot is where the smoothed signal above the baseline comes
/// down to the noise: to one standard deviation of a smoothed point, or 0.1 %
/// of the height where that is more; or, below a tenth of the height, where it
/// has stopped falling (less than that noise in half a width), so that the
/// foot does not creep along a tail or a bent baseline. A second baseline just
/// outside these feet then gives the final ones. A neighbour's valley ends the
/// way; it counts as overlap when the signal there is still above 2.5 % of the
/// height. Where the settings' overlap is `model` the peak is fitted together
/// with its neighbours. Where one overlaps, width and overlapped feet are those
/// of the fitted peak (0.1 % of its height), so that the template spans a whole
/// peak even where none of the standards shows one.
///
/// @param apex        as seen so far, minutes
/// @param width_half  as seen so far
/// @return not applicable: "no-peak", "window-not-covered"
Outcome<TeacherFeet> find_teacher_feet(const Trace& trace,
                                       const TargetSettings& target,
                                       double apex, double width_half);

}  // namespace loqsmith
