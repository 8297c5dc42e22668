#pragma once

#include <span>
#include <vector>

namespace loqsmith {

/// Smoothed signal and its slope per minute.
struct ValueAndSlope {
  std::vector<double> value;
  std::vector<double> slope;
};

/// Savitzky-Golay smoothing and first derivative in one go: what
/// savitzky_golay gives for derivatives 0 and 1, to rounding.
///
/// With order 2, an odd number of points and even times the sums over the
/// points y[-h] ... y[h] about each place are carried on from place to place,
///
///     value = (3 (3h^2 + 3h - 1) S0 - 15 S2) / ((2h - 1)(2h + 1)(2h + 3))
///     slope = 3 S1 / (h (h + 1)(2h + 1) step),   Sk = sum of m^k y[m],
///
/// so that the time taken does not grow with the length; they are summed
/// afresh after as many places as they have points, lest rounding builds up.
///
/// @param even  what evenly_spaced() says of the times
///
/// Source: the closed form of the weights of A. Savitzky, M. J. E. Golay,
/// Anal. Chem. 36 (1964) 1627; derived from the normal equations.
ValueAndSlope smooth_value_and_slope(std::span<const double> minutes,
                                     std::span<const double> signal, int points,
                                     int order, bool even);

}  // namespace loqsmith
