#pragma once

#include <functional>
#include <optional>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/low_range_line.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

// What the procedures that rest on the residuals of an unweighted line through
// the low standards have in common.

/// The low line of the evidence's calibration, whatever the weight of that.
/// @return not applicable: no calibration, a quadratic, its slope not positive,
///         and where fit_low_range is not.
Outcome<LowRangeLine> low_range_of(const LimitEvidence& evidence,
                                   const ProcedureSettings& procedure);

/// An estimate without limits: number of standards, degrees of freedom and the
/// line's terms.
LimitEstimate estimate_of(const LowRangeLine& line);

/// The two limits as they would be for a residual standard deviation; nothing
/// where a limit does not exist.
struct LimitPair {
  std::optional<double> detection;
  std::optional<double> quantitation;
};

/// Fills limits and 95 % bounds: the chi-square bounds of s_y/x put in the
/// place of s_y/x, which is exact for limits that rise with it while the slope
/// is known. The bounds leave out the slope's uncertainty; the terms say so. A
/// limit that does not exist at the upper bound has no upper bound, with the
/// note no-upper-bound.
///
/// Source of the bounds of s: Hahn and Meeker, Statistical Intervals (1991),
/// from memory.
void set_limits_with_bounds(LimitEstimate& estimate, const LowRangeLine& line,
                            const std::function<LimitPair(double)>& limits_at);

/// What a line says of a measurement of no analyte.
struct ZeroReading {
  double intercept = 0.0;  ///< response
  double intercept_sd = 0.0;
  double blank_sd = 0.0;  ///< of a mean response less the intercept, above zero
  double degrees_of_freedom = 0.0;
  double highest = 0.0;  ///< highest standard of the line
  bool through_zero = false;
};

/// Findings on the place of the limits: line-through-zero (note);
/// blank-differs-from-intercept where there are usable blanks;
/// low-line-differs, where line and calibration meet zero farther apart than
/// the line's own uncertainty (95 %), with the rate of false positives that
/// this predicts where samples are decided on (caution above 2 % or twice
/// alpha, not valid above 5 % or five times alpha); far-below-standards;
/// above-low-range (caution).
void judge_place(LimitEstimate& estimate, const LimitEvidence& evidence,
                 const LimitSettings& settings,
                 const ProcedureSettings& procedure,
                 const ZeroReading& reading);

/// bounds-approximate (note), where the slope's relative standard deviation
/// exceeds 0.06: bounds that leave it out hold 0.94 to 0.96 of true limits up
/// to there and, simulated at 0.08, 0.86 to 0.95.
void judge_slope(LimitEstimate& estimate, double relative_sd);

/// Findings on an unweighted line, variance-grows, curvature-at-low-end,
/// residuals-exceed-blanks where there are usable blanks, bounds-approximate,
/// then judge_place.
void judge_low_range(LimitEstimate& estimate, const LimitEvidence& evidence,
                     const LimitSettings& settings,
                     const ProcedureSettings& procedure,
                     const LowRangeLine& line);

/// quantitation-absent (caution): where there is none, because the relative
/// standard deviation of found concentrations nowhere falls to 1 / factor.
void note_no_quantitation(LimitEstimate& estimate, double factor);

/// Measurements averaged as the settings have them, at least 1.
double replicates_of(const ProcedureSettings& procedure);

}  // namespace loqsmith
