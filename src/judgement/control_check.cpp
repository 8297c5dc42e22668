#include "loqsmith/judgement/control_check.hpp"

#include <utility>

#include "loqsmith/judgement/affected.hpp"
#include "loqsmith/judgement/recovery.hpp"

namespace loqsmith {

CheckOutcome check_controls(const FirstResults& first) {
  const auto& accept = first.night.settings->acceptance.control;
  if (!accept) return {};
  CheckOutcome outcome;
  for (const KnownResult& one :
       with_known_amount(results_of_roles(first, {Role::Control}))) {
    Outcome<double> percent = found_in_sample(one);
    if (percent) {
      percent = recovery_percent(*percent, *one.measured->nominal);
    }
    const Affected batch = batch_of(first, one.injection());
    CheckRow row =
        recovery_row("control", one, percent, accept->recovery, accept->action);
    row.affects = batch.words;
    if (row.passed == false) {
      affect(outcome, batch, "control-failed", accept->action);
    }
    outcome.rows.push_back(std::move(row));
  }
  if (outcome.rows.empty()) {
    outcome.rows.push_back(unchecked_row("control", first, accept->action,
                                         "no control contains the analyte"));
  }
  return outcome;
}

}  // namespace loqsmith
