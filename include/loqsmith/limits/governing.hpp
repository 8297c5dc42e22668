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

struct LimitsOfAnalyte {
  std::vector<LimitRow> rows;
  Outcome<GoverningLimits> governing = NotApplicable{"not computed"};
};

/// Computes every procedure of the settings and lets one govern.
///
/// - A procedure graded not valid or not applicable does not govern.
/// - "first": the first one written that may. A procedure by name (also
///   "established"): that one or none; a limit that it does not give comes
///   from the first other that may govern. "largest": for each limit the
///   procedure with the largest. Experimental ones only where named.
/// - The quantitation limit is raised to the lowest accepted standard where
///   the settings say so; then to the detection limit where that lies above.
/// - Notes: largest-of-tonight, detection-by-other-procedure,
///   quantitation-by-other-procedure, quantitation-at-lowest-standard,
///   detection-above-quantitation, no-critical-value.
///
/// `governing` is not applicable ("no-valid-limit: ...",
/// "no-accepted-standard: ...") where nothing is left; then every result of
/// the analyte is to be withheld.
LimitsOfAnalyte compute_limits(const LimitEvidence& evidence,
                               const LimitSettings& settings);

}  // namespace loqsmith
