#include "loqsmith/record/read_published.hpp"

#include <nlohmann/json.hpp>

#include "loqsmith/base/files.hpp"
#include "loqsmith/base/input_error.hpp"
#include "loqsmith/record/read_published_tables.hpp"

namespace loqsmith {
namespace {

using Json = nlohmann::json;

std::optional<double> number(const Json& json, const char* key) {
  const Json& member = json.at(key);
  if (member.is_null()) return std::nullopt;
  return member.get<double>();
}

std::string text(const Json& json, const char* key) {
  return json.at(key).get<std::string>();
}

// Why there is nothing; empty where there is something.
std::string not_applicable(const Json& json) {
  return json.value("not_applicable", std::string{});
}

ResultDerivation derivation_from(const Json& json) {
  ResultDerivation told;
  told.file = text(json, "file");
  told.file_run = text(json, "file_run");
  told.trace = text(json, "trace");
  told.expected_minutes = json.at("expected_minutes");
  told.tolerance_minutes = json.at("tolerance_minutes");
  told.measure = text(json, "measure");
  told.internal_standard = text(json, "internal_standard");
  told.internal_standard_dilution = json.at("internal_standard_dilution");
  told.divisor = json.at("divisor");
  told.divisor_is_mean = json.at("divisor_is_mean");
  told.dilution = json.at("dilution");
  told.final_volume = number(json, "final_volume");
  told.sample_amount = number(json, "sample_amount");
  told.unit_factor = json.at("unit_factor");
  told.sample_factor = json.at("sample_factor");
  told.decision_threshold = number(json, "decision_threshold");
  told.decides_at_critical_value = json.at("decides_at_critical_value");
  told.range_end = number(json, "range_end");
  told.rule = text(json, "rule");
  told.printed = text(json, "printed");
  told.printed_value = number(json, "printed_value");
  told.printed_uncertainty = number(json, "printed_uncertainty");
  told.reporting_limit = number(json, "reporting_limit");
  told.rounding = text(json, "rounding");
  return told;
}

std::optional<Grade> grade_from(const std::string& name) {
  for (const Grade grade : {Grade::Valid, Grade::Note, Grade::Caution,
                            Grade::NotValid, Grade::NotApplicable}) {
    if (grade_name(grade) == name) return grade;
  }
  return std::nullopt;
}

LimitEstimate estimate_from(const Json& json) {
  LimitEstimate estimate;
  estimate.critical_value = number(json, "critical_value");
  estimate.detection = number(json, "detection_limit");
  estimate.quantitation = number(json, "quantitation_limit");
  for (const Json& term : json.at("terms")) {
    estimate.terms.push_back(
        {text(term, "name"), term.at("value"), text(term, "unit")});
  }
  for (const Json& finding : json.at("findings")) {
    estimate.findings.push_back(
        {grade_from(text(finding, "grade")).value_or(Grade::Note),
         text(finding, "word"), text(finding, "text")});
  }
  return estimate;
}

LimitRow limit_row_from(const Json& json) {
  LimitRow row;
  row.procedure = text(json, "procedure");
  const std::string governs = text(json, "governing");
  row.governs_detection = governs == "both" || governs == "detection";
  row.governs_quantitation = governs == "both" || governs == "quantitation";
  const std::string absent = not_applicable(json);
  if (absent.empty()) {
    row.estimate = estimate_from(json);
  } else {
    row.estimate = NotApplicable{absent};
  }
  return row;
}

Outcome<GoverningLimits> governing_from(const Json& json) {
  const std::string absent = not_applicable(json);
  if (!absent.empty()) return NotApplicable{absent};
  GoverningLimits governing;
  governing.detection = json.at("detection_limit");
  governing.quantitation = json.at("quantitation_limit");
  governing.decision_threshold = json.at("decision_threshold");
  governing.detection_procedure = text(json, "detection_procedure");
  governing.quantitation_procedure = text(json, "quantitation_procedure");
  for (const Json& note : json.at("notes")) governing.notes.push_back(note);
  return governing;
}

void take_curve(PublishedSet& set, const Json& json) {
  set.not_applicable = not_applicable(json);
  if (!set.not_applicable.empty()) return;
  set.model = text(json, "model");
  set.weight = text(json, "weight");
  set.intercept_is = text(json, "intercept_is");
  set.intercept = json.at("intercept");
  set.slope = json.at("slope");
  set.curvature = json.at("curvature");
  set.lowest = number(json, "accepted_lowest");
  set.highest = number(json, "accepted_highest");
  for (const Json& level : json.at("levels")) {
    const std::size_t points = level.at("points");
    set.points += points;
    set.levels += points > 0 ? 1U : 0U;
  }
}

PublishedSet set_from(const Json& json) {
  PublishedSet set;
  set.set = text(json, "set");
  take_curve(set, json.at("calibration"));
  if (json.contains("standard_addition")) {
    set.addition = number(json.at("standard_addition"), "amount");
  }
  for (const Json& row : json.at("limits").at("procedures")) {
    set.limits.rows.push_back(limit_row_from(row));
  }
  set.limits.governing = governing_from(json.at("limits").at("governing"));
  return set;
}

PublishedAnalyte analyte_from(const Json& json, const ResultTable& results) {
  PublishedAnalyte analyte;
  analyte.analyte = text(json, "analyte");
  analyte.concentration_unit = text(json, "concentration_unit");
  for (const Json& set : json.at("sets")) {
    analyte.sets.push_back(set_from(set));
  }
  for (const Json& decision : json.at("decisions")) {
    const int injection = decision.at("injection");
    PublishedResult result = results.at({injection, analyte.analyte});
    result.derivation = derivation_from(decision.at("derivation"));
    analyte.results.push_back(std::move(result));
  }
  return analyte;
}

void take_inputs(PublishedRecord& record, const Json& json) {
  for (const Json& input : json.at("inputs")) {
    if (input.at("sha256").is_null()) continue;
    record.hashes[text(input, "path")] = text(input, "sha256");
  }
  for (const Json& window : json.at("templates")) {
    PublishedWindow& found = record.windows[text(window, "target")];
    found.not_applicable = not_applicable(window);
    if (!found.not_applicable.empty()) continue;
    found.left = window.at("left_minutes");
    found.right = window.at("right_minutes");
  }
}

PublishedRecord record_from(const Json& json, const ResultTable& results) {
  PublishedRecord record;
  record.sequence = text(json.at("sequence"), "name");
  record.run = json.at("run");
  record.program_version = text(json.at("program"), "version");
  record.method = text(json.at("method"), "id");
  record.revision = text(json.at("method"), "revision");
  take_inputs(record, json);
  for (const Json& analyte : json.at("analytes")) {
    record.analytes.push_back(analyte_from(analyte, results));
  }
  return record;
}

[[noreturn]] void refuse(const std::filesystem::path& file,
                         const std::string& why) {
  throw InputError(InputProblem{.file = file.string(),
                                .found = why,
                                .expected = "a record with derivations",
                                .mend = "process the sequence again with this "
                                        "version"});
}

}  // namespace

const PublishedSet* PublishedAnalyte::set_named(const std::string& name) const {
  for (const PublishedSet& one : sets) {
    if (one.set == name) return &one;
  }
  return nullptr;
}

const PublishedPeak* PublishedRecord::peak(int injection,
                                           const std::string& target) const {
  const std::string number = std::to_string(injection);
  for (const PublishedPeak& one : peaks) {
    if (one.at("injection") == number && one.at("analyte") == target) {
      return &one;
    }
  }
  return nullptr;
}

PublishedRecord read_published(const std::filesystem::path& folder) {
  const std::filesystem::path file = folder / "record.json";
  const ResultTable results = read_result_table(folder / "results.csv");
  try {
    PublishedRecord record = record_from(Json::parse(read_file(file)), results);
    record.peaks = read_peaks_table(folder / "peaks.csv");
    record.checks = read_checks_table(folder / "checks.csv");
    return record;
  } catch (const Json::exception& error) {
    refuse(file, error.what());
  } catch (const std::out_of_range&) {
    refuse(file, "a decision that results.csv does not hold");
  }
}

}  // namespace loqsmith
