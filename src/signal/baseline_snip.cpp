#include "loqsmith/signal/baseline_snip.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>

#include "loqsmith/signal/summits.hpp"

namespace loqsmith {
namespace {

// Times of an even trace are even to rounding only.
constexpr double kRounding = 1e-6;

// One window for all points; `before` and `after` only ever move on.
void clip(std::span<const double> t, const std::vector<double>& from,
          double reach, double slack, std::vector<double>& to) {
  const std::size_t n = t.size();
  std::size_t before = 0;
  std::size_t after = 0;
  for (std::size_t i = 0; i < n; ++i) {
    if (t[0] > t[i] - reach + slack) continue;
    while (before + 1 < n && t[before + 1] <= t[i] - reach + slack) ++before;
    while (after < n && t[after] < t[i] + reach - slack) ++after;
    if (after == n) return;
    const double share = (t[i] - t[before]) / (t[after] - t[before]);
    const double chord = from[before] + share * (from[after] - from[before]);
    to[i] = std::min(from[i], chord);
  }
}

double squeezed(double y) {
  return std::log(std::log(std::sqrt(y + 1.0) + 1.0) + 1.0);
}

double released(double v) {
  const double root = std::exp(std::exp(v) - 1.0) - 1.0;
  return root * root - 1.0;
}

}  // namespace

std::vector<double> snip_baseline(std::span<const double> minutes,
                                  std::span<const double> signal, int m,
                                  SnipOrder order) {
  std::vector<double> curve(signal.begin(), signal.end());
  if (curve.size() < 3) return curve;
  const double step = typical_step(minutes);
  for (int k = 1; k <= m; ++k) {
    const int p = order == SnipOrder::Decreasing ? m + 1 - k : k;
    const std::vector<double> before = curve;
    clip(minutes, before, p * step, kRounding * step, curve);
  }
  return curve;
}

std::vector<double> snip_baseline_of_counts(std::span<const double> minutes,
                                            std::span<const double> signal,
                                            int m) {
  std::vector<double> counts(signal.begin(), signal.end());
  std::transform(counts.begin(), counts.end(), counts.begin(), squeezed);
  std::vector<double> curve = snip_baseline(minutes, counts, m);
  std::transform(curve.begin(), curve.end(), curve.begin(), released);
  return curve;
}

}  // namespace loqsmith
