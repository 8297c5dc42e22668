#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/judgement/settings.hpp"

namespace loqsmith {

/// Where a result lies, unrounded, a result at a limit counting as above it.
struct Placing {
  bool below_threshold = false;     ///< below the decision threshold
  bool below_quantitation = false;  ///< at or above it, below quantitation
  bool above_range = false;         ///< beyond the highest accepted standard
};

/// Everything that the rules look at.
struct VerdictFacts {
  /// Reason words that withhold: no number, no calibration, a failed check
  /// whose action is to withhold.
  std::vector<std::string> withholding;
  /// The apex lies in the window, or the template's shape test passed.
  bool identified = false;
  /// Nothing: there is no number to place; then something withholds.
  std::optional<Placing> placing;
  /// The decision threshold is a critical value, not the detection limit.
  bool decides_at_critical_value = false;
  /// Reason words that only say what to be careful of.
  std::vector<std::string> careful;
};

/// One row of the rule table.
struct VerdictRule {
  std::string_view when;  ///< in words, for people
  bool (*holds)(const VerdictFacts&);
  Status status;
  std::string_view reason;  ///< word that it adds; empty: none of its own
};

/// The rules. The first that holds decides the status; each one that holds
/// adds its word to the reasons.
const std::vector<VerdictRule>& verdict_rules();

struct Verdict {
  Status status = Status::Withheld;
  std::vector<std::string> reasons;  ///< all that apply, most serious first
  std::string_view rule = {};        ///< `when` of the rule that decided
};
Verdict reach_verdict(const VerdictFacts& facts);

/// U, J, E, R, or none for a reportable result; replaced by the method's.
std::string qualifier_letter(Status status, const ReportingSettings& settings);

/// The letters of a result: that of its status and behind it, where a failed
/// method blank flags what was detected, B ("found in the blank"): "JB".
std::string qualifier_letter(const Verdict& verdict,
                             const ReportingSettings& settings);

}  // namespace loqsmith
