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

/// Which points of a trace stand clear of [start, end] and of peaks, that is
/// farther than 1.7 widths at half height from any summit that stands out by 5
/// standard deviations of the free points about a line. What is free and how
/// far the free points scatter is found in turn, three times: peaks that fill
/// less than half of the trace do not hide themselves.
std::vector<bool> peak_free_points(const Trace& near, double start_minutes,
                                   double end_minutes, double width_half);

/// Peak-free points nearest to [start, end] on both sides, outside it: half of
/// the wanted time from each side where there is enough, otherwise more from
/// the other one. Searched as far as 4 times the wanted time on either side.
NoiseStretch peak_free_beside(const Trace& trace, double start_minutes,
                              double end_minutes, double width_half_minutes,
                              double wanted_minutes);

}  // namespace loqsmith
