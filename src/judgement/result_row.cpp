#include "loqsmith/judgement/result_row.hpp"

#include <algorithm>

#include "loqsmith/calibration/inverse.hpp"
#include "loqsmith/judgement/calibration_sets.hpp"
#include "loqsmith/judgement/reasons.hpp"
#include "loqsmith/judgement/reported_text.hpp"
#include "loqsmith/judgement/sample_units.hpp"
#include "loqsmith/judgement/verdict.hpp"

namespace loqsmith {
namespace {

ResultRow describe_injection(const InjectionResponse& one,
                             const MeasuredAnalyte& analyte,
                             const CalibrationSet& set) {
  ResultRow row;
  row.injection = one.injection->number;
  row.sample = one.injection->sample;
  row.role = one.injection->role;
  row.analyte = analyte.settings->analyte;
  row.set = set.set;
  row.dilution = one.injection->dilution;
  row.unit = result_unit(*one.injection, *analyte.units);
  if (one.response) {
    row.response = one.response->value;
    row.response_divisor = one.response->divisor;
  }
  if (!one.peak) return row;
  row.found = one.peak->found;
  // Without a peak the place is only the expected one: nothing was retained.
  if (row.found) row.retention_minutes = one.peak->retention_minutes;
  row.signal_to_noise = one.peak->signal_to_noise;
  return row;
}

void set_limits(ResultRow& row, const Outcome<GoverningLimits>& governing,
                double factor) {
  if (!governing) return;
  row.detection_limit = in_sample(governing->detection, factor);
  row.quantitation_limit = in_sample(governing->quantitation, factor);
  row.detection_procedure = governing->detection_procedure;
  row.quantitation_procedure = governing->quantitation_procedure;
}

Outcome<InversePrediction> in_the_vial(double response,
                                       const CalibrationSet& set) {
  if (set.addition) {
    InversePrediction found;
    found.concentration = set.addition->amount;
    found.expanded_uncertainty = set.addition->expanded_uncertainty;
    return found;
  }
  return concentration_from_response(*set.calibration, response);
}

/// Fills in the concentrations; true where the response has one.
bool set_concentration(ResultRow& row, const CalibrationSet& set,
                       double factor) {
  const Outcome<InversePrediction> found = in_the_vial(*row.response, set);
  if (!found) return false;
  row.vial_concentration = found->concentration;
  row.result = in_sample(found->concentration, factor);
  if (found->expanded_uncertainty) {
    row.calibration_uncertainty =
        in_sample(*found->expanded_uncertainty, factor);
  }
  if (found->interval) {
    row.calibration_interval = {in_sample(found->interval->lower, factor),
                                in_sample(found->interval->upper, factor)};
  }
  return true;
}

// Limits are compared in the sample, so that the table bears the status out;
// the range in the vial, where the curve ends.
Placing place_by_concentration(const ResultRow& row, double threshold,
                               double highest) {
  Placing placing;
  placing.below_threshold = *row.result < threshold;
  placing.below_quantitation =
      !placing.below_threshold && *row.result < *row.quantitation_limit;
  placing.above_range = *row.vial_concentration > highest;
  return placing;
}

std::optional<Placing> place_by_response(double response,
                                         const Calibration& calibration,
                                         double vial_threshold,
                                         double highest) {
  Placing placing;
  placing.above_range =
      response > response_from_concentration(calibration, highest);
  placing.below_threshold =
      response < response_from_concentration(calibration, vial_threshold);
  if (placing.above_range == placing.below_threshold) return std::nullopt;
  return placing;
}

// Where the responses of a curve end, as a concentration in the vial.
double end_of_range(const CalibrationSet& set) {
  const double highest = *set.calibration->accepted_highest;
  if (!set.addition) return highest;
  return highest + std::max(0.0, set.addition->amount);
}

void place(VerdictFacts& facts, ResultRow& row, const CalibrationSet& set,
           double factor) {
  if (!row.response || !set.calibration) return;
  const Calibration& calibration = *set.calibration;
  const bool has_number = set_concentration(row, set, factor);
  if (!set.limits.governing || !calibration.accepted_highest) return;
  const double threshold = set.limits.governing->decision_threshold;
  const double highest = end_of_range(set);
  if (has_number) {
    facts.placing =
        place_by_concentration(row, in_sample(threshold, factor), highest);
    return;
  }
  facts.placing =
      place_by_response(*row.response, calibration, threshold, highest);
  if (!facts.placing) facts.withholding.emplace_back("no-concentration");
  facts.careful.emplace_back("beyond-curve");
}

void govern(VerdictFacts& facts, const InjectionResponse& one,
            const MeasuredAnalyte& analyte, const AnalyteFindings& findings) {
  const auto& acceptance = analyte.settings->acceptance.check_standard;
  if (!acceptance || !findings.check_standards) return;
  const Governed governed = governed_by(
      *findings.check_standards, acceptance->governs, one.injection->number);
  if (governed.no_closing) facts.careful.emplace_back("no-closing-check");
  if (!governed.failed) return;
  const bool withholds = acceptance->action == CheckAction::Withhold;
  (withholds ? facts.withholding : facts.careful)
      .emplace_back("check-standard-failed");
}

void bracket(VerdictFacts& facts, const Injection& injection,
             const AnalyteFindings& findings) {
  if (!findings.bracket || !ends_a_block(injection.role)) return;
  if (injection.number < findings.bracket->opens) {
    facts.careful.emplace_back("no-opening-standards");
  }
  if (injection.number > findings.bracket->closes) {
    facts.careful.emplace_back("no-closing-standards");
  }
}

void affect(VerdictFacts& facts, const std::vector<CheckEffect>& effects,
            int injection) {
  for (const CheckEffect& effect : effects) {
    if (effect.injection != injection) continue;
    const bool withholds = effect.action == CheckAction::Withhold;
    (withholds ? facts.withholding : facts.careful).push_back(effect.word);
  }
}

VerdictFacts facts_before_placing(const InjectionResponse& one,
                                  const MeasuredAnalyte& analyte,
                                  const CalibrationSet& set,
                                  const AnalyteFindings& findings) {
  VerdictFacts facts;
  facts.withholding = findings.withholding;
  facts.careful = findings.careful;
  facts.identified = one.peak && one.peak->identified();
  if (one.response) {
    facts.careful.insert(facts.careful.end(), one.response->reasons.begin(),
                         one.response->reasons.end());
  } else {
    facts.withholding.push_back(reason_word(one.response.reason()));
  }
  const Outcome<GoverningLimits>& governing = set.limits.governing;
  facts.decides_at_critical_value =
      governing && governing->decision_threshold != governing->detection;
  govern(facts, one, analyte, findings);
  bracket(facts, *one.injection, findings);
  affect(facts, findings.effects, one.injection->number);
  return facts;
}

// The number stays. A status that nothing can be printed for (a number where
// there is none) is not taken.
void override_status(ResultRow& row, Status wanted,
                     const ReportedNumbers& numbers,
                     const ReportingSettings& reporting) {
  const ReportedValue value = reported_value(wanted, numbers, reporting);
  const bool possible =
      wanted == Status::Withheld || value.kind != ReportedValue::Kind::Withheld;
  row.reasons.insert(row.reasons.begin(),
                     possible ? "status-overridden" : "override-not-possible");
  if (!possible) return;
  row.status = wanted;
  row.rule = "a person chose the status, in amendments.csv";
  row.qualifier = qualifier_letter(wanted, reporting);
  row.reported = reported_text(wanted, numbers, reporting);
}

}  // namespace

bool is_quantified(Role role) {
  return role != Role::Conditioning && role != Role::Standard &&
         role != Role::AddedStandard;
}

ResultRow judge_result(const InjectionResponse& one,
                       const MeasuredAnalyte& analyte,
                       const CalibrationSet& set,
                       const AnalyteFindings& findings) {
  const double factor = sample_factor(*one.injection, *analyte.units);
  ResultRow row = describe_injection(one, analyte, set);
  set_limits(row, set.limits.governing, factor);
  VerdictFacts facts = facts_before_placing(one, analyte, set, findings);
  place(facts, row, set, factor);

  Verdict verdict = reach_verdict(facts);
  row.qualifier = qualifier_letter(verdict, analyte.settings->reporting);
  row.status = verdict.status;
  row.reasons = std::move(verdict.reasons);
  row.rule = verdict.rule;
  if (set.calibration && set.calibration->accepted_highest) {
    row.range_end = in_sample(end_of_range(set), factor);
  }
  const ReportedNumbers numbers{row.result, row.detection_limit,
                                row.quantitation_limit, row.range_end};
  row.reported = reported_text(row.status, numbers,
                               reporting_of(*one.injection, *analyte.units,
                                            analyte.settings->reporting));
  const auto& statuses = analyte.settings->decisions.statuses;
  const auto chosen = statuses.find(row.injection);
  if (chosen != statuses.end()) {
    override_status(row, chosen->second, numbers,
                    reporting_of(*one.injection, *analyte.units,
                                 analyte.settings->reporting));
  }
  return row;
}

}  // namespace loqsmith
