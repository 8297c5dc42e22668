#pragma once

#include <string>
#include <vector>

#include "loqsmith/judgement/measured_analyte.hpp"
#include "loqsmith/judgement/result_row.hpp"
#include "loqsmith/judgement/rows.hpp"
#include "loqsmith/limits/evidence.hpp"

namespace loqsmith {

// One calibration set of one analyte, step by step. `members` holds the set's
// standards and every injection that is judged by it.

/// The curve through the set's standards, its levels accepted or not.
/// @param refused  why there can be none; empty: there may be one
CalibrationSet calibrate_set(const MeasuredAnalyte& members,
                             const std::string& name,
                             const std::string& refused);

/// The limits of a set from what is known of its low end.
/// @param members  whose blanks may lack the internal standard
void limit_set(CalibrationSet& set, const LimitEvidence& evidence,
               const MeasuredAnalyte& members);

/// What the checks say of a set.
struct SetVerdict {
  AnalyteFindings findings;      ///< what they mean for its results
  std::vector<CheckRow> checks;  ///< calibration, check standards, limits
};

/// Names the set in the rows of checks and in their notes, where the analyte
/// has others.
void name_set(std::vector<CheckRow>& rows, const CalibrationSet& set);

/// Holds a set, its limits computed, against the method's acceptance.
SetVerdict check_set(const MeasuredAnalyte& members, const CalibrationSet& set);

}  // namespace loqsmith
