#include "loqsmith/limits/governing.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>

#include "loqsmith/base/text.hpp"

namespace loqsmith {
namespace {

// Wild inputs may overflow anywhere on the way; nothing of that may come out.
bool all_finite(const LimitEstimate& estimate) {
  for (const std::optional<double>& one :
       {estimate.critical_value, estimate.detection, estimate.quantitation,
        estimate.detection_lower, estimate.detection_upper,
        estimate.quantitation_lower, estimate.quantitation_upper})
    if (one && !(std::isfinite(*one) && *one > 0.0)) return false;
  return std::all_of(
      estimate.terms.begin(), estimate.terms.end(),
      [](const LimitTerm& term) { return std::isfinite(term.value); });
}

Outcome<LimitEstimate> compute(const LimitEvidence& evidence,
                               const LimitSettings& settings,
                               const ProcedureSettings& procedure) {
  const LimitProcedure* known = find_limit_procedure(procedure.name);
  if (known == nullptr || known->compute == nullptr)
    return NotApplicable{"not-available: " + procedure.name +
                         " is not available in this version"};
  Outcome<LimitEstimate> estimate =
      known->compute(evidence, settings, procedure);
  if (estimate && !all_finite(*estimate))
    return NotApplicable{
        "limit-not-finite: the numbers are too large or too small"};
  return estimate;
}

bool is_experimental(const LimitRow& row) {
  const LimitProcedure* known = find_limit_procedure(row.procedure);
  return known != nullptr && known->experimental;
}

bool may_govern(const LimitRow& row) { return row.grade() < Grade::NotValid; }

bool is_named(const LimitSettings& settings) {
  return settings.governing != "first" && settings.governing != "largest";
}

// Rows that may govern: the named procedure first, then the others as written.
// Experimental ones only where named. Empty where a named one may not.
std::vector<std::size_t> candidates(const std::vector<LimitRow>& rows,
                                    const LimitSettings& settings) {
  std::vector<std::size_t> found;
  for (std::size_t i = 0; i < rows.size(); ++i)
    if (may_govern(rows[i]) && rows[i].procedure == settings.governing)
      found.push_back(i);
  if (is_named(settings) && found.empty()) return {};
  for (std::size_t i = 0; i < rows.size(); ++i)
    if (may_govern(rows[i]) && rows[i].procedure != settings.governing &&
        !is_experimental(rows[i]))
      found.push_back(i);
  return found;
}

using LimitMember = std::optional<double> LimitEstimate::*;

// The first candidate that has the limit, or the one that has the largest.
std::optional<std::size_t> choose(const std::vector<LimitRow>& rows,
                                  const std::vector<std::size_t>& among,
                                  bool largest, LimitMember limit) {
  std::optional<std::size_t> chosen;
  for (std::size_t i : among) {
    const std::optional<double>& value = (*rows[i].estimate).*limit;
    if (!value) continue;
    if (!chosen || (largest && *value > *((*rows[*chosen].estimate).*limit)))
      chosen = i;
  }
  return chosen;
}

std::string why_not(const LimitRow& row) {
  if (!row.estimate) return row.procedure + ": " + row.estimate.reason();
  std::vector<std::string> words;
  for (const LimitFinding& finding : row.estimate->findings)
    if (finding.grade == Grade::NotValid) words.push_back(finding.word);
  if (words.empty()) return row.procedure + " gives no such limit";
  return row.procedure + " is not valid: " + join(words, ", ");
}

NotApplicable no_limit(const std::vector<LimitRow>& rows,
                       const LimitSettings& settings) {
  std::vector<std::string> reasons;
  for (const LimitRow& row : rows)
    if (!is_named(settings) || row.procedure == settings.governing)
      reasons.push_back(why_not(row));
  if (reasons.empty() && is_named(settings))
    reasons.push_back("the method does not compute " + settings.governing +
                      ", which should govern");
  if (reasons.empty()) reasons.push_back("the method names no procedure");
  return {"no-valid-limit: " + join(reasons, "; ")};
}

void set_threshold(GoverningLimits& limits, const LimitEstimate& estimate,
                   const LimitSettings& settings) {
  limits.decision_threshold = limits.detection;
  if (settings.decision != LimitSettings::Decision::CriticalValue) return;
  if (estimate.critical_value)
    limits.decision_threshold = *estimate.critical_value;
  else
    limits.notes.push_back("no-critical-value");
}

// False where the floor is wanted and there is no accepted standard.
bool apply_floor(GoverningLimits& limits, const LimitEvidence& evidence,
                 const LimitSettings& settings) {
  if (!settings.floor_at_lowest_standard) return true;
  if (!evidence.calibration || !evidence.calibration->accepted_lowest)
    return false;
  const double lowest = *evidence.calibration->accepted_lowest;
  if (!(lowest > limits.quantitation)) return true;
  limits.quantitation = lowest;
  limits.quantitation_procedure = "lowest-standard";
  limits.notes.push_back("quantitation-at-lowest-standard");
  return true;
}

void settle_order(GoverningLimits& limits) {
  if (!(limits.detection > limits.quantitation)) return;
  limits.quantitation = limits.detection;
  limits.quantitation_procedure = limits.detection_procedure;
  limits.notes.push_back("detection-above-quantitation");
}

void note_choice(GoverningLimits& limits, const std::vector<LimitRow>& rows,
                 std::size_t detection, std::size_t quantitation,
                 const LimitSettings& settings) {
  if (settings.governing == "largest") {
    limits.notes.push_back("largest-of-tonight");
    return;
  }
  const std::string& wanted =
      is_named(settings) ? settings.governing : rows.front().procedure;
  if (rows[detection].procedure != wanted)
    limits.notes.push_back("detection-by-other-procedure");
  if (rows[quantitation].procedure != wanted)
    limits.notes.push_back("quantitation-by-other-procedure");
}

Outcome<GoverningLimits> govern(std::vector<LimitRow>& rows,
                                const LimitEvidence& evidence,
                                const LimitSettings& settings) {
  const std::vector<std::size_t> among = candidates(rows, settings);
  const bool largest = settings.governing == "largest";
  const auto detection =
      choose(rows, among, largest, &LimitEstimate::detection);
  const auto quantitation =
      choose(rows, among, largest, &LimitEstimate::quantitation);
  if (!detection || !quantitation) return no_limit(rows, settings);

  GoverningLimits limits;
  limits.detection = *rows[*detection].estimate->detection;
  limits.quantitation = *rows[*quantitation].estimate->quantitation;
  limits.detection_procedure = rows[*detection].procedure;
  limits.quantitation_procedure = rows[*quantitation].procedure;
  note_choice(limits, rows, *detection, *quantitation, settings);
  if (!apply_floor(limits, evidence, settings))
    return NotApplicable{
        "no-accepted-standard: the quantitation limit has no floor to stand "
        "on, no level above zero is accepted"};
  settle_order(limits);
  set_threshold(limits, *rows[*detection].estimate, settings);

  rows[*detection].governs_detection = true;
  if (limits.quantitation_procedure == rows[*quantitation].procedure)
    rows[*quantitation].governs_quantitation = true;
  else if (limits.quantitation_procedure == rows[*detection].procedure)
    rows[*detection].governs_quantitation = true;
  return limits;
}

}  // namespace

Grade LimitRow::grade() const {
  return estimate ? estimate->grade() : Grade::NotApplicable;
}

LimitsOfAnalyte compute_limits(const LimitEvidence& evidence,
                               const LimitSettings& settings) {
  LimitsOfAnalyte limits;
  for (const ProcedureSettings& procedure : settings.procedures) {
    LimitRow row;
    row.procedure = procedure.name;
    row.estimate = compute(evidence, settings, procedure);
    limits.rows.push_back(std::move(row));
  }
  limits.governing = govern(limits.rows, evidence, settings);
  return limits;
}

}  // namespace loqsmith
