#pragma once

namespace loqsmith {

// Distribution functions and quantiles. p is a lower-tail probability strictly
// between 0 and 1, degrees of freedom are positive and may be fractional.
// Outside these ranges the answer is NaN, never an exception: callers guard
// their degrees of freedom first. Accurate to some 14 digits inside
// 1e-12 < p < 1 - 1e-12.

/// Student's t: P(T <= t) and its inverse.
double student_t_cdf(double t, double degrees_of_freedom);
double student_t_quantile(double p, double degrees_of_freedom);

/// P(T > t), without the loss of digits of 1 - cdf in the far tail.
double student_t_upper_tail(double t, double degrees_of_freedom);

/// Chi-square: P(X <= x), x >= 0, and its inverse.
double chi_square_cdf(double x, double degrees_of_freedom);
double chi_square_quantile(double p, double degrees_of_freedom);

/// Fisher's F with degrees of freedom of numerator and denominator, x >= 0.
double f_cdf(double x, double numerator_df, double denominator_df);
double f_quantile(double p, double numerator_df, double denominator_df);

/// P(F > x), without the loss of digits of 1 - cdf in the far tail.
double f_upper_tail(double x, double numerator_df, double denominator_df);

/// Multipliers that turn an estimated standard deviation into the bounds of
/// its two-sided confidence interval:
///
///     s sqrt(nu / chi2_{(1+c)/2})  ...  s sqrt(nu / chi2_{(1-c)/2})
///
/// for normal data with nu degrees of freedom and confidence c in (0, 1).
/// Every quantity proportional to s has the same multipliers.
struct SpreadBounds {
  double lower = 0.0;
  double upper = 0.0;
};
SpreadBounds standard_deviation_bounds(double degrees_of_freedom,
                                       double confidence);

}  // namespace loqsmith
