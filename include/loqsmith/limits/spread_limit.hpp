#pragma once

#include "loqsmith/calibration/calibration.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

/// A standard deviation of responses and its degrees of freedom.
struct Spread {
  double sd = 0.0;  ///< above zero
  double degrees_of_freedom = 0.0;
};

/// Fills detection and quantitation limit
///
///     x = k s / b
///
/// with the procedure's two factors k, the slope b > 0, and their 95 %
/// confidence bounds: the chi-square interval of s, times k / b. The bounds
/// leave out the slope's uncertainty; the terms say so.
///
/// Source of the bounds: Hahn and Meeker, Statistical Intervals (1991), normal
/// standard deviation; from memory.
void set_spread_limits(LimitEstimate& estimate, const Spread& spread,
                       double slope, const ProcedureSettings& procedure);

/// Adds the finding that the slope at the limit is extrapolated: quantitation
/// limit more than 10 times below the lowest standard of the fit.
void judge_distance_from_standards(LimitEstimate& estimate, double lowest);

/// Units of a term.
inline constexpr const char* kResponse = "response";
inline constexpr const char* kConcentration = "concentration";
inline constexpr const char* kResponsePerConcentration =
    "response/concentration";

}  // namespace loqsmith
