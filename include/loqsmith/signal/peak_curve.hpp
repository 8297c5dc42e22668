#pragma once

#include <string>
#include <utility>
#include <vector>

#include "loqsmith/chromatogram/peak.hpp"
#include "loqsmith/chromatogram/trace.hpp"
#include "loqsmith/signal/learn.hpp"
#include "loqsmith/signal/noise.hpp"
#include "loqsmith/signal/settings.hpp"

namespace loqsmith {

struct PeakWorking;

/// The points beside a foot whose mean holds the straight baseline.
struct CurveFoot {
  double from_minutes = 0.0;
  double to_minutes = 0.0;
  double signal = 0.0;  ///< their mean
};

/// The noise that stands beside a peak.
struct CurveNoise {
  /// Where it was measured, in order of time; empty: in another trace.
  std::vector<std::pair<double, double>> stretches;
  double low = 0.0;  ///< of the signal in them
  double high = 0.0;
  double peak_to_peak = 0.0;
  double standard_deviation = 0.0;
  NoiseSettings::Measure measure = NoiseSettings::Measure::HalfPeakToPeak;
  std::string source;  ///< "blank 3", "same trace"; empty: no noise is known
};

/// What a figure draws of one measured peak.
struct PeakCurve {
  enum class Fit { None, Template, Model };

  std::vector<double> minutes;  ///< the stretch of the trace around it
  std::vector<double> signal;
  /// At the same times, what peaks were looked for in; empty: not smoothed.
  std::vector<double> smoothed;

  double baseline_start = 0.0;  ///< signal of the baseline at the feet
  double baseline_end = 0.0;
  /// An estimated baseline at every point; empty: straight between the feet.
  std::vector<double> baseline;
  /// What holds the straight baseline, in order of time; none where it lies
  /// through valleys or was fitted.
  std::vector<CurveFoot> feet;

  Fit fit = Fit::None;
  bool fit_stands = false;  ///< the response is the fit's
  std::vector<double> fitted_minutes;
  std::vector<double> fitted;    ///< baseline and all peaks of the fit
  std::vector<double> residual;  ///< signal minus fitted
  /// Model: each peak alone on the fitted line, the target first, where there
  /// are two or more.
  std::vector<std::vector<double>> parts;

  CurveNoise noise;
};

/// @param margin_widths  what is shown beyond either foot, in widths at half
///                       height
PeakCurve peak_curve(const Peak& peak, const PeakWorking& working,
                     const WindowTemplate& window, double margin_widths = 4.0);

/// Noise of another trace: its figures alone.
CurveNoise curve_noise(const NoiseEstimate& noise,
                       const NoiseSettings& settings,
                       const std::string& source);

/// Noise that measure_noise() took from this very trace around a time.
CurveNoise curve_noise_around(const Trace& trace, const NoiseEstimate& noise,
                              const NoiseSettings& settings,
                              const std::string& source);

/// Noise that measure_noise_beside() took from this very trace.
CurveNoise curve_noise_beside(const Trace& trace, double start_minutes,
                              double end_minutes, double width_half_minutes,
                              const NoiseEstimate& noise,
                              const NoiseSettings& settings);

}  // namespace loqsmith
