#include "loqsmith/judgement/verdict.hpp"

#include <algorithm>

#include "loqsmith/judgement/method_blank_check.hpp"
#include "loqsmith/judgement/reasons.hpp"

namespace loqsmith {
namespace {

using Facts = VerdictFacts;

bool withheld(const Facts& f) { return !f.withholding.empty() || !f.placing; }

bool below_threshold(const Facts& f) {
  return f.placing && f.placing->below_threshold;
}

bool without_peak(const Facts& f) {
  return f.placing && !f.identified && !below_threshold(f);
}

bool below_detection(const Facts& f) {
  return below_threshold(f) && !f.decides_at_critical_value;
}

bool below_critical(const Facts& f) {
  return below_threshold(f) && f.decides_at_critical_value;
}

bool above_range(const Facts& f) { return f.placing && f.placing->above_range; }

bool below_quantitation(const Facts& f) {
  return f.placing && f.placing->below_quantitation;
}

bool otherwise(const Facts& f) { return f.placing.has_value(); }

}  // namespace

const std::vector<VerdictRule>& verdict_rules() {
  using S = Status;
  static const std::vector<VerdictRule> rules{
      // clang-format off
      {"a failed check or a missing number withholds it",
       withheld,           S::Withheld,    ""},
      {"at or above the decision threshold, but no peak was found",
       without_peak,       S::Withheld,    "response-without-peak"},
      {"below the detection limit, peak or not",
       below_detection,    S::NotDetected, "below-detection-limit"},
      {"below the critical value, where the method decides there",
       below_critical,     S::NotDetected, "below-critical-value"},
      {"beyond the highest accepted standard, in the vial",
       above_range,        S::AboveRange,  "above-range"},
      {"from the decision threshold up to below the quantitation limit",
       below_quantitation, S::Estimated,   "below-quantitation-limit"},
      {"a peak at or above the quantitation limit, within the range",
       otherwise,          S::Reportable,  ""},
      // clang-format on
  };
  return rules;
}

Verdict reach_verdict(const VerdictFacts& facts) {
  Verdict verdict;
  bool decided = false;
  std::vector<std::string> words = facts.careful;
  for (const VerdictRule& rule : verdict_rules()) {
    if (!rule.holds(facts)) continue;
    if (!decided) {
      verdict.status = rule.status;
      verdict.rule = rule.when;
    }
    decided = true;
    words.emplace_back(rule.reason);
  }
  // What withholds stands first, whatever else there is to say.
  verdict.reasons = most_serious_first(facts.withholding);
  for (std::string& word : most_serious_first(std::move(words))) {
    verdict.reasons.push_back(std::move(word));
  }
  verdict.reasons = without_repetition(std::move(verdict.reasons));
  return verdict;
}

std::string qualifier_letter(Status status, const ReportingSettings& settings) {
  const auto replaced = settings.letters.find(status_name(status));
  if (replaced != settings.letters.end()) return replaced->second;
  switch (status) {
    case Status::NotDetected:
      return "U";
    case Status::Estimated:
      return "J";
    case Status::Reportable:
      return "";
    case Status::AboveRange:
      return "E";
    case Status::Withheld:
      return "R";
  }
  return {};
}

std::string qualifier_letter(const Verdict& verdict,
                             const ReportingSettings& settings) {
  const std::string own = qualifier_letter(verdict.status, settings);
  if (verdict.status == Status::Withheld) return own;
  const bool in_blank =
      std::find(verdict.reasons.begin(), verdict.reasons.end(),
                kMethodBlankFailed) != verdict.reasons.end();
  return in_blank ? own + "B" : own;
}

}  // namespace loqsmith
