#pragma once

#include <optional>
#include <span>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/judgement/censored_value.hpp"

namespace loqsmith {

/// One step of the distribution, at a measured value.
struct DistributionStep {
  double value = 0.0;
  double at_or_below = 0.0;  ///< F(value), the fraction at or below it
  std::size_t measured = 0;  ///< d: results measured there
  std::size_t at_risk = 0;   ///< n: results that could be there or beyond
};

/// The distribution of a group as far as its results determine it: a step at
/// each measured value. What lies below the lowest limit or above the end of
/// the range has a mass but no place.
struct ProductLimit {
  std::vector<DistributionStep> steps;  ///< by ascending value, at least one
  double mass_below = 0.0;              ///< below the first step
  double lowest_limit = 0.0;            ///< where `mass_below` is above zero
  double mass_above = 0.0;              ///< above the last step
  double divided_at = 0.0;              ///< only with results of both kinds
  CensoredCounts counts;
};

/// Product-limit (Kaplan-Meier) distribution.
///
/// With "<" results, from the largest measured value down:
///
///     P(X < x_k) = prod over measured x_j >= x_k of (1 - d_j / n_j),
///
/// n_j all results, measured and limits, at or below x_j; a limit equal to a
/// measured value counts as below it. This is the usual estimator of survival
/// on the values turned about. With ">" results the same from the smallest
/// measured value up, n_j all at or above x_j.
///
/// With both, where no limit lies above the end of any range, every result is
/// known to lie on one side of the highest limit t: F(t) is a count, and the
/// two sides are independent product-limit estimates. That is the
/// nonparametric maximum of the likelihood, in closed form.
///
/// @return not applicable: nothing was measured; a "<" limit lies above the end
///         of a range that was exceeded (an estimate would need iteration).
///
/// Sources: E. L. Kaplan and P. Meier, J. Am. Stat. Assoc. 53 (1958) 457;
/// D. R. Helsel, Statistics for Censored Environmental Data, 2nd edition
/// (2012), for limits of detection; from memory.
Outcome<ProductLimit> product_limit(std::span<const CensoredValue> values);

/// Smallest measured x with F(x) >= p. Nothing where that lies below the
/// lowest limit or beyond the last step.
///
/// @param p  above 0 and below 1
std::optional<double> percentile_of(const ProductLimit& distribution, double p);

/// Mean, its standard error and upper limit, standard deviation, percentiles.
///
/// Mean: the integral of the distribution. A mass below the lowest limit is
/// put at that limit (B. Efron, 1967), so the mean is an upper bound: note
/// "mean-at-most". A mass above the range leaves the mean undetermined: note
/// "mean-open-above".
///
/// Standard error, only without ">" results and with at least 2 measured ones:
///
///     SE^2 = m / (m - 1) sum_k A_k^2 d_k / (n_k (n_k - d_k)),
///
/// A_k the area under F left of x_k, m the number of measured results. Without
/// censoring it is s / sqrt(n). Upper limit: mean + t(0.95, n - 1) SE, which is
/// approximate: too low for few and skew results. Sources: Kaplan and Meier
/// 1958 for the variance; Student's t with it: US EPA, EPA/600/R-06/022
/// (2006); from memory.
///
/// The standard deviation is that of the same masses, its square times n over
/// n - 1.
CensoredEstimate kaplan_meier_estimate(const ProductLimit& distribution);

}  // namespace loqsmith
