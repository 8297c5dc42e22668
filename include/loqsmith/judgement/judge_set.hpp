#pragma once

#include <string>
#include <vector>

#include "loqsmith/judgement/measured_analyte.hpp"
#include "loqsmith/judgement/result_row.hpp"
#include "loqsmith/judgement/rows.hpp"

namespace loqsmith {

// One calibration set of one analyte, step by step. `members` holds the set's
// standards and every injection that is judged by it.

/// The curve through the set's standards, its levels accepted or not.
/// @param refused  why there can be none; empty: there may be one
CalibrationSet calibrate_set(const MeasuredAnalyte& members,
                             const std::string& name,
                             const std::string& refused);

/// What the checks say of a set.
struct SetVerdict {
  AnalyteFindings findings;      ///< what they mean for its results
  std::vector<CheckRow> checks;  ///< calibration, then check standards
};

/// Holds a set, its limits computed, against the method's acceptance.
SetVerdict check_set(const MeasuredAnalyte& members, const CalibrationSet& set);

}  // namespace loqsmith
