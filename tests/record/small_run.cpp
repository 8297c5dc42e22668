#include "record/example_run.hpp"

namespace loqsmith::test {
namespace {

Injection injection(int number, const std::string& sample, Role role,
                    const std::string& level) {
  Injection row;
  row.number = number;
  row.file = "data/inj" + std::to_string(number) + ".mzML";
  row.sample = sample;
  row.role = role;
  row.level = level;
  return row;
}

Method small_method() {
  Method method;
  method.id = "small";
  method.revision = "2";
  method.title = "Small method";
  method.units.concentration = "ug/L";
  method.units.result = "mg/kg";
  method.units.factor = 0.5;
  AnalyteSettings analyte;
  analyte.target.id = "toluene";
  analyte.target.trace = "uv";
  analyte.target.retention_minutes = 2.5;
  method.analytes.push_back(analyte);
  method.defaults_used.push_back({"integration", "baseline", "valley"});
  return method;
}

PeakRow standard_peak() {
  Peak peak;
  peak.found = true;
  peak.retention_minutes = 2.5;
  peak.start_minutes = 2.25;
  peak.end_minutes = 2.75;
  peak.area = 10.25;
  peak.height = 100;
  peak.width_half_minutes = 0.1;
  peak.tailing = 1.125;
  peak.signal_to_noise = 40;
  peak.noise = 5;
  peak.noise_source = "blank 2";
  peak.overlap = "drop";
  peak.reasons = {"overlapped", "noise-stretch-short"};
  return {1, "toluene", peak};
}

PeakRow blank_peak() {
  Peak peak;
  peak.retention_minutes = 2.5;
  peak.start_minutes = 2.25;
  peak.end_minutes = 2.75;
  peak.area = -0.0625;
  peak.height = -1;
  return {2, "toluene", peak};
}

LimitRow blank_limit() {
  LimitEstimate estimate;
  estimate.detection = 0.3;
  estimate.quantitation = 1;
  estimate.detection_lower = 0.2;
  estimate.detection_upper = 0.6;
  estimate.degrees_of_freedom = 6;
  estimate.n = 7;
  estimate.findings.push_back(
      {Grade::Caution, "drifting", "blanks rise by 3 %, from first to last"});
  estimate.terms.push_back({"slope", 4, "response/concentration"});
  return {"blank-deviation", estimate, true, false};
}

CalibrationSet small_set() {
  CalibrationSet set;
  set.set = "1";
  Calibration line;
  line.intercept = -0.5;
  line.slope = 4;
  line.residual_sd = 0.25;
  line.r2 = 0.9995;
  line.relative_standard_error = 2.5;
  line.degrees_of_freedom = 3;
  StandardPoint used{1, "L1", 2, 10.25, true, "", 1, 2.6875, 34.375};
  StandardPoint left_out{9, "L2", 5, 99, false, "saturated", 0, {}, {}};
  line.points = {used, left_out};
  line.levels = {{2, 1, 34.375, true}, {5, 0, {}, false}};
  line.lowest = 2;
  line.highest = 5;
  line.accepted_lowest = 2;
  line.accepted_highest = 2;
  line.notes = {"zero-level-unweighted-only"};
  set.calibration = line;
  set.limits.rows = {
      blank_limit(),
      {"spike-replicates", NotApplicable{"no low spikes in the sequence"},
       false, true}};
  GoverningLimits governing;
  governing.detection = 0.3;
  governing.quantitation = 2;
  governing.decision_threshold = 0.3;
  governing.detection_procedure = "blank-deviation";
  governing.quantitation_procedure = "lowest-standard";
  set.limits.governing = governing;
  return set;
}

ResultRow sample_row() {
  ResultRow row;
  row.injection = 3;
  row.sample = "=1+1, \"well\"";
  row.analyte = "toluene";
  row.set = "1";
  row.found = true;
  row.retention_minutes = 2.5;
  row.response = 6;
  row.vial_concentration = 1.625;
  row.dilution = 10;
  row.result = 8.125;
  row.unit = "mg/kg";
  row.calibration_uncertainty = 0.75;
  row.detection_limit = 1.5;
  row.quantitation_limit = 10;
  row.detection_procedure = "blank-deviation";
  row.quantitation_procedure = "lowest-standard";
  row.status = Status::Estimated;
  row.reported = "8.12";
  row.qualifier = "J";
  row.reasons = {"below-quantitation-limit", "overlapped"};
  return row;
}

ResultRow blank_row() {
  ResultRow row;
  row.injection = 2;
  row.sample = "blank";
  row.role = Role::SolventBlank;
  row.analyte = "toluene";
  row.set = "1";
  row.unit = "mg/kg";
  row.status = Status::Withheld;
  row.qualifier = "R";
  row.reasons = {"file-refused"};
  return row;
}

}  // namespace

PublishedRun small_run() {
  PublishedRun run;
  run.sequence.name = "small";
  run.sequence.injections = {injection(1, "std 1", Role::Standard, "L1"),
                             injection(2, "blank", Role::SolventBlank, ""),
                             injection(3, "=1+1, \"well\"", Role::Sample, ""),
                             injection(4, "lost", Role::Sample, "")};
  run.method = small_method();
  run.run_number = 1;
  run.peaks = {standard_peak(),
               blank_peak(),
               {3, "toluene", NotApplicable{"too-few-points: 3 points"}}};
  AnalyteJudgement analyte;
  analyte.analyte = "toluene";
  analyte.concentration_unit = "ug/L";
  analyte.sets = {small_set()};
  // By analyte; the table has them in run order.
  analyte.results = {sample_row(), blank_row()};
  analyte.checks = {{"check-standard", "toluene", 7, 93.5, 85, 115, "percent",
                     true, "withhold", "4 to 9", ""}};
  run.analytes = {analyte};
  run.sequence_checks = {{"unlisted-file",
                          "",
                          {},
                          {},
                          {},
                          {},
                          "",
                          false,
                          "flag",
                          "",
                          "data/extra, 1.mzML"},
                         {"second-source",
                          "",
                          {},
                          {},
                          {},
                          {},
                          "",
                          {},
                          "",
                          "",
                          "not in the method"}};
  return run;
}

}  // namespace loqsmith::test
