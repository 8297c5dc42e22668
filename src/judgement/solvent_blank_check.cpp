#include "loqsmith/judgement/solvent_blank_check.hpp"

#include <utility>

#include "loqsmith/judgement/blank_maximum.hpp"
#include "loqsmith/judgement/check_rows.hpp"
#include "loqsmith/judgement/check_standards.hpp"

namespace loqsmith {

CheckOutcome check_solvent_blanks(const FirstResults& first) {
  const auto& acceptance = first.night.settings->acceptance.solvent_blank;
  if (!acceptance) return {};
  const CheckRow pattern =
      row_of_check("solvent-blank", first, acceptance->action);
  CheckOutcome outcome;
  std::vector<CheckStandardOutcome> judged;
  for (const ResultRow& result : first.results) {
    if (result.role != Role::SolventBlank) continue;
    CheckRow row = judge_blank(pattern, result, acceptance->maximum);
    if (row.passed) judged.push_back({result.injection, {}, *row.passed, {}});
    if (row.passed == false) {
      row.affects =
          "detected results between the solvent blanks around it that passed";
    }
    outcome.rows.push_back(std::move(row));
  }
  if (outcome.rows.empty()) return not_checked(pattern, "no solvent blank");
  for (const ResultRow& result : first.results) {
    if (result.role == Role::SolventBlank || !is_detected(result)) continue;
    const Governed governed = governed_by(
        judged, CheckStandardAcceptance::Governs::Both, result.injection);
    if (!governed.failed) continue;
    outcome.effects.push_back(
        {result.injection, "solvent-blank-failed", acceptance->action});
  }
  return outcome;
}

}  // namespace loqsmith
