#pragma once

#include <string>

#include "loqsmith/calibration/settings.hpp"
#include "loqsmith/judgement/rows.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/governing.hpp"
#include "loqsmith/sheets/method.hpp"

namespace loqsmith {

// The words and sentences that tables, record and report share.

/// The words of the method: "linear", "1/x2", "zero".
std::string model_word(CalibrationSettings::Model model);
std::string weight_word(CalibrationSettings::Weight weight);
std::string intercept_word(CalibrationSettings::Intercept intercept);

/// "none", "detection", "quantitation", "both".
std::string governing_word(const LimitRow& row);

/// "standard deviation of the blanks 0.12 response; slope 3.4 response/..."
std::string terms_text(const LimitEstimate& estimate);

/// "few-blanks: only 5 blanks; ...": each finding's word and text.
std::string findings_text(const LimitEstimate& estimate);

/// What limits.csv says in `note`: the reason, or findings, then terms.
std::string limit_note(const LimitRow& row);

/// What calibration.csv says in `note`: the reason, or notes and, where it is
/// narrower than the fit, the accepted range.
std::string calibration_note(const Outcome<Calibration>& calibration);

/// The settings that a set was or would have been fitted with.
CalibrationSettings calibration_settings(const Method& method,
                                         const std::string& analyte,
                                         const CalibrationSet& set);

/// True where there is a calibration with an accepted range and no calibration
/// check of the analyte failed. One without an action does not count: a level
/// that fails narrows the range, it does not refuse the whole.
bool calibration_accepted(const AnalyteJudgement& judgement,
                          const CalibrationSet& set);

/// The set's standards: after the fit where there was one.
const std::vector<StandardPoint>& standards_of(const CalibrationSet& set);

}  // namespace loqsmith
