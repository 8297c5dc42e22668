#include "loqsmith/numerics/least_squares.hpp"

#include <Eigen/QR>
#include <algorithm>
#include <cmath>
#include <limits>

namespace loqsmith {
namespace {

using Real = long double;
using Matrix = Eigen::Matrix<Real, Eigen::Dynamic, Eigen::Dynamic>;
using Vector = Eigen::Matrix<Real, Eigen::Dynamic, 1>;
using Index = Eigen::Index;

Index to_index(std::size_t size) { return static_cast<Index>(size); }

Vector to_vector(const std::vector<double>& values) {
  Vector result(to_index(values.size()));
  for (std::size_t i = 0; i < values.size(); ++i)
    result(to_index(i)) = static_cast<Real>(values[i]);
  return result;
}

std::vector<double> to_doubles(const Vector& values) {
  std::vector<double> result;
  for (Index i = 0; i < values.size(); ++i)
    result.push_back(static_cast<double>(values(i)));
  return result;
}

bool all_finite(const std::vector<double>& values) {
  return std::all_of(values.begin(), values.end(),
                     [](double value) { return std::isfinite(value); });
}

bool all_positive(const Vector& weights) {
  for (Index i = 0; i < weights.size(); ++i)
    if (!(weights(i) > 0.0L)) return false;
  return true;
}

// Columns whose entries differ by orders of magnitude would be taken for
// dependent ones, so each is brought to a largest entry of 1.
Vector scale_columns(Matrix& design) {
  Vector scale(design.cols());
  for (Index j = 0; j < design.cols(); ++j) {
    const Real largest = design.col(j).cwiseAbs().maxCoeff();
    scale(j) = largest > 0.0L ? largest : 1.0L;
    design.col(j) /= scale(j);
  }
  return scale;
}

double explained(Real residual_sum, Real total) {
  return total > 0.0L ? static_cast<double>(1.0L - residual_sum / total) : 0.0;
}

void fill_r2(LeastSquaresFit& fit, Real residual_sum, const Vector& y,
             const Vector& weights) {
  const Real mean = weights.dot(y) / weights.sum();
  const Vector centred = y.array() - mean;
  fit.r2_centred = explained(residual_sum, weights.dot(centred.cwiseAbs2()));
  fit.r2_uncentred = explained(residual_sum, weights.dot(y.cwiseAbs2()));
}

// Covariance = s^2 (R^T R)^-1, with the pivoting and the scaling undone.
void fill_covariance(LeastSquaresFit& fit,
                     const Eigen::ColPivHouseholderQR<Matrix>& qr,
                     const Vector& scale, Real variance) {
  const Index p = scale.size();
  const Matrix inverse =
      qr.matrixR().topLeftCorner(p, p).triangularView<Eigen::Upper>().solve(
          Matrix::Identity(p, p));
  const Matrix root = scale.cwiseInverse().asDiagonal() *
                      Matrix(qr.colsPermutation() * inverse);
  const Matrix covariance = variance * (root * root.transpose());
  for (Index i = 0; i < p; ++i) {
    for (Index j = 0; j < p; ++j)
      fit.covariance.push_back(static_cast<double>(covariance(i, j)));
    fit.standard_errors.push_back(
        static_cast<double>(std::sqrt(covariance(i, i))));
  }
}

Outcome<LeastSquaresFit> fit_design(Matrix design, const Vector& y,
                                    const Vector& weights) {
  const Index n = design.rows();
  const Index p = design.cols();
  if (y.size() != n || weights.size() != n)
    return NotApplicable{"as many observations as rows and weights are needed"};
  if (!all_positive(weights)) return NotApplicable{"a weight is not positive"};
  if (p < 1 || n <= p)
    return NotApplicable{"more observations than coefficients are needed"};

  const Matrix unweighted = design;
  const Vector root_weights = weights.cwiseSqrt();
  design = root_weights.asDiagonal() * design;
  const Vector scale = scale_columns(design);
  // Dependent to the precision of the doubles that came in, not of the work.
  Eigen::ColPivHouseholderQR<Matrix> qr(design);
  qr.setThreshold(static_cast<Real>(std::numeric_limits<double>::epsilon()));
  if (qr.rank() < p)
    return NotApplicable{"the observations do not determine the coefficients"};

  const Vector solution = qr.solve(root_weights.cwiseProduct(y));
  const Vector coefficients = solution.cwiseQuotient(scale);
  const Vector residuals = y - unweighted * coefficients;
  const Real residual_sum = weights.dot(residuals.cwiseAbs2());

  LeastSquaresFit fit;
  fit.coefficients = to_doubles(coefficients);
  fit.residuals = to_doubles(residuals);
  fit.degrees_of_freedom = static_cast<int>(n - p);
  const Real variance = residual_sum / static_cast<Real>(n - p);
  fit.weighted_residual_sum = static_cast<double>(residual_sum);
  fit.residual_sd = static_cast<double>(std::sqrt(variance));
  fill_r2(fit, residual_sum, y, weights);
  fill_covariance(fit, qr, scale, variance);
  if (!all_finite(fit.coefficients) || !all_finite(fit.covariance) ||
      !std::isfinite(fit.residual_sd))
    return NotApplicable{"the numbers are too large or too small to fit"};
  return fit;
}

Vector weights_or_ones(const std::vector<double>& weights, std::size_t n) {
  if (!weights.empty()) return to_vector(weights);
  return Vector::Ones(to_index(n));
}

}  // namespace

double LeastSquaresFit::covariance_of(std::size_t i, std::size_t j) const {
  return covariance[i * coefficients.size() + j];
}

Outcome<LeastSquaresFit> fit_columns(
    const std::vector<std::vector<double>>& columns,
    const std::vector<double>& y, const std::vector<double>& weights) {
  Matrix design(to_index(y.size()), to_index(columns.size()));
  for (std::size_t j = 0; j < columns.size(); ++j) {
    if (columns[j].size() != y.size())
      return NotApplicable{"the columns differ in length"};
    design.col(to_index(j)) = to_vector(columns[j]);
  }
  return fit_design(std::move(design), to_vector(y),
                    weights_or_ones(weights, y.size()));
}

Outcome<LeastSquaresFit> fit_polynomial(const std::vector<double>& x,
                                        const std::vector<double>& y,
                                        int lowest_power, int highest_power,
                                        const std::vector<double>& weights) {
  if (x.size() != y.size())
    return NotApplicable{"the columns differ in length"};
  if (lowest_power < 0 || highest_power < lowest_power)
    return NotApplicable{"the powers of a polynomial rise from 0 or above"};
  const Vector abscissa = to_vector(x);
  Vector power = Vector::Ones(abscissa.size());
  for (int k = 0; k < lowest_power; ++k) power = power.cwiseProduct(abscissa);
  Matrix design(abscissa.size(), highest_power - lowest_power + 1);
  for (Index j = 0; j < design.cols(); ++j) {
    design.col(j) = power;
    power = power.cwiseProduct(abscissa);
  }
  return fit_design(std::move(design), to_vector(y),
                    weights_or_ones(weights, y.size()));
}

}  // namespace loqsmith
