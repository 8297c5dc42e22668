#include "loqsmith/signal/baseline_asymmetric.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <optional>

#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/signal/baseline_whittaker.hpp"

namespace loqsmith {
namespace {

constexpr int kMostSolves = 50;
constexpr int kMostReweightedSolves = 100;
// exp of more than this leaves the range of a double.
constexpr double kLargestExponent = 500.0;

std::vector<double> above(std::span<const double> signal,
                          const std::vector<double>& curve) {
  std::vector<double> d(signal.begin(), signal.end());
  for (std::size_t i = 0; i < d.size(); ++i) d[i] -= curve[i];
  return d;
}

// Nothing where too little lies below the curve to tell its spread.
std::optional<std::vector<double>> weights_by_spread(
    const std::vector<double>& d) {
  std::vector<double> negative;
  std::copy_if(d.begin(), d.end(), std::back_inserter(negative),
               [](double value) { return value < 0.0; });
  if (negative.size() < 2) return {};
  const double m = mean(negative);
  const double s = standard_deviation(negative);
  if (!(s > 0.0)) return {};
  std::vector<double> weights;
  for (const double value : d) {
    const double exponent = std::clamp(2.0 * (value - (2.0 * s - m)) / s,
                                       -kLargestExponent, kLargestExponent);
    weights.push_back(1.0 / (1.0 + std::exp(exponent)));
  }
  return weights;
}

// Squared length of a - b over that of a.
double squared_change(const std::vector<double>& a,
                      const std::vector<double>& b) {
  double change = 0.0;
  double length = 0.0;
  for (std::size_t i = 0; i < a.size(); ++i) {
    change += (a[i] - b[i]) * (a[i] - b[i]);
    length += a[i] * a[i];
  }
  return change / length;
}

}  // namespace

AsymmetricBaseline asymmetric_baseline(std::span<const double> minutes,
                                       std::span<const double> signal,
                                       double smoothness, double p) {
  const WhittakerSmoother smoother(minutes, smoothness);
  std::vector<double> weights(signal.size(), 1.0);
  AsymmetricBaseline baseline;
  while (!baseline.settled && baseline.solves < kMostSolves) {
    baseline.signal = smoother.smooth(signal, weights);
    ++baseline.solves;
    std::vector<double> next;
    for (std::size_t i = 0; i < signal.size(); ++i) {
      next.push_back(signal[i] > baseline.signal[i] ? p : 1.0 - p);
    }
    baseline.settled = next == weights;
    weights = std::move(next);
  }
  return baseline;
}

AsymmetricBaseline reweighted_baseline(std::span<const double> minutes,
                                       std::span<const double> signal,
                                       double smoothness, double ratio) {
  const WhittakerSmoother smoother(minutes, smoothness);
  std::vector<double> weights(signal.size(), 1.0);
  AsymmetricBaseline baseline;
  while (!baseline.settled && baseline.solves < kMostReweightedSolves) {
    baseline.signal = smoother.smooth(signal, weights);
    ++baseline.solves;
    auto next = weights_by_spread(above(signal, baseline.signal));
    baseline.settled = !next || squared_change(weights, *next) < ratio * ratio;
    if (next) weights = std::move(*next);
  }
  return baseline;
}

}  // namespace loqsmith
