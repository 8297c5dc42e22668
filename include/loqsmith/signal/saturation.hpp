#pragma once

#include <span>

namespace loqsmith {

/// True when the top of a peak is cut off by the detector's or converter's
/// range: at least 3 successive points share the highest value of the window,
/// over a stretch in which a peak of this height and width would have fallen
/// by more than 3 of the signal's own steps (coarse digits also make flat
/// tops, but only as flat as their step allows).
///
///     fall over a stretch d about the apex = height ln 2 (d / width)^2
///
/// @param height      above the baseline
/// @param width_half  at half height, minutes, > 0
bool is_saturated(std::span<const double> minutes,
                  std::span<const double> signal, double start_minutes,
                  double end_minutes, double height, double width_half);

}  // namespace loqsmith
