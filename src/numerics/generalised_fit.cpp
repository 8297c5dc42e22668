#include "loqsmith/numerics/generalised_fit.hpp"

#include <Eigen/Cholesky>
#include <cmath>
#include <cstddef>

namespace loqsmith {
namespace {

using Real = long double;
using Matrix = Eigen::Matrix<Real, Eigen::Dynamic, Eigen::Dynamic>;
using Index = Eigen::Index;
using Values = std::vector<double>;

// Columns that agree to this part of their length are the same to the fit.
constexpr Real kDependent = 1e-12L;

// K v, where K is the inverse of the matrix correlation^|i - j|.
Values times_precision(double correlation, const Values& v) {
  const double r = correlation;
  const double scale = 1.0 / (1.0 - r * r);
  const std::size_t n = v.size();
  Values product(n);
  for (std::size_t i = 0; i < n; ++i) {
    const double before = i > 0 ? v[i - 1] : 0.0;
    const double after = i + 1 < n ? v[i + 1] : 0.0;
    const bool end = i == 0 || i + 1 == n;
    const double middle = end ? 1.0 : 1.0 + r * r;
    product[i] = scale * (middle * v[i] - r * (before + after));
  }
  return product;
}

// Elimination without pivoting: the matrix is dominated by its diagonal.
Values solve_tridiagonal(const MarkovCovariance& covariance, Values v) {
  const double r = covariance.correlation;
  const double scale = covariance.white / (1.0 - r * r);
  const double beside = -scale * r;
  const std::size_t n = v.size();
  Values pivot(n);
  for (std::size_t i = 0; i < n; ++i) {
    const bool end = i == 0 || i + 1 == n;
    pivot[i] = scale * (end ? 1.0 : 1.0 + r * r) + covariance.creeping;
    if (i == 0) continue;
    const double factor = beside / pivot[i - 1];
    pivot[i] -= factor * beside;
    v[i] -= factor * v[i - 1];
  }
  for (std::size_t i = n; i-- > 0;) {
    if (i + 1 < n) v[i] -= beside * v[i + 1];
    v[i] /= pivot[i];
  }
  return v;
}

Real dot(const Values& a, const Values& b) {
  Real sum = 0.0L;
  for (std::size_t i = 0; i < a.size(); ++i) {
    sum += static_cast<Real>(a[i]) * static_cast<Real>(b[i]);
  }
  return sum;
}

// Inverse of the symmetric matrix, brought to a diagonal of ones for the work.
Outcome<Matrix> inverse_of(const Matrix& normal) {
  const Index p = normal.rows();
  Matrix scale = Matrix::Zero(p, p);
  for (Index j = 0; j < p; ++j) {
    if (!(normal(j, j) > 0.0L)) {
      return NotApplicable{"a column of the fit is empty"};
    }
    scale(j, j) = 1.0L / std::sqrt(normal(j, j));
  }
  const Matrix even = scale * normal * scale;
  const Eigen::LLT<Matrix> root(even);
  const bool sound = root.info() == Eigen::Success;
  const Matrix lower = root.matrixL();
  if (!sound || !(lower.diagonal().minCoeff() > std::sqrt(kDependent))) {
    return NotApplicable{"the observations do not determine the coefficients"};
  }
  return Matrix(scale * root.solve(Matrix::Identity(p, p)) * scale);
}

}  // namespace

Values solve_covariance(const MarkovCovariance& covariance, const Values& v) {
  if (!(covariance.creeping > 0.0) || v.size() < 2) {
    const double variance = covariance.white + covariance.creeping;
    Values solved = v;
    for (double& value : solved) value /= variance;
    return solved;
  }
  return solve_tridiagonal(covariance,
                           times_precision(covariance.correlation, v));
}

Values GeneralisedFit::coefficients(const Values& y) const {
  Values found;
  for (const Values& row : weights) {
    found.push_back(static_cast<double>(dot(row, y)));
  }
  return found;
}

Outcome<GeneralisedFit> generalised_fit(const std::vector<Values>& columns,
                                        const MarkovCovariance& covariance) {
  const std::size_t p = columns.size();
  if (p == 0 || columns.front().size() <= p) {
    return NotApplicable{"more observations than coefficients are needed"};
  }
  std::vector<Values> solved;
  for (const Values& column : columns) {
    solved.push_back(solve_covariance(covariance, column));
  }
  Matrix normal(static_cast<Index>(p), static_cast<Index>(p));
  for (std::size_t i = 0; i < p; ++i) {
    for (std::size_t j = 0; j <= i; ++j) {
      const Real product = dot(columns[j], solved[i]);
      normal(static_cast<Index>(i), static_cast<Index>(j)) = product;
      normal(static_cast<Index>(j), static_cast<Index>(i)) = product;
    }
  }
  const Outcome<Matrix> inverse = inverse_of(normal);
  if (!inverse) return NotApplicable{inverse.reason()};
  GeneralisedFit fit;
  const std::size_t n = columns.front().size();
  for (std::size_t j = 0; j < p; ++j) {
    Values row(n, 0.0);
    for (std::size_t i = 0; i < n; ++i) {
      Real sum = 0.0L;
      for (std::size_t k = 0; k < p; ++k) {
        sum += (*inverse)(static_cast<Index>(j), static_cast<Index>(k)) *
               static_cast<Real>(solved[k][i]);
      }
      row[i] = static_cast<double>(sum);
    }
    fit.weights.push_back(std::move(row));
  }
  return fit;
}

double covariance_form(const MarkovCovariance& covariance, const Values& r) {
  return static_cast<double>(dot(r, solve_covariance(covariance, r)));
}

}  // namespace loqsmith
