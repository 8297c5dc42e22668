#include "loqsmith/numerics/normal.hpp"

#include <cmath>
#include <numbers>

namespace loqsmith {
namespace {

/// For p up to 1/2; the answer is at or below zero.
double lower_quantile(double p) {
  const double t = std::sqrt(-2.0 * std::log(p));
  const double above = 2.515517 + t * (0.802853 + t * 0.010328);
  const double below = 1.0 + t * (1.432788 + t * (0.189269 + t * 0.001308));
  double z = above / below - t;
  for (int step = 0; step < 3; ++step) {
    const double newton = (normal_cdf(z) - p) / normal_density(z);
    z -= newton / (1.0 + 0.5 * z * newton);
  }
  return z;
}

}  // namespace

double normal_density(double z) {
  return std::exp(-0.5 * z * z) *
         (std::numbers::inv_sqrtpi_v<double> / std::numbers::sqrt2);
}

double normal_cdf(double z) {
  return 0.5 * std::erfc(-z / std::numbers::sqrt2);
}

double normal_quantile(double p) {
  return p <= 0.5 ? lower_quantile(p) : -lower_quantile(1.0 - p);
}

}  // namespace loqsmith
