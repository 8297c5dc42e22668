#include "loqsmith/record/result_derivation.hpp"

#include <algorithm>

#include "loqsmith/chromatogram/trace_selector.hpp"
#include "loqsmith/judgement/reported_text.hpp"
#include "loqsmith/judgement/sample_units.hpp"

namespace loqsmith {
namespace {

std::string measure_word(ResponseKind measure) {
  switch (measure) {
    case ResponseKind::Area:
      return "area";
    case ResponseKind::Height:
      return "height";
    case ResponseKind::Template:
      return "template";
  }
  return {};
}

std::string printed_word(ReportedValue::Kind kind) {
  switch (kind) {
    case ReportedValue::Kind::Number:
      return "number";
    case ReportedValue::Kind::Below:
      return "below";
    case ReportedValue::Kind::Above:
      return "above";
    case ReportedValue::Kind::Withheld:
      return "withheld";
  }
  return {};
}

std::string rounding_words(const ReportedValue& value,
                           const ReportingSettings& settings) {
  std::string words =
      settings.decimals
          ? std::to_string(*settings.decimals) + " decimals"
          : std::to_string(settings.significant_digits) + " significant digits";
  if (value.uncertainty) words = "to the second digit of the uncertainty";
  switch (value.kind) {
    case ReportedValue::Kind::Number:
      return words + (settings.rounding == ReportingSettings::Rounding::HalfEven
                          ? ", half to even"
                          : ", half up");
    case ReportedValue::Kind::Below:
      return words + ", a limit always up";
    case ReportedValue::Kind::Above:
      return words + ", the end of the range always down";
    case ReportedValue::Kind::Withheld:
      return {};
  }
  return {};
}

const Injection* injection_of(const PublishedRun& run, int number) {
  for (const Injection& one : run.sequence.injections) {
    if (one.number == number) return &one;
  }
  return nullptr;
}

const AnalyteSettings* settings_of(const PublishedRun& run,
                                   const std::string& analyte) {
  for (const AnalyteSettings& one : run.method.analytes) {
    if (one.target.id == analyte) return &one;
  }
  return nullptr;
}

void tell_preparation(ResultDerivation& told, const Injection& injection,
                      const UnitSettings& units) {
  told.dilution = injection.dilution;
  told.sample_factor = sample_factor(injection, units);
  if (stays_in_the_vial(injection, units)) return;
  told.unit_factor = units.factor;
  if (!injection.final_volume || !injection.sample_amount) return;
  told.final_volume = injection.final_volume;
  told.sample_amount = injection.sample_amount;
}

void tell_measuring(ResultDerivation& told, const PublishedRun& run,
                    const AnalyteSettings& settings, const ResultRow& row) {
  const TargetSettings& target = settings.target;
  told.trace = target.trace;
  if (const TraceSelector* selector = run.method.trace(target.trace)) {
    told.trace += " (" + describe(*selector) + ")";
  }
  told.expected_minutes = target.retention_minutes;
  told.tolerance_minutes = target.window_minutes;
  told.measure = measure_word(settings.response);
  told.internal_standard = settings.internal_standard;
  told.divisor = row.response_divisor;
  told.divisor_is_mean =
      std::find(row.reasons.begin(), row.reasons.end(),
                "mean-internal-standard") != row.reasons.end();
}

void tell_limits(ResultDerivation& told, const CalibrationSet& set) {
  if (!set.limits.governing) return;
  const GoverningLimits& governing = *set.limits.governing;
  told.decision_threshold =
      in_sample(governing.decision_threshold, told.sample_factor);
  told.decides_at_critical_value =
      governing.decision_threshold != governing.detection;
}

void tell_text(ResultDerivation& told, const ResultRow& row,
               const ReportingSettings& settings) {
  const ReportedValue value = reported_value(
      row.status,
      {row.result, row.detection_limit, row.quantitation_limit, row.range_end},
      settings);
  told.printed = printed_word(value.kind);
  told.reporting_limit = settings.reporting_limit;
  told.rounding = rounding_words(value, settings);
  if (value.kind == ReportedValue::Kind::Withheld) return;
  told.printed_value = value.value;
  told.printed_uncertainty = value.uncertainty;
}

}  // namespace

ResultDerivation derivation_of(const PublishedRun& run,
                               const CalibrationSet& set,
                               const ResultRow& row) {
  ResultDerivation told;
  told.rule = row.rule;
  told.range_end = row.range_end;
  const Injection* injection = injection_of(run, row.injection);
  const AnalyteSettings* settings = settings_of(run, row.analyte);
  if (injection == nullptr || settings == nullptr) return told;
  told.file = injection->file;
  told.file_run = injection->run;
  told.internal_standard_dilution = injection->internal_standard_dilution;
  tell_measuring(told, run, *settings, row);
  tell_preparation(told, *injection, run.method.units);
  tell_limits(told, set);
  tell_text(told, row,
            reporting_of(*injection, run.method.units, settings->reporting));
  return told;
}

void record_derivation(JsonWriter& json, const ResultDerivation& told) {
  json.begin_object("derivation");
  json.member("file", told.file);
  json.member("file_run", told.file_run);
  json.member("trace", told.trace);
  json.member("expected_minutes", told.expected_minutes);
  json.member("tolerance_minutes", told.tolerance_minutes);
  json.member("measure", told.measure);
  json.member("internal_standard", told.internal_standard);
  json.member("internal_standard_dilution", told.internal_standard_dilution);
  json.member("divisor", told.divisor);
  json.member("divisor_is_mean", told.divisor_is_mean);
  json.member("dilution", told.dilution);
  json.member("final_volume", told.final_volume);
  json.member("sample_amount", told.sample_amount);
  json.member("unit_factor", told.unit_factor);
  json.member("sample_factor", told.sample_factor);
  json.member("decision_threshold", told.decision_threshold);
  json.member("decides_at_critical_value", told.decides_at_critical_value);
  json.member("range_end", told.range_end);
  json.member("rule", told.rule);
  json.member("printed", told.printed);
  json.member("printed_value", told.printed_value);
  json.member("printed_uncertainty", told.printed_uncertainty);
  json.member("reporting_limit", told.reporting_limit);
  json.member("rounding", told.rounding);
  json.end_object();
}

}  // namespace loqsmith
