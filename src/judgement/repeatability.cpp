#include "loqsmith/judgement/repeatability.hpp"

#include <cmath>

#include "loqsmith/numerics/distributions.hpp"

namespace loqsmith {
namespace {

constexpr double kOneSided = 0.95;  // 90 % two-sided

double root_over_t(std::size_t n) {
  const double count = static_cast<double>(n);
  return std::sqrt(count) / student_t_quantile(kOneSided, count - 1.0);
}

}  // namespace

double largest_repeatability(double excess_percent, std::size_t n) {
  const double k = 0.6 / std::sqrt(2.0) / root_over_t(6);
  return k * excess_percent * root_over_t(n);
}

std::size_t injections_for_repeatability(double rsd_percent) {
  return rsd_percent <= 2.0 ? 5 : 6;
}

double repeatability_of(double rsd_percent, std::size_t n) {
  const std::size_t full = injections_for_repeatability(rsd_percent);
  if (n >= full) return rsd_percent;
  return rsd_percent * root_over_t(n) / root_over_t(full);
}

}  // namespace loqsmith
