#pragma once

#include <vector>

#include "loqsmith/signal/summits.hpp"

namespace loqsmith {

/// Whether a summit stands out only because smoothing dug a dip beside it.
///
/// The weights of a smoothing parabola are negative at their ends, so that the
/// smoothed signal dips at the foot of a tall peak by up to some thousandths of
/// its height; any ripple beyond then looks prominent. Where the dip lies
/// within 2.5 smoothing lengths of a summit that is at least 30 times as
/// prominent as this one, the signal itself has to rise from it too: its mean
/// over a third of the smoothing length around the summit above that around
/// the dip, by `multiple` standard deviations of the difference of two such
/// means.
///
/// @param noise  standard deviation of a point, white
bool is_ringing(const SmoothedStretch& stretch,
                const std::vector<Summit>& summits, const Summit& summit,
                double multiple, double noise);

}  // namespace loqsmith
