#include "loqsmith/numerics/erfcx.hpp"

#include <cmath>
#include <numbers>

namespace loqsmith {
namespace {

constexpr double kSeriesFrom = 25.0;
// The terms fall by 1 / (2 z^2) times 1, 3, 5, ...: the ninth is below 1e-21.
constexpr int kTerms = 9;

double asymptotic(double z) {
  const double step = 0.5 / z / z;
  double term = 1.0;
  double sum = 1.0;
  for (int k = 1; k < kTerms; ++k) {
    term *= -step * static_cast<double>(2 * k - 1);
    sum += term;
  }
  return sum * std::numbers::inv_sqrtpi / z;
}

}  // namespace

double erfcx(double z) {
  if (z > kSeriesFrom) return asymptotic(z);
  const double square = z * z;
  const double rest = std::fma(z, z, -square);
  return std::exp(square) * (1.0 + rest) * std::erfc(z);
}

}  // namespace loqsmith
