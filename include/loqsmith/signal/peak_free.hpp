#pragma once

#include <vector>

#include "loqsmith/chromatogram/trace.hpp"

namespace loqsmith {

/// Points from which noise is measured.
struct NoiseStretch {
  std::vector<double> minutes;
  std::vector<double> signal;
  double covered_minutes = 0.0;  ///< time that they stand for
};

/// The points from one time to another, as far as the trace goes.
NoiseStretch stretch_between(const Trace& trace, double from_minutes,
                             double to_minutes);

/// Peak-free points nearest to [start, end] on both sides, outside it: half of
/// the wanted time from each side where there is enough, otherwise more from
/// the other one. Up to 1.7 widths at half height about any summit that stands
/// out by 5 standard deviations of the smoothed point-to-point noise are left
/// out. Searched as far as 4 times the wanted time on either side.
NoiseStretch peak_free_beside(const Trace& trace, double start_minutes,
                              double end_minutes, double width_half_minutes,
                              double wanted_minutes);

}  // namespace loqsmith
