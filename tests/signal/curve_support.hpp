#pragma once

#include "loqsmith/signal/measure_peak.hpp"
#include "loqsmith/signal/peak_curve.hpp"
#include "loqsmith/signal/peak_working.hpp"

namespace loqsmith::test {

/// The curve of a peak that can be measured; an empty one otherwise.
inline PeakCurve curve_of(const Trace& trace, const TargetSettings& target,
                          const WindowTemplate& window, double expected,
                          const Outcome<NoiseEstimate>& noise) {
  const WorkedPeak worked =
      measure_peak_with_working(trace, target, window, expected, noise, "");
  if (!worked.peak) return {};
  return peak_curve(*worked.peak, worked.working, window);
}

}  // namespace loqsmith::test
