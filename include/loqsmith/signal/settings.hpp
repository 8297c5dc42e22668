#pragma once

#include <optional>
#include <string>

namespace loqsmith {

/// How peaks are found and integrated (`<integration>` of the method).
struct IntegrationSettings {
  enum class Response { Area, Height, Template };
  enum class Bounds { Template, Own };
  enum class Baseline { Valley, AsymmetricLeastSquares, Snip };
  enum class Overlap { Drop, Skim, Model };

  Response response = Response::Area;

  /// Template: every role over the same window, so that limits from blanks
  /// apply to samples. Own: the found feet; blank-based limits are then not
  /// valid.
  Bounds bounds = Bounds::Template;
  Baseline baseline = Baseline::Valley;
  Overlap overlap = Overlap::Drop;

  /// Savitzky-Golay length for finding, never for the response: 0 means the
  /// odd number nearest the width at half height, 1 none, else odd.
  int smoothing_points = 0;
  int smoothing_order = 2;

  /// Least height of a peak (smoothed apex above the averaged-feet baseline)
  /// in multiples of that height's own standard deviation.
  double threshold = 4.0;
  double minimum_width_minutes = 0.0;  ///< at half height
  std::optional<double> hold_up_minutes;
};

/// How noise is measured (`<noise>` of the method).
struct NoiseSettings {
  /// Blank: the nearest earlier solvent blank, else the nearest later one,
  /// else the same trace with a reason. Baseline: peak-free parts of the trace.
  enum class Source { Blank, Baseline };
  /// HalfPeakToPeak: S/N = 2H/h (pharmacopoeias); PeakToPeak: H/h;
  /// StandardDeviation: H/sd.
  enum class Measure { HalfPeakToPeak, PeakToPeak, StandardDeviation };
  enum class Drift { Kept, Removed };

  Source source = Source::Blank;
  Measure measure = Measure::HalfPeakToPeak;
  double span_widths = 5.0;  ///< stretch, in widths at half height
  Drift drift = Drift::Kept;
};

/// One thing to look for in a trace: an analyte or an internal standard.
struct TargetSettings {
  std::string id;
  std::string trace;               ///< id of the method's trace
  double retention_minutes = 0.0;  ///< as the method states it
  double window_minutes = 0.2;     ///< plus or minus
  IntegrationSettings integration;
  NoiseSettings noise;
  /// The analyte whose second trace this is; empty: none.
  std::string second_trace_of = {};

  /// What levels and amendments call it.
  const std::string& substance() const {
    return second_trace_of.empty() ? id : second_trace_of;
  }
};

}  // namespace loqsmith
