#pragma once

#include <optional>
#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/calibration/calibration.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

/// One blank's signed response over the template window.
struct BlankResponse {
  int injection = 0;
  BlankKind kind = BlankKind::Solvent;  ///< never All
  double response = 0.0;
  bool after_high = false;  ///< right after an injection above half the range
  std::string prep;
};

/// Standard deviation of one blank's response that the instrument's noise
/// predicts, in the responses' own unit.
struct PredictedNoise {
  int injection = 0;
  BlankKind kind = BlankKind::Solvent;  ///< never All
  double sd = 0.0;                      ///< zero where the signal has no noise
};

/// What an estimated baseline does to the responses of blanks, simulated with
/// their noise; in the responses' own unit.
struct PredictedBias {
  double blank = 0.0;        ///< mean response of a blank
  double blank_error = 0.0;  ///< standard error of that mean
  double low_peak = 0.0;     ///< of a low peak: mean minus true response
  double spread_ratio = 1.0;  ///< sd of low peaks over sd of blanks
};

/// One low spike's signed, uncensored found concentration, in the vial.
struct SpikeResult {
  int injection = 0;
  double nominal_vial = 0.0;
  double found_vial = 0.0;
  std::string prep;
  bool identified = true;      ///< a peak was seen in the window
  double sample_factor = 1.0;  ///< sample over vial concentration
};

/// Peak height of one standard with a found peak.
struct StandardHeight {
  int injection = 0;
  double concentration = 0.0;
  double height = 0.0;
};

/// What the noise figure is, and so what S/N means: 2H/h, H/h or H/sd.
enum class NoiseMeasure { HalfPeakToPeak, PeakToPeak, StandardDeviation };

/// Everything that is known of one analyte in one calibration set.
struct LimitEvidence {
  std::vector<BlankResponse> blanks;  ///< in run order
  /// In run order, of blanks after high injections as well: what they carry
  /// over is a peak and does not enter.
  std::vector<PredictedNoise> predicted_noise;
  /// Why some blank has none: a reason word, then words; empty where all do.
  std::string predicted_noise_absent;
  std::vector<SpikeResult> spikes;
  std::vector<StandardHeight> heights;
  std::optional<Calibration> calibration;
  /// Noise in height units as the measure defines it (h, or sd), median over
  /// the sources used for the lowest standards; nothing: not measured.
  std::optional<double> noise;
  NoiseMeasure noise_measure = NoiseMeasure::HalfPeakToPeak;
  bool bounds_own = false;       ///< integration bounds="own"
  bool baseline_biased = false;  ///< asymmetric least squares or snip
  /// Mean over the blanks; only with such a baseline, and where there is noise.
  std::optional<PredictedBias> predicted_bias;
  /// The carry-over check is present and passed.
  bool carry_over_passed = false;
};

}  // namespace loqsmith
