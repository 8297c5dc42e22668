#include "loqsmith/judgement/second_source_check.hpp"

#include <utility>

#include "loqsmith/judgement/affected.hpp"
#include "loqsmith/judgement/recovery.hpp"

namespace loqsmith {

CheckOutcome check_second_source(const FirstResults& first) {
  const auto& accept = first.night.settings->acceptance.second_source;
  if (!accept) return {};
  CheckOutcome outcome;
  const Affected all = whole_analyte(first);
  bool failed = false;
  for (const KnownResult& one :
       with_known_amount(results_of_roles(first, {Role::SecondSource}))) {
    Outcome<double> percent = found_in_vial(one);
    if (percent) {
      percent = recovery_percent(*percent, *one.measured->nominal);
    }
    CheckRow row = recovery_row("second-source", one, percent, accept->recovery,
                                accept->action);
    row.affects = all.words;
    failed = failed || row.passed == false;
    outcome.rows.push_back(std::move(row));
  }
  if (failed) affect(outcome, all, "second-source-failed", accept->action);
  if (outcome.rows.empty()) {
    outcome.rows.push_back(
        unchecked_row("second-source", first, accept->action,
                      "no second source contains the analyte"));
  }
  return outcome;
}

}  // namespace loqsmith
