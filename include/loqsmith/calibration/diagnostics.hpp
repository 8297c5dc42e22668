#pragma once

#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/calibration/calibration.hpp"
#include "loqsmith/calibration/diagnostic_test.hpp"
#include "loqsmith/calibration/influence.hpp"
#include "loqsmith/calibration/slope_drift.hpp"
#include "loqsmith/calibration/suggested_exclusions.hpp"
#include "loqsmith/calibration/weight_advice.hpp"

namespace loqsmith {

/// Everything that is said of a fitted curve beyond its coefficients. Nothing
/// here changes the curve: a point is suggested, never dropped.
struct CalibrationDiagnostics {
  /// In this order, done or not: lack-of-fit, mandel, cochran, levene,
  /// residual-normality, leverage, cooks-distance, outlying-residual,
  /// slope-drift; then grubbs, once a level with replicates (once, not
  /// applicable, where there is none). Cochran and Levene look at the scatter
  /// as weighted by the fit: they ask whether its weights hold.
  std::vector<NamedDiagnostic> tests;
  /// Each used standard, in run order; empty where it is not defined.
  std::vector<PointInfluence> influence;
  Outcome<SlopeDrift> drift = NotApplicable{"not computed"};
  WeightAdvice weights;
  std::vector<SuggestedExclusion> suggested_exclusions;
};

/// All diagnostics of a fitted curve; the curve is only read.
CalibrationDiagnostics diagnose_calibration(const Calibration& calibration);

}  // namespace loqsmith
