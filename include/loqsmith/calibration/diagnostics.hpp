#pragma once

#include <optional>
#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/calibration/calibration.hpp"

namespace loqsmith {

// What can be said of a fitted curve beyond its coefficients. Nothing here
// changes the curve: a point is suggested, never dropped.

/// One statistical test, held against its critical value.
struct DiagnosticTest {
  std::string name;  ///< "lack-of-fit", "mandel", ...
  double statistic = 0.0;
  double critical = 0.0;
  /// Probability of a statistic at least as extreme where all is well; absent
  /// where the statistic is held against a rule, not a distribution.
  std::optional<double> p;
  std::optional<double> degrees_1;  ///< degrees of freedom, or n of the test
  std::optional<double> degrees_2;
  bool passed = true;   ///< nothing against the model in use
  std::string meaning;  ///< plain language with figures, one or two sentences
  /// Where the test concerns one level or one standard.
  std::optional<double> concentration;
  std::optional<int> injection;
};

/// A test by name, done or not ("no-replicates: ...", "not-defined: ...").
struct NamedDiagnostic {
  std::string name;
  Outcome<DiagnosticTest> outcome = NotApplicable{"not computed"};
};

/// How much one used standard weighs in the curve, and how far it lies off.
struct PointInfluence {
  int injection = 0;
  double concentration = 0.0;
  double leverage = 0.0;  ///< 0 to 1, sum over the points = coefficients
  /// Weighted residual over its own standard deviation s sqrt(1 - leverage).
  double standardised_residual = 0.0;
  double cooks_distance = 0.0;
  bool high_leverage = false;  ///< above 3 coefficients / n
  bool influential = false;    ///< Cook's distance above F_0.5(p, n - p)
};

/// Trend of the slope over the sequence, by run order of the standards.
struct SlopeDrift {
  double percent_per_injection = 0.0;
  double percent_over_standards = 0.0;  ///< from the first to the last used
  DiagnosticTest test;
};

/// One candidate weight: the sum over the used standards above zero of
/// |back-calculated - nominal| / nominal, in percent.
struct WeightCandidate {
  CalibrationSettings::Weight weight = CalibrationSettings::Weight::None;
  Outcome<double> sum_relative_error_percent = NotApplicable{"not computed"};
};

/// Compares weights on the same standards and model. It advises, the method
/// decides.
struct WeightAdvice {
  std::vector<WeightCandidate> candidates;  ///< none, 1/x, 1/x2, 1/s2
  CalibrationSettings::Weight in_use = CalibrationSettings::Weight::None;
  std::optional<CalibrationSettings::Weight> least;
  /// Unweighted although the standards span more than a factor of ten.
  bool unweighted_over_a_decade = false;
  bool advises_change = false;
  std::string advice;  ///< plain language with figures
};

/// A standard that the tests point at. Only the method or an amendment can
/// leave it out; the curve without it is for comparison.
struct SuggestedExclusion {
  int injection = 0;
  std::string level;
  double concentration = 0.0;
  std::string why;  ///< the test with its figures
  Outcome<Calibration> without = NotApplicable{"not computed"};
};

/// Everything that is said of one calibration.
struct CalibrationDiagnostics {
  /// In this order, done or not: lack-of-fit, mandel, cochran, levene,
  /// residual-normality, leverage, cooks-distance, outlying-residual,
  /// slope-drift; then grubbs, once a level with replicates (once, not
  /// applicable, where there is none).
  std::vector<NamedDiagnostic> tests;
  /// Each used standard, in run order.
  std::vector<PointInfluence> influence;
  Outcome<SlopeDrift> drift = NotApplicable{"not computed"};
  WeightAdvice weights;
  std::vector<SuggestedExclusion> suggested_exclusions;
};

/// All diagnostics of a fitted curve; its own fields are only read.
CalibrationDiagnostics diagnose_calibration(const Calibration& calibration);

}  // namespace loqsmith
