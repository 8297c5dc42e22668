#pragma once

#include <vector>

#include "loqsmith/chromatogram/trace.hpp"

namespace loqsmith {

/// Noise as the sum of independent noise and noise that creeps from point to
/// point (first-order Markov):
///
///     R(0) = white + creeping,  R(k) = creeping correlation^k
///
/// Source: ISO 11843-7:2018 predicts the spread of areas and heights from such
/// a covariance; from memory.
struct NoiseModel {
  double white_variance = 0.0;
  double creeping_variance = 0.0;
  double correlation = 0.0;  ///< of the creeping part, point to next point

  double variance() const { return white_variance + creeping_variance; }
  double standard_deviation() const;
  /// What point_to_point_noise shows of such noise on average.
  double point_to_point() const;
  /// The same noise, `factor` times as large.
  NoiseModel scaled(double factor) const;
};

NoiseModel white_noise(double standard_deviation);

/// Noise of peak-free points about a straight line within 10 widths at half
/// height to either side of a time. Variance and correlations up to 20 points
/// apart; the creeping part is the one that fits them best by least squares,
/// and is left out where its correlation of neighbours does not reach 2 over
/// the square root of the number of points. Fewer than 20 such points: white,
/// from point to point.
///
/// @param start_minutes, end_minutes  left out: where the target stands;
///                                    equal where nothing is to be left out
NoiseModel fit_noise_model(const Trace& trace, double start_minutes,
                           double end_minutes, double width_half_minutes);

/// Standard deviation of a weighted sum of successive points:
///
///     sqrt( sum_i sum_j g_i g_j R(|i - j|) )
///
/// Points are taken as evenly spaced for the creeping part.
double weighted_noise(const std::vector<double>& weights,
                      const NoiseModel& noise);

}  // namespace loqsmith
