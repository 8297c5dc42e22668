#pragma once

#include <functional>
#include <vector>

namespace loqsmith {

/// Logarithm of a positive function at a point, with its first derivative and
/// a curvature: the second derivative, or any figure below zero that is near
/// it at the mode.
struct LogDensity {
  double value = 0.0;
  double slope = 0.0;
  double curvature = -1.0;  ///< below zero
};

using LogDensityAt = std::function<LogDensity(double)>;

/// The integral of exp(value) over the whole axis, and the points that made
/// it, with their shares: means under the density are sums of shares.
struct PeakedIntegral {
  double log_integral = 0.0;
  std::vector<double> points;
  std::vector<double> shares;  ///< sum 1
};

/// Integrates a function with one peak, however narrow and wherever it stands:
/// first its mode (Newton steps, halved until they climb), then the trapezium
/// rule about the mode in steps of half the peak's width
/// 1 / sqrt(-curvature), outward on both sides until a point adds less than
/// 1e-17 of the peak. For smooth functions that fall off on both sides the
/// trapezium rule converges faster than any power of the step: a normal
/// density comes out to the last digit.
///
/// @param start  where the climb begins
/// @param into   filled anew; its memory is used again
/// @return false where the function is not finite at the start or does not
///         fall off within 2000 steps; then `into` holds nothing of use.
///
/// Source: L. N. Trefethen and J. A. C. Weideman, SIAM Review 56 (2014) 385,
/// on the convergence of the trapezium rule; from memory.
bool integrate_about_mode(const LogDensityAt& density, double start,
                          PeakedIntegral& into);

}  // namespace loqsmith
