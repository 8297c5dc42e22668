#include "loqsmith/judgement/judge_set.hpp"

#include <utility>

#include "loqsmith/calibration/diagnostics.hpp"
#include "loqsmith/calibration/fit_calibration.hpp"
#include "loqsmith/judgement/calibration_checks.hpp"
#include "loqsmith/judgement/check_standards.hpp"
#include "loqsmith/judgement/confirmation_check.hpp"
#include "loqsmith/judgement/established_limit_check.hpp"
#include "loqsmith/judgement/limit_evidence.hpp"
#include "loqsmith/judgement/standards.hpp"
#include "loqsmith/limits/blanks.hpp"

namespace loqsmith {
namespace {

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

void check_standards(SetVerdict& verdict, const MeasuredAnalyte& members,
                     const CalibrationSet& set) {
  const auto& acceptance = members.settings->acceptance.check_standard;
  if (!acceptance) return;
  const std::string& id = members.settings->analyte;
  if (!set.calibration) {
    verdict.checks.push_back(nothing_to_check_against(id));
    return;
  }
  verdict.findings.check_standards =
      judge_check_standards(members, *set.calibration, acceptance->recovery);
  for (CheckRow& row : check_standard_rows(*verdict.findings.check_standards,
                                           *acceptance, id)) {
    verdict.checks.push_back(std::move(row));
  }
}

void add_limit_check(SetVerdict& verdict, LimitCheck check, CheckAction action,
                     const char* word) {
  for (CheckRow& row : check.rows) verdict.checks.push_back(std::move(row));
  if (!check.failed) return;
  AnalyteFindings& findings = verdict.findings;
  (action == CheckAction::Withhold ? findings.withholding : findings.careful)
      .emplace_back(word);
}

void check_limits(SetVerdict& verdict, const AnalyteRules& settings,
                  const CalibrationSet& set) {
  const AcceptanceSettings& acceptance = settings.acceptance;
  if (acceptance.established_limit) {
    add_limit_check(verdict, check_established_limit(settings, set),
                    acceptance.established_limit->action,
                    "established-limit-failed");
  }
  if (acceptance.confirmation) {
    add_limit_check(verdict, check_confirmation(settings, set),
                    acceptance.confirmation->action, "confirmation-failed");
  }
}

// Intervals of weighted fits want to know what scatter is left near zero.
// Between found feet the blanks' spread says nothing of the standards'.
void note_blank_spread(Calibration& calibration, const LimitEvidence& evidence,
                       const LimitSettings& limits) {
  if (evidence.bounds_own) return;
  const Outcome<BlankSample> blanks = usable_blanks(evidence, limits.blanks);
  if (!blanks) return;
  calibration.blanks = BlankSpread{blanks->sd, blanks->degrees_of_freedom()};
}

}  // namespace

CalibrationSet calibrate_set(const MeasuredAnalyte& members,
                             const std::string& name,
                             const std::string& refused) {
  const AnalyteRules& settings = *members.settings;
  OfferedStandards offered = offer_standards(members);
  CalibrationSet set;
  set.set = name;
  set.standards = offered.points;
  set.unmeasured = std::move(offered.unmeasured);
  if (!refused.empty()) {
    set.calibration = NotApplicable{refused};
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
  set.diagnostics = diagnose_calibration(*set.calibration);
  return set;
}

void limit_set(CalibrationSet& set, const LimitEvidence& evidence,
               const MeasuredAnalyte& members) {
  set.limits = compute_limits(evidence, members.settings->limits);
  set.blanks = evidence.blanks;
  set.low_spikes = evidence.spikes;
  note_blank_spread(set.calibration.value(), evidence,
                    members.settings->limits);
  note_mean_internal_standard(members, set.limits);
}

void name_set(std::vector<CheckRow>& rows, const CalibrationSet& set) {
  if (set.alone) return;
  for (CheckRow& row : rows) {
    row.set = set.set;
    row.note = "set " + set.set + (row.note.empty() ? "" : ": " + row.note);
  }
}

SetVerdict check_set(const MeasuredAnalyte& members,
                     const CalibrationSet& set) {
  SetVerdict verdict;
  CalibrationVerdict calibration = check_calibration(*members.settings, set);
  verdict.checks = std::move(calibration.rows);
  find_about_calibration(verdict.findings, set, members.settings->acceptance,
                         calibration.failed);
  check_standards(verdict, members, set);
  check_limits(verdict, *members.settings, set);
  return verdict;
}

}  // namespace loqsmith
