#pragma once

#include <optional>

#include "loqsmith/limits/leverage.hpp"

namespace loqsmith {

/// Standard deviation of a found concentration, the mean of K responses read
/// off a fitted line of slope b:
///
///     sd(x) = sqrt((c + d x)^2 / K + v h(x)) / b
///
/// with c + d x the standard deviation of one response at x, v the residual
/// variance of the fit and h the line's leverage.
struct FoundDeviation {
  double constant = 0.0;    ///< c, response, above zero
  double growth = 0.0;      ///< d, response over concentration, at least 0
  double replicates = 1.0;  ///< K
  double residual_variance = 0.0;  ///< v
  Leverage leverage;
  double slope = 0.0;  ///< b, above zero

  double at(double concentration) const;
};

/// The concentration that is `factor` times its own standard deviation,
///
///     x = k sd(x),
///
/// in closed form: what a fixed-point iteration x -> k sd(x) goes to.
/// @param factor  k, above zero
/// @return above zero; nothing where k^2 (d^2 / K + v / S) >= b^2: the
///         standard deviation grows faster than x / k and the iteration
///         diverges.
std::optional<double> multiple_of_deviation(double factor,
                                            const FoundDeviation& deviation);

}  // namespace loqsmith
