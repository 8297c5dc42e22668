#pragma once

#include <span>

#include "loqsmith/base/outcome.hpp"

namespace loqsmith {

/// Shapiro and Wilk's W of a sample: near 1 where it could be normal, smaller
/// where it could not.
struct ShapiroWilk {
  double w = 0.0;  ///< above 0, at most 1
  double p = 0.0;  ///< probability of a W at most as large for normal values
};

/// Source: S. S. Shapiro and M. B. Wilk, Biometrika 52 (1965) 591; coefficients
/// and p after P. Royston, Applied Statistics 44 (1995) 547, algorithm AS R94;
/// from memory.
///
/// @param values  3 to 5000 finite values in any order
/// @return not applicable: too few or too many values, all equal (or but for
///         rounding)
Outcome<ShapiroWilk> shapiro_wilk(std::span<const double> values);

/// The W below which p is smaller than `significance`; n as above.
double shapiro_wilk_critical(std::size_t n, double significance);

}  // namespace loqsmith
