#include "loqsmith/judgement/retention_time_check.hpp"

#include <cmath>
#include <set>

#include "loqsmith/judgement/check_rows.hpp"

namespace loqsmith {

CheckOutcome check_retention_times(const FirstResults& first) {
  const auto& acceptance = first.night.settings->acceptance.retention_time;
  if (!acceptance) return {};
  CheckRow pattern = row_of_check("retention-time", first, acceptance->action);
  pattern.low = -acceptance->shift_minutes;
  pattern.high = acceptance->shift_minutes;
  pattern.unit = "min";
  std::set<int> quantified;
  for (const ResultRow& row : first.results) quantified.insert(row.injection);

  InjectionRows rows(pattern);
  CheckOutcome outcome;
  for (const InjectionResponse& one : first.night.injections) {
    const int number = one.injection->number;
    if (!quantified.contains(number) || !one.peak || !one.peak->found) continue;
    if (!one.expected_minutes) continue;
    const double shift = one.peak->retention_minutes - *one.expected_minutes;
    if (std::abs(shift) <= acceptance->shift_minutes) {
      rows.passed(number, shift, std::abs(shift));
      continue;
    }
    rows.failed(number, shift, "the result");
    outcome.effects.push_back(
        {number, "retention-time-failed", acceptance->action});
  }
  outcome.rows = rows.rows("no peak was found");
  return outcome;
}

}  // namespace loqsmith
