#include "loqsmith/judgement/judge_analyte.hpp"

#include <utility>

#include "loqsmith/judgement/acceptance_names.hpp"
#include "loqsmith/judgement/judge_set.hpp"
#include "loqsmith/judgement/limit_evidence.hpp"
#include "loqsmith/judgement/measured_analyte.hpp"
#include "loqsmith/judgement/result_row.hpp"
#include "loqsmith/judgement/signal_unit.hpp"
#include "loqsmith/judgement/trace_checks.hpp"

namespace loqsmith {
namespace {

void append(std::vector<CheckRow>& rows, std::vector<CheckRow> more) {
  for (CheckRow& row : more) rows.push_back(std::move(row));
}

void compute_limits_of(CalibrationSet& set, const MeasuredAnalyte& members) {
  if (!set.calibration) {
    set.limits.governing = NotApplicable{"no calibration"};
    return;
  }
  set.limits = compute_limits(gather_limit_evidence(members, *set.calibration),
                              members.settings->limits);
  note_mean_internal_standard(members, set.limits);
}

void judge_set(AnalyteJudgement& judgement, const MeasuredAnalyte& members,
               CalibrationSet set,
               const std::vector<std::string>& withholding) {
  SetVerdict verdict = check_set(members, set);
  verdict.findings.withholding.insert(verdict.findings.withholding.begin(),
                                      withholding.begin(), withholding.end());
  append(judgement.checks, std::move(verdict.checks));
  for (const InjectionResponse& one : members.injections) {
    if (!is_quantified(one.injection->role)) continue;
    judgement.results.push_back(
        judge_result(one, members, set, verdict.findings));
  }
  judgement.sets.push_back(std::move(set));
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
  CalibrationSet set = calibrate_set(analyte, "1", refused);
  compute_limits_of(set, analyte);
  judge_set(judgement, analyte, std::move(set), withholding);
  append(judgement.checks,
         unchecked_rows(settings.acceptance, settings.analyte));
  append(judgement.checks, check_traces(analyte));
  return judgement;
}

}  // namespace loqsmith
