#pragma once

#include <optional>

#include "loqsmith/chromatogram/peak.hpp"
#include "loqsmith/signal/learn.hpp"
#include "loqsmith/signal/noise_model.hpp"
#include "loqsmith/signal/settings.hpp"

namespace loqsmith {

struct NoiseEstimate;

/// What an estimated baseline makes of noise, for either kind of response.
struct SimulatedBaseline {
  BaselineBias area;
  BaselineBias height;
  NoiseModel noise;  ///< that was simulated

  /// The same for noise of the size that was measured somewhere else: the
  /// baselines scale with the signal.
  SimulatedBaseline scaled_to(const NoiseEstimate& measured) const;

  /// For a trace at hand: raised where that is clearly noisier (1.3 times) than
  /// the noise that was simulated.
  BaselineBias of(IntegrationSettings::Response response,
                  const NoiseModel& here) const;
};

/// Simulates traces of noise alone, as long as the stretch that is measured,
/// and takes the responses over windows of the template's length in them:
///
/// - without a peak, from several windows side by side in each trace, away from
///   its ends: the mean is the bias of a blank;
/// - with a Gaussian of the template's width in the middle, 10 standard
///   deviations of a point high: what is missing of its noise-free response.
///
/// Both baselines run below the middle of the noise, so a blank's response is
/// above zero; and they yield where there is no peak but not where there is
/// one, so blanks scatter less than low peaks do.
///
/// 64 traces (fewer where they have many points). The standard error of the
/// mean is that of the traces' means. The random stream is named "baseline of"
/// and the target's id, so the same method and noise give the same numbers.
///
/// @param step_minutes  distance between points, > 0
/// @return nothing for the straight baseline (a blank's mean is zero by its
///         making), without noise, or without a width
std::optional<SimulatedBaseline> simulate_baseline(const TargetSettings& target,
                                                   const WindowTemplate& window,
                                                   const NoiseModel& noise,
                                                   double step_minutes);

/// Fills the noise's `simulated_baseline`: with the whole trace's noise where
/// there is a model of it, otherwise with that around the peak, and with the
/// trace's distance between points there.
void add_simulated_baseline(NoiseEstimate& noise, const Trace& trace,
                            const TargetSettings& target,
                            const WindowTemplate& window, double expected);

}  // namespace loqsmith
