#pragma once

#include <vector>

namespace loqsmith {

/// What a fitted straight line adds to the variance of a response at x, over
/// the residual variance:
///
///     h(x) = 1 / W + (x - c)^2 / S
///
/// with W the sum of the weights, c the weighted mean of the concentrations
/// and S their weighted sum of squares about it. Through zero: x^2 / S, S the
/// sum of squares about zero. Not the leverage of a point in the fit, which
/// carries its own weight as a factor.
struct Leverage {
  double inverse_weight = 0.0;   ///< 1 / W; zero through zero
  double centre = 0.0;           ///< c; zero through zero
  double inverse_squares = 0.0;  ///< 1 / S

  double at(double concentration) const;
};

/// @param concentrations  not all equal (through zero: not all zero)
/// @param weights         above zero, as many; empty: all 1
Leverage leverage_of(const std::vector<double>& concentrations,
                     const std::vector<double>& weights, bool through_zero);

}  // namespace loqsmith
