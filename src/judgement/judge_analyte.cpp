#include "loqsmith/judgement/judge_analyte.hpp"

#include <algorithm>
#include <cstddef>
#include <set>
#include <utility>

#include "loqsmith/judgement/acceptance_names.hpp"
#include "loqsmith/judgement/addition_sets.hpp"
#include "loqsmith/judgement/bracketing_check.hpp"
#include "loqsmith/judgement/calibration_sets.hpp"
#include "loqsmith/judgement/judge_set.hpp"
#include "loqsmith/judgement/limit_evidence.hpp"
#include "loqsmith/judgement/measured_analyte.hpp"
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

/// @param elsewhere  injections whose result another set gives
void judge_results(AnalyteJudgement& judgement, const MeasuredAnalyte& members,
                   const CalibrationSet& set, SetVerdict verdict,
                   const std::set<int>& elsewhere,
                   const std::vector<std::string>& withholding) {
  name_set(verdict.checks, set);
  verdict.findings.withholding.insert(verdict.findings.withholding.begin(),
                                      withholding.begin(), withholding.end());
  append(judgement.checks, std::move(verdict.checks));
  for (const InjectionResponse& one : members.injections) {
    if (!is_quantified(one.injection->role)) continue;
    if (elsewhere.contains(one.injection->number)) continue;
    judgement.results.push_back(
        judge_result(one, members, set, verdict.findings));
  }
}

void judge_by_standards(AnalyteJudgement& judgement, Sets sets,
                        const std::set<int>& by_addition,
                        const std::vector<std::string>& withholding) {
  for (std::size_t i = 0; i < sets.members.size(); ++i) {
    const CalibrationSet& set = sets.calibrated[i];
    SetVerdict verdict = check_set(sets.members[i].analyte, set);
    check_bracket(verdict, sets.members[i], set);
    judge_results(judgement, sets.members[i].analyte, set, std::move(verdict),
                  by_addition, withholding);
  }
  judgement.sets = std::move(sets.calibrated);
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

void sort_by_run_order(std::vector<ResultRow>& rows) {
  std::stable_sort(rows.begin(), rows.end(),
                   [](const ResultRow& a, const ResultRow& b) {
                     return a.injection < b.injection;
                   });
}

}  // namespace

AnalyteJudgement judge_analyte(const AnalyteRules& settings,
                               const UnitSettings& units,
                               const Sequence& sequence,
                               const std::vector<MeasuredInjection>& injections,
                               const std::string& template_reason) {
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
  judge_by_standards(judgement, std::move(sets), injections_of(additions),
                     withholding);
  for (const AdditionMembers& members : additions) {
    CalibrationSet set = calibrate_addition(members, refused);
    limit_addition(set, analyte, members, spikes);
    judge_results(judgement, members.analyte, set, check_addition(members, set),
                  {}, withholding);
    judgement.sets.push_back(std::move(set));
  }
  sort_by_run_order(judgement.results);
  append(judgement.checks,
         unchecked_rows(settings.acceptance, settings.analyte));
  append(judgement.checks, check_traces(analyte));
  return judgement;
}

}  // namespace loqsmith
