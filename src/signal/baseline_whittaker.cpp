#include "loqsmith/signal/baseline_whittaker.hpp"

#include <cmath>
#include <cstddef>
#include <optional>

#include "loqsmith/signal/summits.hpp"

namespace loqsmith {

WhittakerSmoother::WhittakerSmoother(std::span<const double> minutes,
                                     double smoothness) {
  const double h = typical_step(minutes);
  for (std::size_t i = 1; i + 1 < minutes.size(); ++i) {
    const double left = (minutes[i] - minutes[i - 1]) / h;
    const double right = (minutes[i + 1] - minutes[i]) / h;
    const double both = left + right;
    const double factor = std::sqrt(smoothness * 0.5 * both);
    rows_.push_back({factor * 2.0 / (left * both),
                     factor * -2.0 / (left * right),
                     factor * 2.0 / (right * both)});
  }
}

std::vector<double> WhittakerSmoother::penalty_of(
    std::span<const double> curve) const {
  std::vector<double> penalty(curve.size(), 0.0);
  for (std::size_t k = 0; k < rows_.size(); ++k) {
    const Row& row = rows_[k];
    const double bend = row.before * curve[k] + row.here * curve[k + 1] +
                        row.after * curve[k + 2];
    penalty[k] += row.before * bend;
    penalty[k + 1] += row.here * bend;
    penalty[k + 2] += row.after * bend;
  }
  return penalty;
}

Pentadiagonal WhittakerSmoother::system(std::span<const double> weights) const {
  const std::size_t n = weights.size();
  Pentadiagonal matrix{{weights.begin(), weights.end()},
                       std::vector<double>(n - 1, 0.0),
                       std::vector<double>(n - 2, 0.0)};
  for (std::size_t k = 0; k < rows_.size(); ++k) {
    const Row& row = rows_[k];
    matrix.diagonal[k] += row.before * row.before;
    matrix.diagonal[k + 1] += row.here * row.here;
    matrix.diagonal[k + 2] += row.after * row.after;
    matrix.first[k] += row.before * row.here;
    matrix.first[k + 1] += row.here * row.after;
    matrix.second[k] += row.before * row.after;
  }
  return matrix;
}

std::vector<double> WhittakerSmoother::smooth(
    std::span<const double> signal, std::span<const double> weights) const {
  const std::size_t n = signal.size();
  const std::vector<double> as_it_is(signal.begin(), signal.end());
  if (n < 3) return as_it_is;
  const auto factors = PentadiagonalFactors::of(system(weights));
  if (!factors) return as_it_is;
  std::vector<double> right(n);
  for (std::size_t i = 0; i < n; ++i) right[i] = weights[i] * signal[i];
  std::vector<double> curve = factors->solve(right);
  const std::vector<double> penalty = penalty_of(curve);
  for (std::size_t i = 0; i < n; ++i) {
    right[i] = weights[i] * (signal[i] - curve[i]) - penalty[i];
  }
  const std::vector<double> correction = factors->solve(right);
  for (std::size_t i = 0; i < n; ++i) curve[i] += correction[i];
  return curve;
}

}  // namespace loqsmith
