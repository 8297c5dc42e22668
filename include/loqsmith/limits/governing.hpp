#pragma once

#include <optional>
#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/procedures.hpp"

namespace loqsmith {

/// One procedure's outcome: a row of limits.csv.
struct LimitRow {
  std::string procedure;
  Outcome<LimitEstimate> estimate = NotApplicable{"not computed"};
  bool governs_detection = false;
  bool governs_quantitation = false;

  Grade grade() const;
};

/// The limits that rule, as vial concentrations.
struct GoverningLimits {
  double detection = 0.0;
  double quantitation = 0.0;        ///< after the floor
  double decision_threshold = 0.0;  ///< detection limit or critical value
  std::string detection_procedure;
  std::string quantitation_procedure;  ///< "lowest-standard" where it floors
  std::vector<std::string> notes;      ///< reason words
};

/// Computes every procedure of the settings and applies the governing rule.
struct LimitsOfAnalyte {
  std::vector<LimitRow> rows;
  Outcome<GoverningLimits> governing = NotApplicable{"not computed"};
};
LimitsOfAnalyte compute_limits(const LimitEvidence& evidence,
                               const LimitSettings& settings);

}  // namespace loqsmith
