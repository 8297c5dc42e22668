#include "loqsmith/numerics/pentadiagonal.hpp"

#include <cstddef>

namespace loqsmith {

std::optional<PentadiagonalFactors> PentadiagonalFactors::of(
    const Pentadiagonal& matrix) {
  const std::size_t n = matrix.diagonal.size();
  PentadiagonalFactors f;
  f.pivots_.assign(n, 0.0);
  f.first_.assign(n, 0.0);
  f.second_.assign(n, 0.0);
  for (std::size_t i = 0; i < n; ++i) {
    double pivot = matrix.diagonal[i];
    double beside = i + 1 < n ? matrix.first[i] : 0.0;
    if (i >= 1) {
      const double carried = f.first_[i - 1] * f.pivots_[i - 1];
      pivot -= f.first_[i - 1] * carried;
      beside -= f.second_[i - 1] * carried;
    }
    if (i >= 2) pivot -= f.second_[i - 2] * f.second_[i - 2] * f.pivots_[i - 2];
    if (!(pivot > 0.0)) return {};
    f.pivots_[i] = pivot;
    f.first_[i] = beside / pivot;
    if (i + 2 < n) f.second_[i] = matrix.second[i] / pivot;
  }
  return f;
}

std::vector<double> PentadiagonalFactors::solve(
    std::span<const double> right_hand_side) const {
  std::vector<double> x(right_hand_side.begin(), right_hand_side.end());
  const std::size_t n = x.size();
  for (std::size_t i = 1; i < n; ++i) {
    x[i] -= first_[i - 1] * x[i - 1];
    if (i >= 2) x[i] -= second_[i - 2] * x[i - 2];
  }
  for (std::size_t i = n; i-- > 0;) {
    x[i] /= pivots_[i];
    if (i + 1 < n) x[i] -= first_[i] * x[i + 1];
    if (i + 2 < n) x[i] -= second_[i] * x[i + 2];
  }
  return x;
}

}  // namespace loqsmith
