#include "loqsmith/judgement/judge_analyte.hpp"

#include <utility>

#include "loqsmith/calibration/fit_calibration.hpp"
#include "loqsmith/judgement/acceptance_names.hpp"
#include "loqsmith/judgement/calibration_checks.hpp"
#include "loqsmith/judgement/check_standards.hpp"
#include "loqsmith/judgement/limit_evidence.hpp"
#include "loqsmith/judgement/measured_analyte.hpp"
#include "loqsmith/judgement/result_row.hpp"
#include "loqsmith/judgement/signal_unit.hpp"
#include "loqsmith/judgement/standards.hpp"
#include "loqsmith/judgement/trace_checks.hpp"

namespace loqsmith {
namespace {

void append(std::vector<CheckRow>& rows, std::vector<CheckRow> more) {
  for (CheckRow& row : more) rows.push_back(std::move(row));
}

CalibrationSet calibrate(const MeasuredAnalyte& analyte,
                         const std::string& template_reason) {
  const AnalyteRules& settings = *analyte.settings;
  OfferedStandards offered = offer_standards(analyte);
  CalibrationSet set;
  set.set = "1";
  set.standards = offered.points;
  set.unmeasured = std::move(offered.unmeasured);
  if (!template_reason.empty()) {
    set.calibration = NotApplicable{template_reason};
    return set;
  }
  set.calibration =
      fit_calibration(std::move(offered.points), settings.calibration);
  if (!set.calibration) return set;
  const auto& acceptance = settings.acceptance.calibration;
  if (acceptance) {
    accept_levels(set.calibration.value(), acceptance->back_calculation_percent,
                  acceptance->back_calculation_lowest_percent);
  }
  set.standards = set.calibration->points;
  return set;
}

void compute_limits_of(CalibrationSet& set, const MeasuredAnalyte& analyte) {
  if (!set.calibration) {
    set.limits.governing = NotApplicable{"no calibration"};
    return;
  }
  set.limits = compute_limits(gather_limit_evidence(analyte, *set.calibration),
                              analyte.settings->limits);
  note_mean_internal_standard(analyte, set.limits);
}

void find_about_calibration(AnalyteFindings& findings,
                            const CalibrationSet& set,
                            const AcceptanceSettings& acceptance, bool failed) {
  std::vector<std::string>& withholding = findings.withholding;
  if (!set.calibration) {
    withholding.emplace_back("no-calibration");
    return;
  }
  if (failed) {
    const bool withholds =
        acceptance.calibration->action == CheckAction::Withhold;
    (withholds ? withholding : findings.careful)
        .emplace_back("calibration-failed");
  }
  if (!set.calibration->accepted_highest) {
    withholding.emplace_back("no-accepted-level");
  }
  if (!set.limits.governing) withholding.emplace_back("no-valid-limit");
}

CheckRow nothing_to_check_against(const std::string& analyte) {
  CheckRow row;
  row.check = "check-standard";
  row.analyte = analyte;
  row.note = "not checked: no calibration";
  return row;
}

void check_standards(AnalyteFindings& findings, std::vector<CheckRow>& rows,
                     const MeasuredAnalyte& analyte,
                     const CalibrationSet& set) {
  const auto& acceptance = analyte.settings->acceptance.check_standard;
  if (!acceptance) return;
  const std::string& id = analyte.settings->analyte;
  if (!set.calibration) {
    rows.push_back(nothing_to_check_against(id));
    return;
  }
  findings.check_standards =
      judge_check_standards(analyte, *set.calibration, acceptance->recovery);
  append(rows, check_standard_rows(*findings.check_standards, *acceptance, id));
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
  CalibrationSet set = calibrate(analyte, refused);
  compute_limits_of(set, analyte);

  AnalyteJudgement judgement;
  judgement.analyte = settings.analyte;
  judgement.concentration_unit = units.concentration;
  AnalyteFindings findings;
  if (!template_reason.empty()) findings.withholding = {"not-learned"};
  if (!unit) findings.withholding.emplace_back("mixed-units");
  CalibrationVerdict calibration = check_calibration(settings, set);
  find_about_calibration(findings, set, settings.acceptance,
                         calibration.failed);
  judgement.checks = std::move(calibration.rows);
  check_standards(findings, judgement.checks, analyte, set);
  append(judgement.checks,
         unchecked_rows(settings.acceptance, settings.analyte));
  append(judgement.checks, check_traces(analyte));

  for (const InjectionResponse& one : analyte.injections) {
    if (!is_quantified(one.injection->role)) continue;
    judgement.results.push_back(judge_result(one, analyte, set, findings));
  }
  judgement.sets.push_back(std::move(set));
  return judgement;
}

}  // namespace loqsmith
