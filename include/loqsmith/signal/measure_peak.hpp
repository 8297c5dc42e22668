#pragma once

#include <optional>
#include <string>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/chromatogram/peak.hpp"
#include "loqsmith/chromatogram/trace.hpp"
#include "loqsmith/signal/learn.hpp"
#include "loqsmith/signal/manual_bounds.hpp"
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
/// model_overlap.hpp. The area is trapezoids of signal minus baseline over
/// uneven times; nothing is smoothed for it.
///
/// With `baseline` asymmetric-least-squares or snip that baseline is estimated
/// below the surroundings and taken off, and the area is what lies above zero
/// in the same window (see estimated_baseline.hpp). It runs below the middle of
/// the noise: by how much that lifts the response is `baseline_bias`, from the
/// noise's `simulated_baseline`, and so is `response_noise`.
///
/// The target is looked for within the settings' window to either side of the
/// *expected* time (not of the method's own), and `found` when a peak above the
/// threshold has its apex there. Where the found height reaches 50 noise
/// standard deviations the apex is refined with less smoothing.
///
/// Reasons, each a word: "saturated", "several-peaks" (the nearest to the
/// expected time is taken), "overlapped", "spike" (a single point that stands
/// out inside the window), "few-points" (under 10), "gap-in-time",
/// "negative-peak", "flat-signal" (see trace_trouble.hpp), "window-cut-short"
/// (the trace does not hold the whole window), "weak-template",
/// "model-not-converged" (the fit of overlapped peaks failed, the drop stands),
/// "model-misfit" (they do not look like its peaks), "model-shape-assumed",
/// "baseline-at-valley", "baseline-one-sided", "baseline-shortened",
/// "baseline-unsettled" (an estimated baseline still moved after the most
/// solves allowed), "no-noise", "noise-zero", "shape-differs" (the template
/// does not fit, the area stands in for it), "template-not-fitted" (no shape
/// learned, or a neighbour leaves no room: likewise), and those of the noise.
///
/// `response_noise` is predicted from the noise of a whole trace for the very
/// window and baseline used (see response_noise.hpp), and absent with its
/// reason where that trace is too short; signal-to-noise is stated for found
/// peaks only.
///
/// Between bounds set by hand the area is that over exactly these (see
/// manual_bounds.hpp), `manual` holds and the reason "manual-bounds" says so;
/// the target is looked for between them.
///
/// @param noise         of the source that the settings name; may be absent
/// @param noise_source  "blank 3" or "same trace"
/// @return not applicable (a reason word, then words): "window-not-covered",
///         "peak-cut" (the trace ends before its foot), "too-few-points"
///         (under 5), "no-signal", "not-available" (what
///         this version does not compute).
Outcome<Peak> measure_peak(const Trace& trace, const TargetSettings& target,
                           const WindowTemplate& window, double expected,
                           const Outcome<NoiseEstimate>& noise,
                           const std::string& noise_source,
                           const std::optional<ManualBounds>& manual = {});

}  // namespace loqsmith
