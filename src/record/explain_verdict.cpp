#include <algorithm>
#include <set>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/record/explanation.hpp"

namespace loqsmith {
namespace {

// Checks of one injection each: those of other injections say nothing.
bool is_of_one_injection(const std::string& check) {
  static const std::set<std::string> kOwn{
      "file-refused", "file-warning",   "order-differs",     "name-differs",
      "time-differs", "saturation",     "same-data-twice",   "trace-missing",
      "surrogate",    "retention-time", "internal-standard", "second-trace"};
  return kOwn.contains(check);
}

// A row of another calibration set begins its note with that set's name.
bool of_other_set(const CheckRow& check, const std::string& set) {
  return check.note.starts_with("set ") && check.note != "set " + set &&
         !check.note.starts_with("set " + set + ":");
}

bool may_concern(const CheckRow& check, const ResultRow& row) {
  if (!check.analyte.empty() && check.analyte != row.analyte) return false;
  if (of_other_set(check, row.set)) return false;
  return !check.injection || *check.injection == row.injection ||
         !is_of_one_injection(check.check);
}

// A failed check that the result's reasons name, wherever it was made. Of check
// standards only the nearest ones govern.
bool is_a_reason(const CheckRow& check, const ResultRow& row) {
  if (check.passed != false || check.check == "check-standard") return false;
  const bool named = std::find(row.reasons.begin(), row.reasons.end(),
                               check.check + "-failed") != row.reasons.end();
  return named && (check.injection == row.injection || may_concern(check, row));
}

// Of checks made on injections of their own the nearest before and the nearest
// after: they stand on both sides of the result.
std::vector<const CheckRow*> concerning(const std::vector<CheckRow>& checks,
                                        const ResultRow& row) {
  std::map<std::string, int> before;
  std::map<std::string, int> after;
  for (const CheckRow& check : checks) {
    if (!check.injection || !may_concern(check, row)) continue;
    const int number = *check.injection;
    if (number < row.injection) {
      int& nearest = before.try_emplace(check.check, number).first->second;
      nearest = std::max(nearest, number);
    } else if (number > row.injection) {
      int& nearest = after.try_emplace(check.check, number).first->second;
      nearest = std::min(nearest, number);
    }
  }
  std::vector<const CheckRow*> found;
  for (const CheckRow& check : checks) {
    if (is_a_reason(check, row)) {
      found.push_back(&check);
      continue;
    }
    if (!may_concern(check, row)) continue;
    const bool near = !check.injection || *check.injection == row.injection ||
                      before[check.check] == *check.injection ||
                      after[check.check] == *check.injection;
    if (near) found.push_back(&check);
  }
  return found;
}

std::string bounds_words(const CheckRow& check) {
  if (check.low && check.high) {
    return ", allowed " + shortest(*check.low) + " to " + shortest(*check.high);
  }
  if (check.low) return ", at least " + shortest(*check.low);
  return check.high ? ", at most " + shortest(*check.high) : std::string{};
}

std::string check_words(const CheckRow& check) {
  std::string words = check.check;
  if (check.injection) {
    words += ", injection " + std::to_string(*check.injection);
  }
  if (check.value) {
    words += ": " + shortest(*check.value) +
             (check.unit.empty() ? "" : ' ' + check.unit) + bounds_words(check);
  }
  words += !check.passed   ? ": not checked"
           : *check.passed ? ": passed"
                           : ": failed";
  if (check.passed == false && !check.action.empty()) {
    words += ", " + check.action;
  }
  if (check.passed == false && !check.affects.empty()) {
    words += " " + check.affects;
  }
  return check.note.empty() ? words : words + " (" + check.note + ")";
}

bool is_bare(const CheckRow& check) {
  return !check.value && !check.injection &&
         (!check.passed || (*check.passed && check.note.empty()));
}

void tell_placing(ExplanationSection& section, const PublishedResult& result) {
  const ResultRow& row = result.row;
  const ResultDerivation& told = result.derivation;
  if (!row.result) return;
  const auto against = [&](const std::string& name,
                           const std::optional<double>& limit) {
    if (!limit) return;
    section.lines.push_back(
        {shortest(*row.result) +
         (*row.result < *limit ? " is below " : " is at or above ") + name +
         ' ' + shortest(*limit) + ' ' + row.unit});
  };
  against(told.decides_at_critical_value ? "the critical value"
                                         : "the detection limit",
          told.decision_threshold);
  against("the quantitation limit", row.quantitation_limit);
  if (told.range_end && *row.result > *told.range_end) {
    section.lines.push_back({shortest(*row.result) +
                             " is beyond the end of the range " +
                             shortest(*told.range_end) + ' ' + row.unit});
  }
}

void tell_text(ExplanationSection& section, const PublishedResult& result) {
  const ResultRow& row = result.row;
  const ResultDerivation& told = result.derivation;
  if (told.printed_uncertainty && row.result && *row.result != 0.0) {
    section.lines.push_back({"the method's expanded uncertainty of it: " +
                             shortest(*told.printed_uncertainty) + ' ' +
                             row.unit});
  }
  if (!told.printed_value) {
    section.lines.push_back({"reported as " + in_quotes(row.reported)});
    return;
  }
  if (told.reporting_limit) {
    section.lines.push_back(
        {"the reporting limit is " + shortest(*told.reporting_limit)});
  }
  section.lines.push_back({"reported: " + shortest(*told.printed_value) +
                           ", rounded (" + told.rounding + "), gives " +
                           in_quotes(row.reported)});
}

}  // namespace

ExplanationSection explain_checks(const PublishedRecord& record,
                                  const PublishedResult& result) {
  ExplanationSection section{"checks", {}};
  std::vector<std::string> quiet;
  std::vector<std::string> unchecked;
  for (const CheckRow* check : concerning(record.checks, result.row)) {
    if (is_bare(*check)) {
      (check->passed ? quiet : unchecked).push_back(check->check);
    } else {
      section.lines.push_back({check_words(*check)});
    }
  }
  if (!quiet.empty()) {
    section.lines.push_back({"nothing found by " + join(quiet, ", ")});
  }
  if (!unchecked.empty()) {
    section.lines.push_back({"not checked: " + join(unchecked, ", ")});
  }
  return section;
}

ExplanationSection explain_verdict(const PublishedResult& result) {
  const ResultRow& row = result.row;
  ExplanationSection section{"verdict", {}};
  tell_placing(section, result);
  section.lines.push_back({"the rule that decided: " + result.derivation.rule});
  section.lines.push_back(
      {"status " + status_name(row.status) +
       (row.qualifier.empty() ? "" : ", qualifier " + row.qualifier)});
  if (!row.reasons.empty()) {
    section.lines.push_back({"reasons: " + join(row.reasons, ", ")});
  }
  tell_text(section, result);
  return section;
}

}  // namespace loqsmith
