#pragma once

#include <optional>
#include <string>
#include <vector>

#include "loqsmith/judgement/check_effect.hpp"
#include "loqsmith/judgement/check_standards.hpp"
#include "loqsmith/judgement/measured_analyte.hpp"
#include "loqsmith/judgement/rows.hpp"

namespace loqsmith {

/// First and last injection of the standards on both sides of samples.
struct Bracket {
  int opens = 0;
  int closes = 0;
};

/// What holds for all results of one analyte in one calibration set.
struct AnalyteFindings {
  std::vector<std::string> withholding;  ///< reason words
  std::vector<std::string> careful;
  /// Nothing: no check standard could be judged (no calibration).
  std::optional<std::vector<CheckStandardOutcome>> check_standards;
  /// Where standards are to stand on both sides: results before the first get
  /// "no-opening-standards", after the last "no-closing-standards".
  std::optional<Bracket> bracket;
  /// Of checks that rest on results, each for one injection.
  std::vector<CheckEffect> effects;
};

/// Whether injections of a role get a row of results: every role but
/// conditioning (ignored everywhere), standard and added-standard (a standard
/// in a sample's own matrix): their back-calculation stands among the
/// standards. Blanks, spikes and check standards are quantified like
/// samples, so that one table shows the whole night.
bool is_quantified(Role role);

/// One result: the concentration in the vial from the curve, the result and
/// this sample's own limits by the same factor, and the verdict. An injection
/// without response or an analyte without calibration still gives a row.
///
/// A response beyond the end of a quadratic has no concentration. Its status
/// still follows from the response: above the curve at the highest accepted
/// standard it is above range ("beyond-curve"), below the curve at the decision
/// threshold it is not detected.
///
/// In a set of standard addition the concentration is the amount that its line
/// gives, whichever of the sample's injections the row is for, and the range
/// ends at this amount plus the highest one added: no sample is above it.
ResultRow judge_result(const InjectionResponse& one,
                       const MeasuredAnalyte& analyte,
                       const CalibrationSet& set,
                       const AnalyteFindings& findings);

}  // namespace loqsmith
