#pragma once

#include <cstddef>
#include <span>

#include "loqsmith/base/outcome.hpp"

namespace loqsmith {

/// Noise and drift of a long stretch of baseline, segment by segment.
struct SegmentNoise {
  double peak_to_peak = 0.0;     ///< mean over the segments, signal unit
  double segment_minutes = 0.0;  ///< length of a segment
  std::size_t segments = 0;      ///< that had points enough
  double drift_per_hour = 0.0;   ///< signal unit
};

/// Segment peak-to-peak noise: the baseline is parted into equal segments of
/// at most 1 minute; of each the least-squares line is taken off, and largest
/// minus smallest residual are averaged over the segments. A segment with
/// fewer than half of the points of a full one (or fewer than 5) is passed
/// over. Drift: slope of the least-squares line through all points, times 60.
///
/// Only the short-term noise of the standard; not to be confused with the noise
/// of the pharmacopoeias, which stands where the peak does and keeps its drift.
///
/// @param minutes  increasing; peaks are left out by the caller
/// @return not applicable: no segment with points enough.
///
/// Source: ASTM E685 (liquid) and E1657 (gas chromatography), static
/// short-term noise and drift, in outline and from memory; a line taken off
/// instead of two parallels drawn around the trace.
Outcome<SegmentNoise> segment_noise(std::span<const double> minutes,
                                    std::span<const double> signal,
                                    double step_minutes);

}  // namespace loqsmith
