#pragma once

#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/calibration/calibration.hpp"

namespace loqsmith {

/// How far two groups of standards differ that one curve was fitted to.
struct CurveDifference {
  double f = 0.0;         ///< statistic
  double critical = 0.0;  ///< F_0.99; above it one curve does not do
  double p = 0.0;         ///< of so large an F where the groups agree
  int numerator_df = 0;
  int denominator_df = 0;
  /// By how much the later group's own curve lies above the earlier one's,
  /// percent, mean over the levels above zero.
  double mean_percent = 0.0;
};

/// F test of a common curve against one curve for each group:
///
///     F = ((S - S1 - S2) / p) / ((S1 + S2) / (n - 2 p))
///
/// S sum w r^2 about the common curve, S1 and S2 about each group's own curve
/// of the same model with the same weights, p coefficients, n points used. F
/// has p and n - 2 p degrees of freedom where both groups follow one curve and
/// the weights hold.
///
/// Source: comparison of regressions, Chow, Econometrica 28 (1960) 591; extra
/// sum of squares, Draper and Smith, Applied Regression Analysis; from memory.
///
/// @param common  the curve through both groups
/// @param later   injections of the later group; all others are the earlier
/// @return not applicable: a group of its own without p + 1 points ("few-
///         standards"), points without scatter about their own curves
///         ("not-defined").
Outcome<CurveDifference> compare_curves(const Calibration& common,
                                        const std::vector<int>& later);

}  // namespace loqsmith
