#pragma once

#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/signal/place_window.hpp"
#include "loqsmith/signal/summits.hpp"

namespace loqsmith {

/// Where a peak itself begins and ends, as a window with its baseline.
///
/// A first baseline is laid three widths at half height away on either side
/// (nearer where a neighbour or the end of the trace is). Going outwards from
/// the apex, the foot is where the smoothed signal above the baseline comes
/// down to the noise: to one standard deviation of a smoothed point, or 0.1 %
/// of the height where that is more; or, below a tenth of the height, where it
/// has stopped falling (less than that noise in half a width), so that the
/// foot does not creep along a tail or a bent baseline. A second baseline just
/// outside these feet then gives the final ones. A neighbour's valley ends the
/// way.
///
/// @param summits     those that count as peaks, in order of time
/// @param apex        minutes
/// @param width_half  > 0
/// @param noise       standard deviation of a point
/// @return not applicable: "window-not-covered"
Outcome<PlacedWindow> place_at_own_feet(const SmoothedStretch& stretch,
                                        const std::vector<Summit>& summits,
                                        double apex, double width_half,
                                        double noise);

}  // namespace loqsmith
