#pragma once

#include <string>
#include <vector>

#include "loqsmith/judgement/rows.hpp"
#include "loqsmith/judgement/settings.hpp"

namespace loqsmith {

struct CalibrationVerdict {
  bool failed = false;  ///< a criterion that concerns the whole analyte failed
  std::vector<CheckRow> rows;
};

/// Holds a calibration set, its levels already accepted or not, against
/// `<calibration>` of `<acceptance>`. One row for each criterion that is asked
/// for, its name first in the note:
///
/// - minimum-levels: levels above zero in the fit;
/// - minimum-r2, maximum-relative-standard-error: of the fit;
/// - back-calculation: one row a level of the fit, its mean deviation; a
///   failing level narrows the range and fails the analyte only through
/// - minimum-accepted: accepted levels as percentage of all levels above zero
///   whose standards were in the sequence, measured or not.
///
/// Values at a limit pass. Where there is no calibration, one failed row says
/// why. Where the method does not ask, the result is empty.
///
/// Source: criteria after US EPA SW-846 method 8000D and ICH M10 (2022), 3.3.5;
/// from memory.
CalibrationVerdict check_calibration(const AnalyteRules& settings,
                                     const CalibrationSet& set);

}  // namespace loqsmith
