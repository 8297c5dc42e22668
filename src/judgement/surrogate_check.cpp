#include "loqsmith/judgement/surrogate_check.hpp"

#include <map>
#include <utility>

#include "loqsmith/judgement/affected.hpp"
#include "loqsmith/judgement/recovery.hpp"

namespace loqsmith {
namespace {

Outcome<double> recovery_of(const KnownResult& one, double added) {
  if (!one.calibrated) return NotApplicable{"no calibration"};
  const Outcome<double> vial = found_in_vial(one);
  if (!vial) return vial;
  return recovery_percent(*vial * one.row->dilution, added);
}

std::vector<CheckEffect> effects_but_of(
    const std::map<std::size_t, AnalyteJudgement>& surrogates,
    std::size_t analyte) {
  std::vector<CheckEffect> effects;
  for (const auto& [index, judgement] : surrogates) {
    if (index == analyte) continue;
    effects.insert(effects.end(), judgement.for_others.begin(),
                   judgement.for_others.end());
  }
  return effects;
}

}  // namespace

CheckOutcome check_surrogate(const FirstResults& first) {
  const AnalyteRules& settings = *first.night.settings;
  const auto& accept = settings.acceptance.surrogate;
  if (!accept) return {};
  CheckOutcome outcome;
  if (!settings.surrogate_concentration) {
    outcome.rows.push_back(unchecked_row("surrogate", first, accept->action,
                                         "the analyte is no surrogate"));
    return outcome;
  }
  for (const KnownResult& one : all_results(first)) {
    if (!is_prepared_role(one.row->role) || one.measured->nominal) continue;
    CheckRow row = recovery_row(
        "surrogate", one, recovery_of(one, *settings.surrogate_concentration),
        accept->recovery, accept->action);
    row.affects = "all results of the injection";
    if (row.passed == false) {
      outcome.effects.push_back(
          {one.row->injection, "surrogate-failed", accept->action, true});
    }
    outcome.rows.push_back(std::move(row));
  }
  if (outcome.rows.empty()) {
    outcome.rows.push_back(unchecked_row("surrogate", first, accept->action,
                                         "nothing was prepared"));
  }
  return outcome;
}

std::vector<AnalyteJudgement> judge_surrogates_first(
    const std::vector<bool>& is_surrogate, const JudgeOne& judge) {
  std::map<std::size_t, AnalyteJudgement> surrogates;
  for (std::size_t i = 0; i < is_surrogate.size(); ++i) {
    if (is_surrogate[i]) surrogates.emplace(i, judge(i, {}));
  }
  std::vector<AnalyteJudgement> judgements;
  for (std::size_t i = 0; i < is_surrogate.size(); ++i) {
    const std::vector<CheckEffect> others = effects_but_of(surrogates, i);
    // Numbers do not depend on what others show, only verdicts do.
    judgements.push_back(is_surrogate[i] && others.empty() ? surrogates.at(i)
                                                           : judge(i, others));
  }
  return judgements;
}

}  // namespace loqsmith
