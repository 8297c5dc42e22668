#pragma once

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

/// The weights g of all points of the stretch such that the area above is the
/// sum of g times signal, the baseline's points included.
std::vector<double> area_weights(const SmoothedStretch& stretch,
                                 const PlacedWindow& window);

/// The same for the height at a time (see signal_near).
std::vector<double> height_weights(const SmoothedStretch& stretch,
                                   const PlacedWindow& window, double minutes);

/// The same for the smoothed signal at the point nearest to a time.
std::vector<double> smoothed_height_weights(const SmoothedStretch& stretch,
                                            const PlacedWindow& window,
                                            double minutes);

/// Signal at a time, by the parabola through the three points nearest to it:
/// weights of those points, zero elsewhere. At least 3 points.
std::vector<double> parabola_weights(const std::vector<double>& minutes,
                                     double at);

/// The parabola's signal at a time: what height is measured with, in blanks
/// and samples alike.
double signal_near(const SmoothedStretch& stretch, double minutes);

/// Number of points from one foot to the other.
std::size_t points_in_window(const SmoothedStretch& stretch,
                             const PlacedWindow& window);

}  // namespace loqsmith
