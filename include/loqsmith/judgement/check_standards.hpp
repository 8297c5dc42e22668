#pragma once

#include <optional>
#include <string>
#include <vector>

#include "loqsmith/calibration/calibration.hpp"
#include "loqsmith/judgement/measured_analyte.hpp"
#include "loqsmith/judgement/rows.hpp"
#include "loqsmith/judgement/settings.hpp"

namespace loqsmith {

/// One check standard of one analyte.
struct CheckStandardOutcome {
  int injection = 0;
  std::optional<double> recovery_percent;  ///< 100 found / nominal
  bool passed = false;
  std::string note;  ///< why there is no recovery
};

/// The check standards whose level contains the analyte above zero, in run
/// order. One without a result (file refused, internal standard missing,
/// beyond the curve) counts as failed: nothing shows that the calibration held.
std::vector<CheckStandardOutcome> judge_check_standards(
    const MeasuredAnalyte& analyte, const Calibration& calibration,
    const PercentRange& recovery);

/// What the check standards say of one injection.
struct Governed {
  bool failed = false;      ///< lies in a stretch that a failed one governs
  bool no_closing = false;  ///< no check standard follows it (governs both)
};

/// Both: failed where the nearest check standard before or the nearest after
/// failed, so that a failed one reaches back to the last passing one (to the
/// first injection where there is none) and forward to the next passing one
/// (to the end). Forward: where the nearest one before failed. A check standard
/// is governed by itself alone.
Governed governed_by(const std::vector<CheckStandardOutcome>& outcomes,
                     CheckStandardAcceptance::Governs governs, int injection);

/// One row a check standard; one unchecked row where there is none.
std::vector<CheckRow> check_standard_rows(
    const std::vector<CheckStandardOutcome>& outcomes,
    const CheckStandardAcceptance& acceptance, const std::string& analyte);

}  // namespace loqsmith
