#pragma once

#include <span>

namespace loqsmith {

/// Standard deviation of single points from their third differences, robust:
///
///     1.4826 median |y[i+3] - 3 y[i+2] + 3 y[i+1] - y[i]| / sqrt(20)
///
/// Peaks, drift and a curved baseline hardly enter, so it may be taken where
/// nothing is known yet. It holds for independent noise; noise that creeps
/// from point to point comes out too small. Zero where most points lie on one
/// line (a thresholded detector), and for fewer than 4 points.
double point_to_point_noise(std::span<const double> signal);

/// True where that is not above a given noise, as far as counting tells; false
/// where it may be. Takes a fraction of the time.
bool is_surely_quieter(std::span<const double> signal, double noise);

/// Standard deviation about a straight line, n - 2 degrees of freedom, of the
/// points that lie within 3.5 standard deviations of it; line and deviation
/// are found in turn, from a start (line through the medians of the outer
/// thirds, median absolute residual) that a small peak does not move. Normal
/// noise loses 0.3 % by the cut.
struct LineNoise {
  double intercept = 0.0;  ///< signal at minute 0
  double slope = 0.0;      ///< signal per minute
  double standard_deviation = 0.0;
};

/// @param minutes  strictly increasing, at least 3
LineNoise noise_about_line(std::span<const double> minutes,
                           std::span<const double> signal);

}  // namespace loqsmith
