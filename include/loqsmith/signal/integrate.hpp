#pragma once

#include <cstddef>
#include <vector>

#include "loqsmith/signal/place_window.hpp"
#include "loqsmith/signal/summits.hpp"

namespace loqsmith {

/// Area of signal minus baseline between the feet, in signal unit x minute:
/// trapezoids over the true (uneven) times. At the feet themselves, which
/// rarely fall on a point, the signal is interpolated, so that the area does
/// not jump when the points are sampled a little earlier or later.
double integrate_window(const SmoothedStretch& stretch,
                        const PlacedWindow& window);

/// Weights of successive points of a stretch; its other points have none.
struct PointWeights {
  std::size_t first = 0;  ///< the point that the first value belongs to
  std::vector<double> values;

  /// One weight for each of so many points.
  std::vector<double> over(std::size_t points) const;
};

/// The weights g such that the area above is the sum of g times signal, the
/// baseline's points included.
PointWeights area_weights(const SmoothedStretch& stretch,
                          const PlacedWindow& window);

/// The same for the height at a time (see signal_near).
PointWeights height_weights(const SmoothedStretch& stretch,
                            const PlacedWindow& window, double minutes);

/// The same for the smoothed signal at the point nearest to a time.
PointWeights smoothed_height_weights(const SmoothedStretch& stretch,
                                     const PlacedWindow& window,
                                     double minutes);

/// Standard deviation of a smoothed height: that of its weighted sum of points
/// or, where the signal shows no noise, of rounding.
double smoothed_height_noise(const SmoothedStretch& stretch,
                             const PlacedWindow& window, double minutes,
                             const NoiseModel& noise);

/// A bound that is quickly found: the standard deviation is not smaller. The
/// weights of n smoothed points sum to 1, and so their squares to 1/n or more.
double least_smoothed_height_noise(const SmoothedStretch& stretch,
                                   const PlacedWindow& window, double minutes,
                                   const NoiseModel& noise);

/// Weights that give the signal at a time by the parabola through the three
/// points nearest to it. At least 3 points.
PointWeights parabola_weights(const std::vector<double>& minutes, double at);

/// The parabola's signal at a time: what height is measured with, in blanks
/// and samples alike.
double signal_near(const SmoothedStretch& stretch, double minutes);

/// Number of points from one foot to the other.
std::size_t points_in_window(const SmoothedStretch& stretch,
                             const PlacedWindow& window);

}  // namespace loqsmith
