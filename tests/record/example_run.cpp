#include "record/example_run.hpp"

#include <cmath>

#include "loqsmith/base/rounding.hpp"
#include "record/example_night.hpp"

namespace loqsmith::test {

const char* const kHostileMarkup =
    "</td><script>alert(\"1\")</script> & 'well' <img src=x onerror=y>";
const char* const kHostileFormula = "=HYPERLINK(\"http://x.invalid\",\"open\")";

namespace {

std::string three_digits(double value) {
  return round_to_significant(value, 3, RoundingRule::HalfEven);
}

void judge(ResultRow& row, double vial, const GoverningLimits& limits) {
  if (vial > kLevels.back()) {
    row.status = Status::AboveRange;
    row.reported = "> " + three_digits(kLevels.back() * row.dilution);
    row.qualifier = "E";
    row.reasons = {"above-range"};
  } else if (vial < limits.detection) {
    row.status = Status::NotDetected;
    row.reported = "< " + three_digits(*row.detection_limit);
    row.qualifier = "U";
    row.reasons = {"below-detection-limit"};
  } else if (vial < limits.quantitation) {
    row.status = Status::Estimated;
    row.reported = three_digits(*row.result);
    row.qualifier = "J";
    row.reasons = {"below-quantitation-limit"};
  } else {
    row.status = Status::Reportable;
    row.reported = three_digits(*row.result);
  }
}

ResultRow result_of(const Injection& injection, std::size_t which,
                    const Calibration& line, const GoverningLimits& limits) {
  const Compound& compound = kCompounds[which];
  ResultRow row;
  row.injection = injection.number;
  row.sample = injection.sample;
  row.role = injection.role;
  row.analyte = compound.name;
  row.set = "1";
  row.dilution = injection.dilution;
  row.unit = "ug/L";
  if (injection.number == kRefused) {
    row.qualifier = "R";
    row.reasons = {"file-refused"};
    return row;
  }
  const Peak peak =
      peak_of(compound, amount_in(injection, which), injection.number);
  const double vial = (peak.area - line.intercept) / line.slope;
  row.found = peak.found;
  row.retention_minutes = peak.retention_minutes;
  row.response = peak.area;
  row.signal_to_noise = peak.signal_to_noise;
  row.vial_concentration = vial;
  row.result = vial * row.dilution;
  row.calibration_uncertainty = 0.05 * row.dilution;
  row.detection_limit = limits.detection * row.dilution;
  row.quantitation_limit = limits.quantitation * row.dilution;
  row.detection_procedure = limits.detection_procedure;
  row.quantitation_procedure = limits.quantitation_procedure;
  judge(row, vial, limits);
  return row;
}

FigureCurve curve_of(const Compound& compound, double concentration, int number,
                     const std::string& caption) {
  FigureCurve figure;
  figure.analyte = compound.name;
  figure.injection = number;
  figure.caption = caption;
  figure.peak = peak_of(compound, concentration, number);
  const double height = concentration * compound.slope / 0.085;
  for (int i = 0; i < 220; ++i) {
    const double minutes = compound.minutes - 0.45 + 0.0042 * i;
    const double z = (minutes - compound.minutes) / 0.034;
    figure.curve.minutes.push_back(minutes);
    figure.curve.signal.push_back(12 + 0.6 * minutes +
                                  height * std::exp(-0.5 * z * z) +
                                  0.45 * wobble(i, number));
  }
  figure.curve.baseline_start = 12 + 0.6 * figure.peak.start_minutes;
  figure.curve.baseline_end = 12 + 0.6 * figure.peak.end_minutes;
  return figure;
}

AnalyteJudgement judgement_of(std::size_t which,
                              const std::vector<Injection>& rows) {
  const Compound& compound = kCompounds[which];
  AnalyteJudgement analyte;
  analyte.analyte = compound.name;
  analyte.concentration_unit = "ug/L";
  CalibrationSet set;
  set.set = "1";
  set.calibration = calibration_of(compound);
  set.diagnostics = diagnose_calibration(*set.calibration);
  set.limits = limits_of(compound);
  for (const Injection& row : rows) {
    if (row.role == Role::Conditioning || row.role == Role::Standard) continue;
    analyte.results.push_back(
        result_of(row, which, *set.calibration, *set.limits.governing));
  }
  analyte.sets = {set};
  analyte.checks = {
      {"calibration",
       compound.name,
       {},
       0.99987,
       0.99,
       {},
       "",
       true,
       "withhold",
       "",
       "r2"},
      {"check-standard", compound.name, kFirstCheck, 101.3, 85, 115, "percent",
       true, "withhold", "", ""},
      {"check-standard", compound.name, kLastCheck, which == 1 ? 118.2 : 97.4,
       85, 115, "percent", which != 1, "withhold", "", ""}};
  if (which == 1) {
    for (ResultRow& row : analyte.results) {
      if (row.role != Role::Sample || row.injection < 25) continue;
      row.status = Status::Withheld;
      row.reported.clear();
      row.qualifier = "R";
      row.reasons.insert(row.reasons.begin(), "check-standard-failed");
    }
  }
  return analyte;
}

AnalyteJudgement lost_analyte(const std::vector<Injection>& rows) {
  AnalyteJudgement analyte;
  analyte.analyte = "diuron";
  analyte.concentration_unit = "ug/L";
  CalibrationSet set;
  set.set = "1";
  set.calibration = NotApplicable{"no standard contains the analyte"};
  set.limits.rows = {{"blank-deviation",
                      NotApplicable{"no calibration: no slope"}, false, false}};
  set.limits.governing = NotApplicable{"no valid procedure is left"};
  analyte.sets = {set};
  for (const Injection& injection : rows) {
    if (injection.role != Role::Sample) continue;
    ResultRow row;
    row.injection = injection.number;
    row.sample = injection.sample;
    row.analyte = "diuron";
    row.set = "1";
    row.dilution = injection.dilution;
    row.unit = "ug/L";
    row.qualifier = "R";
    row.reasons = {"no-calibration"};
    analyte.results.push_back(row);
  }
  return analyte;
}

void add_peaks(PublishedRun& run) {
  for (const Injection& row : run.sequence.injections) {
    for (std::size_t i = 0; i < kCompounds.size(); ++i) {
      if (row.number == kRefused) {
        run.peaks.push_back({row.number, kCompounds[i].name,
                             NotApplicable{"file-refused: cut short"}});
      } else {
        run.peaks.push_back(
            {row.number, kCompounds[i].name,
             peak_of(kCompounds[i], amount_in(row, i), row.number)});
      }
    }
  }
}

void add_files(PublishedRun& run) {
  run.inputs = {{"sequence.csv", std::string(64, 'a'), 2410, "", {}},
                {"levels.csv", std::string(64, 'b'), 512, "", {}},
                {"method.xml", std::string(64, 'c'), 1804, "", {}}};
  for (const Injection& row : run.sequence.injections) {
    run.inputs.push_back(
        {row.file, std::string(64, 'd'), 81234, "mzML 1.1", {}});
  }
  run.inputs[10].warnings = {"checksum-absent: the file states none"};
  run.problems.push_back(
      {kRefused,
       {"data/inj33.mzML", 91204, 7, "the end of the file after <binary>",
        "2048 intensities", "the file looks cut off: copy it again"}});
}

}  // namespace

PublishedRun example_run() {
  PublishedRun run;
  run.sequence.name = "well-water-0412";
  run.sequence.injections = night_injections();
  run.method = night_method();
  run.run_number = 2;
  run.program_version = "0.1.0";
  run.build = "g++ 12.2, Release";
  run.processor_class = "x86-64 avx2 fma";
  run.begun = "2026-04-12T22:10:04.120Z";
  run.finished = "2026-04-12T22:10:05.871Z";
  run.ledger_head = "12:" + std::string(64, 'e');
  add_files(run);
  add_peaks(run);
  WindowTemplate window{0.11,         0.14,
                        0.08,         false,
                        {14, 15, 16}, {{14, 3.42}, {15, 3.421}, {16, 3.4205}}};
  run.targets = {{"simazine", window},
                 {"diuron", NotApplicable{"no peak fit to teach"}}};
  for (std::size_t i = 0; i < kCompounds.size(); ++i) {
    run.analytes.push_back(judgement_of(i, run.sequence.injections));
    run.curves.push_back(
        curve_of(kCompounds[i], 0.5, kFirstStandard, "lowest standard"));
    run.curves.push_back(curve_of(kCompounds[i], 0, 9, "blank"));
  }
  run.analytes.push_back(lost_analyte(run.sequence.injections));
  run.sequence_checks = {
      {"unlisted-file",
       "",
       {},
       {},
       {},
       {},
       "",
       false,
       "flag",
       "",
       "data/extra.mzML"},
      {"order-differs", "", {}, {}, {}, {}, "", true, "", "", ""},
      {"name-differs", "", {}, {}, {}, {}, "", true, "", "", ""}};
  return run;
}

}  // namespace loqsmith::test