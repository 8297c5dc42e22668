#pragma once

#include <optional>
#include <span>
#include <vector>

namespace loqsmith {

/// A symmetric matrix with two diagonals on either side of the main one.
struct Pentadiagonal {
  std::vector<double> diagonal;  ///< n entries
  std::vector<double> first;     ///< A(i, i + 1), n - 1 entries
  std::vector<double> second;    ///< A(i, i + 2), n - 2 entries (none below 3)
};

/// Its factors L D L': banded Cholesky without square roots. The work grows
/// with n alone.
///
/// Source: G. H. Golub, C. F. Van Loan, Matrix Computations, section on banded
/// systems; from memory.
class PentadiagonalFactors {
 public:
  /// @param matrix  n at least 1
  /// @return nothing where it is not positive definite to machine precision
  static std::optional<PentadiagonalFactors> of(const Pentadiagonal& matrix);

  /// The x of A x = b.
  /// @param right_hand_side  b, n entries
  std::vector<double> solve(std::span<const double> right_hand_side) const;

 private:
  std::vector<double> pivots_;  // D
  std::vector<double> first_;   // L(i + 1, i)
  std::vector<double> second_;  // L(i + 2, i)
};

}  // namespace loqsmith
