#include "loqsmith/judgement/judge_analyte.hpp"

#include <algorithm>
#include <cstddef>
#include <set>
#include <utility>

#include "loqsmith/judgement/acceptance_names.hpp"
#include "loqsmith/judgement/addition_sets.hpp"
#include "loqsmith/judgement/bracketing_check.hpp"
#include "loqsmith/judgement/calibration_sets.hpp"
#include "loqsmith/judgement/closeness_check.hpp"
#include "loqsmith/judgement/judge_set.hpp"
#include "loqsmith/judgement/limit_evidence.hpp"
#include "loqsmith/judgement/measured_analyte.hpp"
#include "loqsmith/judgement/result_checks.hpp"
#include "loqsmith/judgement/result_row.hpp"
#include "loqsmith/judgement/set_evidence.hpp"
#include "loqsmith/judgement/signal_unit.hpp"
#include "loqsmith/judgement/trace_checks.hpp"

namespace loqsmith {
namespace {

void append(std::vector<CheckRow>& rows, std::vector<CheckRow> more) {
  for (CheckRow& row : more) rows.push_back(std::move(row));
}

// The sets of one analyte on their way; both lists in the same order.
struct Sets {
  std::vector<SetMembers> members;
  std::vector<CalibrationSet> calibrated;
};

Sets calibrate(const MeasuredAnalyte& night, const std::string& refused) {
  Sets sets;
  sets.members = divide_into_sets(night);
  for (const SetMembers& members : sets.members) {
    sets.calibrated.push_back(
        calibrate_set(members.analyte, members.name, refused));
    sets.calibrated.back().alone = sets.members.size() == 1;
  }
  return sets;
}

// Low spikes as the curves of their own sets find them, in run order.
std::vector<SpikeResult> spikes_of(const Sets& sets) {
  std::vector<SpikeResult> spikes;
  for (std::size_t i = 0; i < sets.members.size(); ++i) {
    if (!sets.calibrated[i].calibration) continue;
    for (SpikeResult& spike :
         gather_limit_evidence(sets.members[i].analyte,
                               *sets.calibrated[i].calibration)
             .spikes) {
      spikes.push_back(std::move(spike));
    }
  }
  return spikes;
}

void compute_limits_of(Sets& sets, const MeasuredAnalyte& night,
                       const std::vector<SpikeResult>& spikes) {
  for (std::size_t i = 0; i < sets.members.size(); ++i) {
    CalibrationSet& set = sets.calibrated[i];
    if (!set.calibration) {
      set.limits.governing = NotApplicable{"no calibration"};
      continue;
    }
    const SetEvidence known = evidence_of_set(night, sets.members[i].analyte,
                                              *set.calibration, spikes);
    limit_set(set, known.evidence, night);
    add_notes(set.limits, known.notes);
  }
}

void limit_addition(CalibrationSet& set, const MeasuredAnalyte& night,
                    const AdditionMembers& members,
                    const std::vector<SpikeResult>& spikes) {
  if (!set.calibration) {
    set.limits.governing = NotApplicable{"no calibration"};
    return;
  }
  limit_set(set, addition_evidence(night, members, set, spikes), night);
}

// One set ready to give results.
struct Ready {
  const MeasuredAnalyte* members = nullptr;
  const CalibrationSet* set = nullptr;
  AnalyteFindings findings;
  std::set<int> elsewhere = {};  // injections whose result another set gives
};

void sort_by_run_order(std::vector<ResultRow>& rows) {
  std::stable_sort(rows.begin(), rows.end(),
                   [](const ResultRow& a, const ResultRow& b) {
                     return a.injection < b.injection;
                   });
}

std::vector<ResultRow> results_of(std::vector<Ready>& ready,
                                  const std::vector<CheckEffect>& effects) {
  std::vector<ResultRow> results;
  for (Ready& one : ready) {
    one.findings.effects = effects;
    for (const InjectionResponse& injection : one.members->injections) {
      if (!is_quantified(injection.injection->role)) continue;
      if (one.elsewhere.contains(injection.injection->number)) continue;
      results.push_back(
          judge_result(injection, *one.members, *one.set, one.findings));
    }
  }
  sort_by_run_order(results);
  return results;
}

// The rows go to the judgement, what they mean to the set's results.
Ready make_ready(AnalyteJudgement& judgement, const MeasuredAnalyte& members,
                 const CalibrationSet& set, SetVerdict verdict,
                 const std::vector<std::string>& withholding) {
  name_set(verdict.checks, set);
  append(judgement.checks, std::move(verdict.checks));
  verdict.findings.withholding.insert(verdict.findings.withholding.begin(),
                                      withholding.begin(), withholding.end());
  return {&members, &set, std::move(verdict.findings)};
}

// Once more after each kind of check: most rest on the numbers alone, repeats
// are compared last, when it is known which of them are withheld.
void judge_results(AnalyteJudgement& judgement, std::vector<Ready>& ready,
                   const MeasuredAnalyte& night,
                   std::vector<CheckEffect> effects) {
  judgement.results = results_of(ready, effects);
  for (const ResultCheck check : {check_results, check_closeness}) {
    CheckOutcome outcome = check({night, judgement.sets, judgement.results});
    append(judgement.checks, std::move(outcome.rows));
    if (outcome.effects.empty()) continue;
    for (CheckEffect& effect : outcome.effects) {
      if (effect.whole_injection) judgement.for_others.push_back(effect);
      effects.push_back(std::move(effect));
    }
    judgement.results = results_of(ready, effects);
  }
}

std::set<int> injections_of(const std::vector<AdditionMembers>& additions) {
  std::set<int> numbers;
  for (const AdditionMembers& members : additions) {
    for (const InjectionResponse& one : members.analyte.injections) {
      numbers.insert(one.injection->number);
    }
  }
  return numbers;
}

std::vector<Ready> ready_sets(AnalyteJudgement& judgement,
                              const std::vector<SetMembers>& members,
                              const std::vector<AdditionMembers>& additions,
                              const std::vector<std::string>& withholding) {
  std::vector<Ready> ready;
  const std::set<int> by_addition = injections_of(additions);
  for (std::size_t i = 0; i < members.size(); ++i) {
    const CalibrationSet& set = judgement.sets[i];
    SetVerdict verdict = check_set(members[i].analyte, set);
    check_bracket(verdict, members[i], set);
    ready.push_back(make_ready(judgement, members[i].analyte, set,
                               std::move(verdict), withholding));
    ready.back().elsewhere = by_addition;
  }
  for (std::size_t i = 0; i < additions.size(); ++i) {
    const CalibrationSet& set = judgement.sets[members.size() + i];
    ready.push_back(make_ready(judgement, additions[i].analyte, set,
                               check_addition(additions[i], set), withholding));
  }
  return ready;
}

}  // namespace

AnalyteJudgement judge_analyte(const AnalyteRules& settings,
                               const UnitSettings& units,
                               const Sequence& sequence,
                               const std::vector<MeasuredInjection>& injections,
                               const std::string& template_reason,
                               const std::vector<CheckEffect>& from_others) {
  const MeasuredAnalyte analyte =
      collect_responses(settings, units, sequence, injections);
  const Outcome<std::string> unit = common_signal_unit(injections);
  const std::string refused =
      template_reason.empty() && !unit ? unit.reason() : template_reason;
  std::vector<std::string> withholding;
  if (!template_reason.empty()) withholding.emplace_back("not-learned");
  if (!unit) withholding.emplace_back("mixed-units");

  AnalyteJudgement judgement;
  judgement.analyte = settings.analyte;
  judgement.concentration_unit = units.concentration;
  const std::vector<AdditionMembers> additions = find_additions(analyte);
  Sets sets = calibrate(analyte, refused);
  if (!additions.empty()) {
    for (CalibrationSet& set : sets.calibrated) set.alone = false;
  }
  const std::vector<SpikeResult> spikes = spikes_of(sets);
  compute_limits_of(sets, analyte, spikes);
  judgement.sets = std::move(sets.calibrated);
  for (const AdditionMembers& members : additions) {
    judgement.sets.push_back(calibrate_addition(members, refused));
    limit_addition(judgement.sets.back(), analyte, members, spikes);
  }

  std::vector<Ready> ready =
      ready_sets(judgement, sets.members, additions, withholding);
  judge_results(judgement, ready, analyte, from_others);
  append(judgement.checks,
         unchecked_rows(settings.acceptance, settings.analyte));
  append(judgement.checks, check_traces(analyte));
  return judgement;
}

}  // namespace loqsmith
