#include "loqsmith/numerics/pentadiagonal.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <optional>
#include <vector>

#include "loqsmith/numerics/random.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::same_bits;
using test::within_condition;

// The slow twin: Gauss elimination of the whole matrix with pivots.
std::vector<double> solve_dense(const Pentadiagonal& matrix,
                                std::vector<double> b) {
  const std::size_t n = matrix.diagonal.size();
  std::vector<std::vector<double>> a(n, std::vector<double>(n, 0.0));
  for (std::size_t i = 0; i < n; ++i) {
    a[i][i] = matrix.diagonal[i];
    if (i + 1 < n) a[i][i + 1] = a[i + 1][i] = matrix.first[i];
    if (i + 2 < n) a[i][i + 2] = a[i + 2][i] = matrix.second[i];
  }
  for (std::size_t k = 0; k < n; ++k) {
    std::size_t best = k;
    for (std::size_t i = k + 1; i < n; ++i) {
      if (std::abs(a[i][k]) > std::abs(a[best][k])) best = i;
    }
    std::swap(a[k], a[best]);
    std::swap(b[k], b[best]);
    for (std::size_t i = k + 1; i < n; ++i) {
      const double factor = a[i][k] / a[k][k];
      for (std::size_t j = k; j < n; ++j) a[i][j] -= factor * a[k][j];
      b[i] -= factor * b[k];
    }
  }
  for (std::size_t i = n; i-- > 0;) {
    for (std::size_t j = i + 1; j < n; ++j) b[i] -= a[i][j] * b[j];
    b[i] /= a[i][i];
  }
  return b;
}

std::optional<std::vector<double>> solved(const Pentadiagonal& matrix,
                                          const std::vector<double>& b) {
  const auto factors = PentadiagonalFactors::of(matrix);
  if (!factors) return {};
  return factors->solve(b);
}

// Diagonally dominant, hence positive definite, of a small condition number.
Pentadiagonal random_matrix(std::size_t n, RandomStream& stream) {
  Pentadiagonal matrix;
  for (std::size_t i = 0; i < n; ++i) {
    matrix.diagonal.push_back(5.0 + stream.uniform());
  }
  for (std::size_t i = 0; i + 1 < n; ++i) {
    matrix.first.push_back(2.0 * stream.uniform() - 1.0);
  }
  for (std::size_t i = 0; i + 2 < n; ++i) {
    matrix.second.push_back(2.0 * stream.uniform() - 1.0);
  }
  return matrix;
}

TEST(Pentadiagonal, AgreesWithADenseSolve) {
  RandomStream stream("pentadiagonal");
  for (std::size_t n = 1; n <= 40; ++n) {
    const Pentadiagonal matrix = random_matrix(n, stream);
    std::vector<double> b;
    for (std::size_t i = 0; i < n; ++i) b.push_back(stream.normal());
    const auto x = solved(matrix, b);
    ASSERT_TRUE(x);
    const std::vector<double> wanted = solve_dense(matrix, b);
    for (std::size_t i = 0; i < n; ++i) {
      EXPECT_TRUE(within_condition((*x)[i], wanted[i], 20.0, 1.0)) << n;
    }
  }
}

TEST(Pentadiagonal, WholeNumbersComeBack) {
  // b made from x = 1, 2, 3, 4.
  const Pentadiagonal matrix{{1, 5, 6, 2}, {1, 1, 1}, {1, 1}};
  const std::vector<double> b = {1 + 2 + 3, 1 + 10 + 3 + 4, 1 + 2 + 18 + 4,
                                 2 + 3 + 8};
  const auto x = solved(matrix, b);
  ASSERT_TRUE(x);
  for (std::size_t i = 0; i < 4; ++i) {
    EXPECT_TRUE(within_condition((*x)[i], static_cast<double>(i) + 1.0, 20.0));
  }
  EXPECT_TRUE(
      same_bits(solved({{4}, {}, {}}, std::vector<double>{2})->front(), 0.5));
}

TEST(Pentadiagonal, RefusesWhatIsNotPositiveDefinite) {
  const std::vector<double> b = {1, 1, 1};
  EXPECT_FALSE(solved({{0, 1, 1}, {0, 0}, {0}}, b));
  EXPECT_FALSE(solved({{1, 1, 1}, {2, 0}, {0}}, b));
  EXPECT_FALSE(solved({{1, 1, 1}, {0, 0}, {-1}}, b));
  const double nan = std::nan("");
  EXPECT_FALSE(solved({{1, nan, 1}, {0, 0}, {0}}, b));
}

}  // namespace
}  // namespace loqsmith
