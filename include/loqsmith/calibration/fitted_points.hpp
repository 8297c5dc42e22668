#pragma once

#include <cstddef>
#include <vector>

#include "loqsmith/calibration/calibration.hpp"

namespace loqsmith {

/// The used standards of a curve side by side, in run order.
struct FittedPoints {
  std::vector<int> injection;
  std::vector<double> concentration;
  std::vector<double> response;
  std::vector<double> weight;
  /// sqrt(weight) (response - curve): of one variance where the weights hold.
  std::vector<double> weighted_residual;

  std::size_t size() const { return concentration.size(); }
};

FittedPoints fitted_points(const Calibration& calibration);

/// True where the scatter about the curve is no more than rounding: below
/// 1e-12 of the largest weighted response.
bool is_without_scatter(const FittedPoints& points, double residual_sd);

}  // namespace loqsmith
