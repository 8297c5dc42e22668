#pragma once

#include <cstddef>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/chromatogram/trace.hpp"
#include "loqsmith/signal/autocovariance.hpp"
#include "loqsmith/signal/noise_model.hpp"

namespace loqsmith {

/// Least peak-free length of a trace from which the spread of responses is
/// predicted, in widths at half height. A peak's response gathers noise over
/// some 4 widths; shorter traces show too few of them side by side.
inline constexpr double kLeastPeakFreeWidths = 80.0;

/// What is left of a whole trace without its peaks and its slow baseline.
struct PeakFreeTrace {
  Residuals residuals;          ///< one for each point of the trace
  double minutes = 0.0;         ///< that the used points stand for
  double stretch_points = 0.0;  ///< mean number of used points about one line
  std::vector<double> used_minutes;  ///< times and signal of the used points
  std::vector<double> used_signal;
};

/// The trace is parted into equal stretches of some 40 widths at half height.
/// In each the points of peaks (see peak_free_points, and what of their tails
/// still stands a standard deviation above the baseline) are left out, the
/// others are held against a straight line of their own, and those beyond 3.5
/// standard deviations are left out as well.
///
/// @param start_minutes, end_minutes  left out: where the target stands;
///                                    equal where nothing is to be left out
PeakFreeTrace peak_free_trace(const Trace& trace, double start_minutes,
                              double end_minutes, double width_half_minutes);

/// Noise model of a whole trace, from its autocovariance up to 4 widths at half
/// height: independent noise and the first-order Markov part that fits best by
/// least squares. What a line through each stretch takes off the covariances
/// on average,
///
///     (v0' R v0 + v1' R v1) / n
///
/// (v0, v1: constant and slope of unit length over the n points of a stretch),
/// is added again. The Markov part is left out where independent noise would
/// look so by chance in more than some 5 of 100 traces.
///
/// @return not applicable: "noise-trace-short: ...", less than 80 widths at
///         half height of it free of peaks.
///
/// Source: the model is that of ISO 11843-7:2018, from memory; the correction
/// follows from the covariance of least-squares residuals.
Outcome<NoiseModel> whole_trace_noise(const PeakFreeTrace& free,
                                      double width_half_minutes);

}  // namespace loqsmith
