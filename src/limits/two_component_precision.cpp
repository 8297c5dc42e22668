#include "loqsmith/limits/two_component_precision.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <vector>

#include "loqsmith/numerics/distributions.hpp"

namespace loqsmith {
namespace {

constexpr double kMostShortfall = 0.8;

// Leverages in the straight line weighted by 1/variance.
std::vector<double> leverages(std::span<const double> x,
                              const std::vector<double>& variance) {
  double sum = 0.0, sum_x = 0.0;
  for (std::size_t i = 0; i < x.size(); ++i) {
    sum += 1.0 / variance[i];
    sum_x += x[i] / variance[i];
  }
  const double centre = sum_x / sum;
  double spread = 0.0;
  for (std::size_t i = 0; i < x.size(); ++i)
    spread += (x[i] - centre) * (x[i] - centre) / variance[i];
  std::vector<double> found;
  for (std::size_t i = 0; i < x.size(); ++i)
    found.push_back((1.0 / sum + (x[i] - centre) * (x[i] - centre) / spread) /
                    variance[i]);
  return found;
}

double shortfall_of(const TwoComponentModel& model, std::span<const double> x) {
  const double additive = model.additive_sd * model.additive_sd;
  std::vector<double> variance;
  for (double one : x)
    variance.push_back(additive + model.slope * model.slope * one * one *
                                      model.relative_variance());
  const std::vector<double> leverage = leverages(x, variance);
  double aa = 0.0, ap = 0.0, pp = 0.0, a = 0.0, p = 0.0;
  for (std::size_t i = 0; i < x.size(); ++i) {
    const double w = additive / variance[i];
    aa += w * w;
    ap += w * (1.0 - w);
    pp += (1.0 - w) * (1.0 - w);
    a += w * leverage[i];
    p += (1.0 - w) * leverage[i];
  }
  if (model.additive_only) return a / aa;
  return (a * pp - p * ap) / (aa * pp - ap * ap);
}

double freedom_of(double shortfall, double log_variance) {
  return std::max(1.0, (1.0 - shortfall) / (2.0 * log_variance));
}

}  // namespace

TwoComponentPrecision precision_of(const TwoComponentModel& model,
                                   std::span<const double> x) {
  const double shortfall = shortfall_of(model, x);
  TwoComponentPrecision precision;
  // Not a number where the model cannot tell the two errors apart.
  precision.shortfall =
      shortfall <= kMostShortfall ? std::max(0.0, shortfall) : kMostShortfall;
  precision.degrees_of_freedom =
      freedom_of(precision.shortfall, model.covariance[2][2]);
  return precision;
}

LimitFactors limit_factors(const TwoComponentPrecision& precision,
                           double log_variance) {
  const SpreadBounds bounds = standard_deviation_bounds(
      freedom_of(precision.shortfall, log_variance), 0.95);
  const double centre = std::exp(0.5 * precision.shortfall);
  return {centre * bounds.lower, centre * bounds.upper};
}

double blank_reading_sd(const TwoComponentModel& model,
                        const TwoComponentPrecision& precision,
                        int replicates) {
  const double variance =
      model.additive_sd * model.additive_sd / static_cast<double>(replicates) +
      model.covariance[0][0];
  return std::exp(0.5 * precision.shortfall) * std::sqrt(variance) /
         model.slope;
}

}  // namespace loqsmith
