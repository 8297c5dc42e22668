#include "loqsmith/judgement/duplicate_check.hpp"

#include <algorithm>
#include <cmath>
#include <string>
#include <utility>

#include "loqsmith/judgement/affected.hpp"
#include "loqsmith/judgement/parent_sample.hpp"
#include "loqsmith/judgement/relative_difference.hpp"

namespace loqsmith {
namespace {

void compare(CheckRow& row, const SampleValue& duplicate,
             const SampleValue& parent, double largest_percent,
             const std::string& unit) {
  const double own_limit = *duplicate.quantitation_limit;
  const double limit = *parent.quantitation_limit;
  if (duplicate.result >= own_limit && parent.result >= limit) {
    row.value = relative_difference_percent(duplicate.result, parent.result);
    row.high = largest_percent;
    row.note = "relative difference";
  } else {
    row.value = std::abs(duplicate.result - parent.result);
    row.high = std::max(own_limit, limit);
    row.unit = unit;
    row.note = "absolute difference, at most the quantitation limit";
  }
  row.passed = *row.value <= *row.high;
}

CheckRow judge_one(const KnownResult& one,
                   const std::vector<KnownResult>& parents,
                   const DuplicateAcceptance& accept) {
  CheckRow row = check_row("duplicate", one, accept.action);
  const Outcome<SampleValue> duplicate = value_of_sample({one});
  const Outcome<SampleValue> parent = value_of_sample(parents);
  if (!duplicate || !parent) {
    say_why_not(row, duplicate ? parent.reason() + " (sample " +
                                     one.injection().parent + ")"
                               : duplicate.reason());
    return row;
  }
  if (!duplicate->quantitation_limit || !parent->quantitation_limit) {
    say_why_not(row, "not checked: no-valid-limit");
    return row;
  }
  compare(row, *duplicate, *parent, accept.relative_difference, one.row->unit);
  return row;
}

}  // namespace

CheckOutcome check_duplicates(const FirstResults& first) {
  const auto& accept = first.night.settings->acceptance.duplicate;
  if (!accept) return {};
  CheckOutcome outcome;
  for (const KnownResult& one : results_of_roles(first, {Role::Duplicate})) {
    const std::string& name = one.injection().parent;
    const std::vector<KnownResult> parents = parent_results(first, name);
    const Affected sample = sample_named(name, parents);
    CheckRow row = judge_one(one, parents, *accept);
    row.affects = sample.words;
    if (row.passed == false) {
      affect(outcome, sample, "duplicate-failed", accept->action);
    }
    outcome.rows.push_back(std::move(row));
  }
  if (outcome.rows.empty()) {
    outcome.rows.push_back(unchecked_row("duplicate", first, accept->action,
                                         "no sample was repeated"));
  }
  return outcome;
}

}  // namespace loqsmith
