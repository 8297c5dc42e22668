#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/chromatogram/trace.hpp"
#include "loqsmith/signal/baseline_bias.hpp"
#include "loqsmith/signal/noise_model.hpp"
#include "loqsmith/signal/segment_noise.hpp"
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
  /// Of a longer peak-free stretch around it: what heights are held against
  /// when peaks are looked for.
  NoiseModel model;
  /// Of the whole trace without its peaks: what the spread of responses at zero
  /// is predicted from. Not applicable: "noise-trace-short: ...".
  Outcome<NoiseModel> whole = NotApplicable{"no-noise: not looked for"};
  /// The same points, minute by minute; not applicable where too few.
  Outcome<SegmentNoise> segments = NotApplicable{"no-noise: not looked for"};
  /// Only where the target's baseline is an estimated one.
  std::optional<SimulatedBaseline> simulated_baseline;
};

/// Noise of a blank around a retention time, over `span_widths` widths at half
/// height, situated equally around the place where the peak would be found;
/// and that of its whole trace.
///
/// h is the largest minus the smallest signal over the stretch, drift included
/// (`drift="removed"` is a house rule, not the pharmacopoeias'). Of independent
/// normal noise h is d2(N) standard deviations of a point (5.0 of them at 100
/// points), so that S/N = 2H/h falls with the sampling rate; the estimate
/// states N.
///
/// A stretch that the trace does not cover is measured as far as it goes, with
/// the reason "noise-stretch-short".
///
/// @return not applicable: fewer than 5 points in the stretch.
///
/// Source: Ph. Eur. 2.2.46, signal-to-noise ratio, harmonised with USP <621>
/// and JP. The stretch: at least 5 widths at half height (Ph. Eur. supplements
/// 6.4 to 10.8, and again since supplement 11.3, in force 1 January 2024);
/// 20 widths, or 5 where 20 are impossible, in Ph. Eur. 11.0 (in force 1
/// January 2023) and USP <621> of December 2022. Wording of h from memory.
Outcome<NoiseEstimate> measure_noise(const Trace& trace, double center_minutes,
                                     double width_half_minutes,
                                     const NoiseSettings& settings);

/// The same from the trace that holds the peak: the stretches of the same
/// total length nearest to [start, end] on both sides, outside it. The whole
/// trace is left to add_whole_trace_noise.
Outcome<NoiseEstimate> measure_noise_beside(const Trace& trace,
                                            double start_minutes,
                                            double end_minutes,
                                            double width_half_minutes,
                                            const NoiseSettings& settings);

/// Fills `whole` and `segments` from the whole trace. The target in
/// [start, end] is left out; equal ends: nothing is.
void add_whole_trace_noise(NoiseEstimate& noise, const Trace& trace,
                           double start_minutes, double end_minutes,
                           double width_half_minutes);

/// Signal-to-noise of a height as the settings' measure defines it; not
/// applicable where the noise is zero.
Outcome<double> signal_to_noise(double height, const NoiseEstimate& noise,
                                NoiseSettings::Measure measure);

/// The noise figure that the measure speaks of: h or the standard deviation.
double noise_figure(const NoiseEstimate& noise, NoiseSettings::Measure measure);

}  // namespace loqsmith
