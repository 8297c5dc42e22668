#pragma once

#include <cstddef>
#include <span>
#include <vector>

#include "loqsmith/chromatogram/trace.hpp"
#include "loqsmith/signal/noise_model.hpp"
#include "loqsmith/signal/settings.hpp"

namespace loqsmith {

/// How the times of a stretch follow each other.
struct Spacing {
  double step = 0.0;  ///< minutes, typical_step()
  bool even = true;   ///< evenly_spaced()
};

/// A stretch of a trace made ready for finding peaks. What is measured is
/// always `signal`; the rest only decides where.
struct SmoothedStretch {
  std::vector<double> minutes;
  std::vector<double> signal;       ///< as in the trace, or above its baseline
  std::vector<double> smoothed;     ///< without spikes, Savitzky-Golay
  std::vector<double> slope;        ///< of the same, per minute
  std::vector<std::size_t> spikes;  ///< single points left out of both
  Spacing spacing;                  ///< of the times
  int points = 1;                   ///< smoothing length used
  int order = 0;                    ///< of its polynomial, below points
  double gain = 1.0;  ///< sd of a smoothed point over that of a point
  /// Where the signal shows no noise: what rounding alone leaves, standard
  /// deviation of a height. Zero elsewhere.
  double rounding = 0.0;
  /// Where an estimated baseline has been taken off the signal: the trace's
  /// own. Empty: `signal` is that.
  std::vector<double> detector;
  bool baseline_settled = true;  ///< see EstimatedBaseline

  const std::vector<double>& as_detected() const {
    return detector.empty() ? signal : detector;
  }
};

/// The points of the trace from one time to another, and one point beyond
/// either end where there is one.
Trace cut_trace(const Trace& trace, double from_minutes, double to_minutes);

/// Middle of the distances between points (their mean, where they are even);
/// zero for fewer than 2 points.
double typical_step(std::span<const double> minutes);

Spacing spacing_of(std::span<const double> minutes);

/// Smoothing length that the settings ask for: their own, or the odd number
/// of points nearest the width at half height, at least 3.
int smoothing_length(const IntegrationSettings& settings,
                     double width_half_minutes, double step_minutes);

/// @param noise  tells a spike from noise, and what smoothing makes of it
SmoothedStretch smooth_stretch(Trace stretch, int points, int order,
                               const NoiseModel& noise);

/// The same where the spacing of its times is known already.
SmoothedStretch smooth_stretch(Trace stretch, const Spacing& spacing,
                               int points, int order, const NoiseModel& noise);

/// A single point that stands out by more than 5 noise standard deviations
/// over its neighbours, which themselves do not rise to a quarter of it: no
/// peak that is sampled at all looks so (one of only 2 points at half height
/// still has neighbours at half of its apex).
std::vector<std::size_t> find_spikes(std::span<const double> signal,
                                     double noise);

/// A maximum of the smoothed signal: its slope passes from up to down.
struct Summit {
  double minutes = 0.0;     ///< where the slope is zero, interpolated
  double value = 0.0;       ///< smoothed signal there
  double prominence = 0.0;  ///< above the higher of the valleys that part it
                            ///< from higher summits or the stretch's ends
};

/// All summits in order of time.
std::vector<Summit> find_summits(const SmoothedStretch& stretch);

/// Time of the lowest smoothed point from one time to another.
double lowest_between(const SmoothedStretch& stretch, double from_minutes,
                      double to_minutes);

/// Smoothed signal at a time, linear between the points, constant beyond.
double smoothed_at(const SmoothedStretch& stretch, double minutes);

/// Linear interpolation in increasing abscissas, constant beyond the ends.
double interpolate(std::span<const double> x, std::span<const double> y,
                   double at);

}  // namespace loqsmith
