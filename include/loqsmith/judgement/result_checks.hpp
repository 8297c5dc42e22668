#pragma once

#include <vector>

#include "loqsmith/judgement/check_effect.hpp"
#include "loqsmith/judgement/measured_analyte.hpp"
#include "loqsmith/judgement/rows.hpp"

namespace loqsmith {

/// One analyte when its results have been computed for the first time: numbers
/// and limits are final, statuses do not know of the checks below.
struct FirstResults {
  const MeasuredAnalyte& night;
  const std::vector<CalibrationSet>& sets;
  const std::vector<ResultRow>& results;  ///< in run order
};

/// What one check says, and what that means for the results.
struct CheckOutcome {
  std::vector<CheckRow> rows;
  std::vector<CheckEffect> effects;
};

/// A check that rests on results: of blanks, controls, fortified samples,
/// duplicates, repeats. Gives nothing where the method does not ask for it.
using ResultCheck = CheckOutcome (*)(const FirstResults&);

/// All of them, in the order of their rows in checks.csv.
const std::vector<ResultCheck>& result_checks();

CheckOutcome check_results(const FirstResults& first);

}  // namespace loqsmith
