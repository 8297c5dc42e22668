#pragma once

#include <span>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/judgement/censored_value.hpp"

namespace loqsmith {

/// Results below a limit, filled in from a line through the measured ones on
/// lognormal probability paper.
struct OrderStatisticsFit {
  double intercept = 0.0;  ///< mean of the logarithms
  double slope = 0.0;      ///< their standard deviation
  /// Plotting position of each measured value, in ascending order.
  std::vector<double> measured_positions;
  /// Measured values and, for each "<" result, one from the line; ascending.
  std::vector<double> filled;
};

/// Robust regression on order statistics for any number of limits.
///
/// For distinct limits d_1 < ... < d_m (and d_0 = -infinity where a measured
/// value lies below d_1), A_j measured values in [d_j, d_j+1), B_j results
/// known to lie below d_j, C_j of them "< d_j", the fraction above d_j is
///
///     e_j = e_j+1 + A_j / (A_j + B_j) (1 - e_j+1),   e_m+1 = 0, e_0 = 1.
///
/// Positions: (1 - e_j) + (e_j - e_j+1) i / (A_j + 1) for the i-th measured
/// value of an interval, (1 - e_j) i / (C_j + 1) for the i-th "< d_j". A
/// straight line of ln(measured) on the normal quantile of the position gives
/// values at the positions of the "<" results; they stand for the group as a
/// whole, never for the single sample.
///
/// @return not applicable: results above the range (their order is not known),
///         values not above zero, fewer than 3 measured or all of them equal,
///         a line that does not rise.
///
/// Source: D. R. Helsel and T. A. Cohn, Water Resour. Res. 24 (1988) 1997; from
/// memory.
Outcome<OrderStatisticsFit> regress_on_order_statistics(
    std::span<const CensoredValue> values);

/// Mean, standard deviation (n - 1) and percentiles of the filled-in group.
/// Percentile p is at rank p (n + 1), linear between ranks (Weibull); nothing
/// beyond the first or last rank.
///
/// Standard error of the mean: leaving out one result at a time,
///
///     SE^2 = (n - 1) / n sum_i (mean_(i) - mean of these)^2,
///
/// since s / sqrt(n) of filled-in values would count guesses as measurements.
/// Without censoring both are equal. Needs 4 measured values. Upper limit:
/// mean + t(0.95, n - 1) SE; approximate, too low for few and skew results.
/// Source: J. W. Tukey, Ann. Math. Stat. 29 (1958) 614; from memory.
///
/// @return not applicable for the reasons of the fit
Outcome<CensoredEstimate> order_statistics_estimate(
    std::span<const CensoredValue> values);

}  // namespace loqsmith
