#pragma once

#include <algorithm>
#include <cstddef>
#include <span>
#include <vector>

#include "loqsmith/signal/local_fit.hpp"

namespace loqsmith {

/// Weights of points at `nodes` such that the weighted sum of their signals is
/// the value (or the derivative of the given order) at `at` of the polynomial
/// that fits them best by least squares.
///
/// The fit goes through polynomials made orthogonal on these very nodes by the
/// three-term recurrence, so even and uneven nodes are treated alike and no
/// system of equations is solved.
///
/// @param nodes       strictly increasing, more than `order` of them
/// @param order       of the polynomial, 0 or more
/// @param derivative  0 value, 1 slope, 2 curvature (per node unit)
std::vector<double> local_polynomial_weights(std::span<const double> nodes,
                                             double at, int order,
                                             int derivative);

/// The classical weights of an odd number of evenly spaced points, for their
/// middle, per point distance.
///
/// Source: A. Savitzky, M. J. E. Golay, Anal. Chem. 36 (1964) 1627, tables I
/// to XI, as corrected by J. Steinier et al., Anal. Chem. 44 (1972) 1906.
std::vector<double> savitzky_golay_weights(int points, int order,
                                           int derivative);

/// The smoothed signal (or its derivative per minute) at each point.
///
/// Where the times of a stretch are even to 1 % the classical weights are
/// used; elsewhere the polynomial is fitted in the true times of the same
/// number of points. The first and last points take the fit of the first and
/// last whole stretch away from its middle. `points` of 1, or of no more than
/// the order, leave the signal as it is (the derivative then takes 3 points
/// and order 2); with fewer data than points, all of them are used.
///
/// @param points  odd, at least 1
std::vector<double> savitzky_golay(std::span<const double> minutes,
                                   std::span<const double> signal, int points,
                                   int order, int derivative);

/// True when the classical weights serve for every part of these times.
bool evenly_spaced(std::span<const double> minutes);

/// Hands out (index, polynomial there) for the first and last `half` points
/// from the fits of the first and last 2 half + 1 points (of all, where they
/// are fewer).
template <class Take>
void fit_ends(std::span<const double> minutes, std::span<const double> signal,
              std::size_t half, int order, Take take) {
  const std::size_t n = signal.size();
  const std::size_t points = std::min(2 * half + 1, n);
  const LocalFit first(minutes.first(points), signal.first(points), order);
  const std::size_t middle = std::min(half, n);
  for (std::size_t i = 0; i < middle; ++i) take(i, first.at(minutes[i]));
  const LocalFit last(minutes.last(points), signal.last(points), order);
  for (std::size_t i = n - std::min(half, n - middle); i < n; ++i) {
    take(i, last.at(minutes[i]));
  }
}

/// Standard deviation of a smoothed point over that of a point, for
/// independent noise: the square root of the middle weight.
double smoothing_noise_gain(int points, int order);

}  // namespace loqsmith
