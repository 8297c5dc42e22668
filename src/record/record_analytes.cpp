#include "loqsmith/record/record_sections.hpp"
#include "loqsmith/record/result_derivation.hpp"
#include "loqsmith/record/words.hpp"

namespace loqsmith {
namespace {

void record_covariance(JsonWriter& json, const Calibration& line) {
  json.begin_array("covariance");
  for (const auto& row : line.covariance) {
    json.begin_array();
    for (const double entry : row) json.value(entry);
    json.end_array();
  }
  json.end_array();
}

void record_levels(JsonWriter& json, const Calibration& line) {
  json.begin_array("levels");
  for (const CalibrationLevel& level : line.levels) {
    json.begin_object();
    json.member("concentration", level.concentration);
    member_count(json, "points", level.points);
    json.member("mean_deviation_percent", level.mean_deviation_percent);
    json.member("accepted", level.accepted);
    json.end_object();
  }
  json.end_array();
}

void record_line(JsonWriter& json, const Calibration& line) {
  json.member("model", model_word(line.settings.model));
  json.member("weight", weight_word(line.settings.weight));
  json.member("intercept_is", intercept_word(line.settings.intercept));
  json.member("intercept", line.intercept);
  json.member("slope", line.slope);
  json.member("curvature", line.curvature);
  json.member("residual_sd", line.residual_sd);
  json.member("r2", line.r2);
  json.member("relative_standard_error", line.relative_standard_error);
  member_whole(json, "degrees_of_freedom", line.degrees_of_freedom);
  record_covariance(json, line);
  json.member("lowest", line.lowest);
  json.member("highest", line.highest);
  json.member("accepted_lowest", line.accepted_lowest);
  json.member("accepted_highest", line.accepted_highest);
  record_levels(json, line);
  if (line.variance) {
    json.member("variance_additive", line.variance->additive);
    json.member("variance_proportional", line.variance->proportional);
  }
  if (line.blanks) json.member("blank_sd", line.blanks->sd);
  member_words(json, "notes", line.notes);
}

void record_calibration(JsonWriter& json, const Outcome<Calibration>& fitted) {
  json.begin_object("calibration");
  if (fitted) {
    record_line(json, *fitted);
  } else {
    json.member("not_applicable", fitted.reason());
  }
  json.end_object();
}

void record_addition(JsonWriter& json, const StandardAddition& found) {
  json.begin_object("standard_addition");
  json.member("amount", found.amount);
  json.member("standard_error", found.standard_error);
  json.member("propagated_half_width", found.propagated_half_width);
  if (found.interval) {
    json.member("lower", found.interval->lower);
    json.member("upper", found.interval->upper);
  } else {
    json.member("no_interval", found.interval.reason());
  }
  json.end_object();
}

void record_estimate(JsonWriter& json, const LimitEstimate& estimate) {
  json.member("critical_value", estimate.critical_value);
  json.member("detection_limit", estimate.detection);
  json.member("quantitation_limit", estimate.quantitation);
  json.member("detection_lower", estimate.detection_lower);
  json.member("detection_upper", estimate.detection_upper);
  json.member("quantitation_lower", estimate.quantitation_lower);
  json.member("quantitation_upper", estimate.quantitation_upper);
  json.member("degrees_of_freedom", estimate.degrees_of_freedom);
  member_count(json, "n", estimate.n);
  json.begin_array("terms");
  for (const LimitTerm& term : estimate.terms) {
    json.begin_object();
    json.member("name", term.name);
    json.member("value", term.value);
    json.member("unit", term.unit);
    json.end_object();
  }
  json.end_array();
  json.begin_array("findings");
  for (const LimitFinding& finding : estimate.findings) {
    json.begin_object();
    json.member("grade", grade_name(finding.grade));
    json.member("word", finding.word);
    json.member("text", finding.text);
    json.end_object();
  }
  json.end_array();
}

void record_governing(JsonWriter& json,
                      const Outcome<GoverningLimits>& governing) {
  json.begin_object("governing");
  if (governing) {
    json.member("detection_limit", governing->detection);
    json.member("quantitation_limit", governing->quantitation);
    json.member("decision_threshold", governing->decision_threshold);
    json.member("detection_procedure", governing->detection_procedure);
    json.member("quantitation_procedure", governing->quantitation_procedure);
    member_words(json, "notes", governing->notes);
  } else {
    json.member("not_applicable", governing.reason());
  }
  json.end_object();
}

void record_limits(JsonWriter& json, const LimitsOfAnalyte& limits) {
  json.begin_object("limits");
  record_governing(json, limits.governing);
  json.begin_array("procedures");
  for (const LimitRow& row : limits.rows) {
    json.begin_object();
    json.member("procedure", row.procedure);
    json.member("governing", governing_word(row));
    json.member("grade", grade_name(row.estimate ? row.estimate->grade()
                                                 : Grade::NotApplicable));
    if (row.estimate) {
      record_estimate(json, *row.estimate);
    } else {
      json.member("not_applicable", row.estimate.reason());
    }
    json.end_object();
  }
  json.end_array();
  json.end_object();
}

// The decision and what it was made from; the peak itself is in peaks.csv.
void record_decision(JsonWriter& json, const PublishedRun& run,
                     const AnalyteJudgement& analyte, const ResultRow& row) {
  json.begin_object();
  member_whole(json, "injection", row.injection);
  json.member("sample", row.sample);
  json.member("role", role_name(row.role));
  json.member("set", row.set);
  json.member("result", row.result);
  json.member("unit", row.unit);
  if (row.calibration_interval) {
    json.member("calibration_lower", row.calibration_interval->lower);
    json.member("calibration_upper", row.calibration_interval->upper);
  }
  json.member("detection_limit", row.detection_limit);
  json.member("quantitation_limit", row.quantitation_limit);
  json.member("status", status_name(row.status));
  json.member("reported", row.reported);
  json.member("qualifier", row.qualifier);
  member_words(json, "reasons", row.reasons);
  for (const CalibrationSet& set : analyte.sets) {
    if (set.set != row.set) continue;
    record_derivation(json, derivation_of(run, set, row));
    break;
  }
  if (row.automatic) {
    json.member("automatic_result", row.automatic->result);
    json.member("automatic_status", status_name(row.automatic->status));
    json.member("automatic_reported", row.automatic->reported);
  }
  json.end_object();
}

void record_analyte(JsonWriter& json, const PublishedRun& run,
                    const AnalyteJudgement& analyte) {
  json.begin_object();
  json.member("analyte", analyte.analyte);
  json.member("concentration_unit", analyte.concentration_unit);
  json.begin_array("sets");
  for (const CalibrationSet& set : analyte.sets) {
    json.begin_object();
    json.member("set", set.set);
    json.member("accepted", calibration_accepted(analyte, set));
    record_calibration(json, set.calibration);
    record_diagnostics(json, set.diagnostics);
    if (set.addition) record_addition(json, *set.addition);
    record_limits(json, set.limits);
    json.end_object();
  }
  json.end_array();
  json.begin_array("decisions");
  for (const ResultRow& row : analyte.results) {
    record_decision(json, run, analyte, row);
  }
  json.end_array();
  json.end_object();
}

}  // namespace

void record_analytes(JsonWriter& json, const PublishedRun& run) {
  json.begin_array("analytes");
  for (const AnalyteJudgement& analyte : run.analytes) {
    record_analyte(json, run, analyte);
  }
  json.end_array();
}

}  // namespace loqsmith
