#pragma once

#include <cstddef>
#include <vector>

#include "loqsmith/base/outcome.hpp"

namespace loqsmith {

/// Outcome of a linear least-squares fit of n observations with p coefficients.
struct LeastSquaresFit {
  std::vector<double> coefficients;     ///< p
  std::vector<double> standard_errors;  ///< p
  std::vector<double> covariance;       ///< p x p, row after row
  std::vector<double> residuals;        ///< n, observed minus fitted
  double weighted_residual_sum = 0.0;   ///< sum w r^2
  double residual_sd = 0.0;             ///< sqrt(sum w r^2 / (n - p))
  /// 1 - sum w r^2 / sum w (y - mean_w)^2; 0 where all y are equal.
  double r2_centred = 0.0;
  /// 1 - sum w r^2 / sum w y^2 (for fits without a constant); 0 where all y
  /// are zero.
  double r2_uncentred = 0.0;
  int degrees_of_freedom = 0;  ///< n - p, at least 1

  double covariance_of(std::size_t i, std::size_t j) const;
};

/// Minimises sum w_i (y_i - sum_j c_j x_ij)^2.
///
/// Householder QR with column pivoting on columns scaled to largest entry 1,
/// in extended precision; never the normal equations, which square the
/// condition. Coefficients agree with the NIST StRD certified values to 13
/// digits or more for straight lines (Norris), 7 for a polynomial of degree
/// 10 (Filip), whose decimals no double holds any better.
///
/// @param columns  p columns of n finite values each
/// @param y        n finite values
/// @param weights  n finite values above zero; empty: all 1
/// @return not applicable: lengths that differ, weights not above zero, no
///         more observations than coefficients, columns that depend on each
///         other, an outcome beyond the range of a double.
Outcome<LeastSquaresFit> fit_columns(
    const std::vector<std::vector<double>>& columns,
    const std::vector<double>& y, const std::vector<double>& weights = {});

/// y = sum over k from `lowest_power` to `highest_power` of c_k x^k; the
/// coefficients stand in that order (0 and 1: a straight line; 1 and 1: a line
/// through zero). Powers are formed in extended precision.
Outcome<LeastSquaresFit> fit_polynomial(
    const std::vector<double>& x, const std::vector<double>& y,
    int lowest_power, int highest_power,
    const std::vector<double>& weights = {});

}  // namespace loqsmith
