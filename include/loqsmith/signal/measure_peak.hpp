#pragma once

#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/chromatogram/peak.hpp"
#include "loqsmith/chromatogram/trace.hpp"
#include "loqsmith/signal/learn.hpp"
#include "loqsmith/signal/noise.hpp"
#include "loqsmith/signal/settings.hpp"

namespace loqsmith {

/// Measures a target in one trace over the template window, placed at the
/// found apex, or at the expected time where no peak is found.
///
/// The straight baseline runs through the mean of the points just outside each
/// foot, over half a width at half height and at least 5 points. A neighbour's
/// valley inside the window bounds it (`overlap` = "drop", reason
/// "overlapped"), unless the settings' overlap says otherwise: see skim.hpp and
/// model_overlap.hpp. The area is trapezoids of signal minus baseline over uneven
/// times; nothing is smoothed for it.
///
/// The target is looked for within the settings' window to either side of the
/// *expected* time (not of the method's own), and `found` when a peak above the
/// threshold has its apex there. Where the found height reaches 50 noise
/// standard deviations the apex is refined with less smoothing.
///
/// Reasons, each a word: "saturated", "several-peaks" (the nearest to the
/// expected time is taken), "overlapped", "spike" (a single point that stands
/// out inside the window), "few-points" (under 10), "weak-template",
/// "model-not-converged" (the fit of overlapped peaks failed, the drop stands),
/// "model-misfit" (they do not look like its peaks), "model-shape-assumed",
/// "baseline-at-valley", "baseline-one-sided", "baseline-shortened",
/// "no-noise", "noise-zero", and those of the noise.
///
/// `response_noise` is predicted from the noise of a whole trace for the very
/// window and baseline used (see response_noise.hpp), and absent with its
/// reason where that trace is too short; signal-to-noise is stated for found
/// peaks only.
///
/// @param noise         of the source that the settings name; may be absent
/// @param noise_source  "blank 3" or "same trace"
/// @return not applicable (a reason word, then words): "window-not-covered",
///         "too-few-points" (under 5), "no-signal", "not-available" (what
///         this version does not compute).
Outcome<Peak> measure_peak(const Trace& trace, const TargetSettings& target,
                           const WindowTemplate& window, double expected,
                           const Outcome<NoiseEstimate>& noise,
                           const std::string& noise_source);

/// What a figure draws of one measured peak: a stretch of the trace around it
/// and its baseline.
struct PeakCurve {
  std::vector<double> minutes;
  std::vector<double> signal;
  double baseline_start = 0.0;  ///< signal of the baseline at the feet
  double baseline_end = 0.0;
};
PeakCurve peak_curve(const Trace& trace, const Peak& peak,
                     const WindowTemplate& window, double margin_widths = 4.0);

}  // namespace loqsmith
