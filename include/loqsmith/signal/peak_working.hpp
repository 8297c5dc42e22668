#pragma once

#include <optional>
#include <string>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/chromatogram/peak.hpp"
#include "loqsmith/signal/fit_template.hpp"
#include "loqsmith/signal/manual_bounds.hpp"
#include "loqsmith/signal/parted_peak.hpp"
#include "loqsmith/signal/place_window.hpp"
#include "loqsmith/signal/summits.hpp"

namespace loqsmith {

/// What a peak was measured with: for figures, which draw what was done and do
/// not do it again in a way of their own.
struct PeakWorking {
  SmoothedStretch stretch;
  PlacedWindow placed;               ///< feet and straight baseline
  std::optional<PartedPeak> parted;  ///< skimmed or modelled
  /// The scaled template, also one that did not pass the shape test.
  std::optional<TemplateFit> fit;
};

/// A peak and its working; the latter is to be read where there is a peak.
struct WorkedPeak {
  Outcome<Peak> peak = NotApplicable{"not measured"};
  PeakWorking working;
};

/// measure_peak() with its working kept.
WorkedPeak measure_peak_with_working(
    const Trace& trace, const TargetSettings& target,
    const WindowTemplate& window, double expected,
    const Outcome<NoiseEstimate>& noise, const std::string& noise_source,
    const std::optional<ManualBounds>& manual = {});

}  // namespace loqsmith
