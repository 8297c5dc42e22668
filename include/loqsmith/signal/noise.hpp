#pragma once

#include <cstddef>
#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/chromatogram/trace.hpp"
#include "loqsmith/signal/noise_model.hpp"
#include "loqsmith/signal/settings.hpp"

namespace loqsmith {

/// Noise of one stretch of a trace. Zero is legal (a thresholded detector).
struct NoiseEstimate {
  double start_minutes = 0.0;  ///< the stretch used
  double end_minutes = 0.0;
  std::size_t points = 0;
  double peak_to_peak = 0.0;  ///< h: largest minus smallest signal
  /// Standard deviation of single points about a straight line through the
  /// stretch, n - 2 degrees of freedom, robust against a small peak in it.
  double standard_deviation = 0.0;
  std::vector<std::string> reasons;  ///< e.g. "noise-stretch-short"
  /// Of a longer peak-free stretch around it; from it the spread of heights and
  /// areas is predicted.
  NoiseModel model;
};

/// Noise around a retention time, over `span_widths` widths at half height,
/// situated equally around the place where the peak would be found.
///
/// @return not applicable: fewer than 5 points in the stretch.
///
/// Source: Ph. Eur. 2.2.46 (since supplement 11.3: at least 5 times the width
/// at half height), harmonised with USP <621>; from memory.
Outcome<NoiseEstimate> measure_noise(const Trace& trace, double center_minutes,
                                     double width_half_minutes,
                                     const NoiseSettings& settings);

/// The same from the trace that holds the peak: the stretches of the same
/// total length nearest to [start, end] on both sides, outside it.
Outcome<NoiseEstimate> measure_noise_beside(const Trace& trace,
                                            double start_minutes,
                                            double end_minutes,
                                            double width_half_minutes,
                                            const NoiseSettings& settings);

/// Signal-to-noise of a height as the settings' measure defines it; not
/// applicable where the noise is zero.
Outcome<double> signal_to_noise(double height, const NoiseEstimate& noise,
                                NoiseSettings::Measure measure);

/// The noise figure that the measure speaks of: h or the standard deviation.
double noise_figure(const NoiseEstimate& noise, NoiseSettings::Measure measure);

}  // namespace loqsmith
