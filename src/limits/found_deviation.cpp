#include "loqsmith/limits/found_deviation.hpp"

#include <cmath>

namespace loqsmith {

double FoundDeviation::at(double concentration) const {
  const double one = constant + growth * concentration;
  return std::sqrt(one * one / replicates +
                   residual_variance * leverage.at(concentration)) /
         slope;
}

// x^2 = k^2 sd(x)^2 as p x^2 - 2 q x - r = 0. With p and r above zero one of
// the two roots is.
std::optional<double> multiple_of_deviation(double factor,
                                            const FoundDeviation& deviation) {
  const FoundDeviation& d = deviation;
  const double scale = factor / d.slope;
  const double square = scale * scale;
  const double p =
      1.0 - square * (d.growth * d.growth / d.replicates +
                      d.residual_variance * d.leverage.inverse_squares);
  if (!(p > 1e-9)) return std::nullopt;
  const double q = square * (d.constant * d.growth / d.replicates -
                             d.residual_variance * d.leverage.inverse_squares *
                                 d.leverage.centre);
  const double r = square * (d.constant * d.constant / d.replicates +
                             d.residual_variance * d.leverage.at(0.0));
  const double root = std::sqrt(q * q + p * r);
  const double found = q > 0.0 ? (q + root) / p : r / (root - q);
  if (!(found > 0.0) || !std::isfinite(found)) return std::nullopt;
  return found;
}

}  // namespace loqsmith
