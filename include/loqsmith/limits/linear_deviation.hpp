#pragma once

#include <cstddef>
#include <vector>

#include "loqsmith/base/outcome.hpp"

namespace loqsmith {

/// A standard deviation of responses that grows with the concentration,
///
///     sigma(x) = constant + growth x.
struct LinearDeviation {
  double constant = 0.0;  ///< response, above zero
  double growth = 0.0;    ///< response over concentration, at least 0
  /// What the constant is worth as an estimated standard deviation: with the
  /// variance of a standard deviation, sigma^2 / (2 (J - 1)), its own variance
  /// is constant^2 / (2 df).
  double degrees_of_freedom = 0.0;
  /// Responses of the level that has the fewest, at least 2.
  std::size_t fewest_replicates = 0;

  double at(double concentration) const {
    return constant + growth * concentration;
  }
};

/// Fits sigma(x) to the standard deviations of the levels with replicates. The
/// standard deviation of a standard deviation is in proportion to it, so each
/// weighs (J - 1) / sigma^2; sigma is at first the level's own standard
/// deviation, then that of the line before. Three fits, as the source has it:
/// the limit of many differs in the fifth digit.
///
/// @param concentrations  ascending; equal ones are one level
/// @param responses       as many
/// @param iterations      at least 1
/// @return not applicable: fewer than 3 levels of 2 or more responses, a level
///         with equal responses, a standard deviation at or below zero within
///         the levels or at zero, one that falls with the concentration.
///
/// Source: ISO 11843-2 (2000) 5.3, from memory.
Outcome<LinearDeviation> fit_linear_deviation(
    const std::vector<double>& concentrations,
    const std::vector<double>& responses, int iterations = 3);

}  // namespace loqsmith
