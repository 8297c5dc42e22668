#include "record/example_run.hpp"

#include <array>
#include <cmath>
#include <cstdint>

#include "loqsmith/base/rounding.hpp"

namespace loqsmith::test {

const char* const kHostileMarkup =
    "</td><script>alert(\"1\")</script> & 'well' <img src=x onerror=y>";
const char* const kHostileFormula = "=HYPERLINK(\"http://x.invalid\",\"open\")";

namespace {

constexpr std::array kLevels = {0.5, 1.0, 2.0, 5.0, 10.0, 20.0, 50.0};
constexpr int kFirstBlank = 2;
constexpr int kFirstStandard = 10;
constexpr int kFirstCheck = 17;
constexpr int kFirstSample = 18;
constexpr int kLastCheck = 32;
constexpr int kRefused = 33;

struct Compound {
  const char* name;
  double minutes;
  double slope;
  double scatter;  ///< relative, of the standards
};
constexpr std::array kCompounds = {
    Compound{"simazine", 3.42, 1.84, 0.010},
    Compound{"atrazine", 4.36, 2.31, 0.016},
    Compound{"terbuthylazine", 6.02, 1.12, 0.02}};

struct Vial {
  std::string sample;
  double dilution;
  std::array<double, 3> vial_concentration;
};
std::vector<Vial> vials() {
  return {{"Mill Lane well 3", 1, {0.02, 3.42, 0.31}},
          {"Mill Lane well 4", 1, {0.18, 12.4, 0.05}},
          {"North field, drain", 1, {0.34, 0.71, 1.9}},
          {kHostileMarkup, 1, {-0.04, 0.09, 0.0}},
          {kHostileFormula, 1, {1.27, 0.22, 8.8}},
          {"Upper spring", 1, {0.01, -0.02, 0.06}},
          {"Lower spring", 1, {0.61, 4.4, 0.44}},
          {"Pump house", 1, {64.0, 21.9, 5.13}},
          {"Pump house", 10, {6.52, 2.21, 0.52}},
          {"Quarry pond", 1, {0.11, 0.52, 33.0}},
          {"Quarry pond, east bank, sampled a second time after rain",
           1,
           {0.27, 0.35, 0.21}},
          {"Rain gauge", 1, {0.0, 0.03, 0.01}},
          {"Village tap", 1, {0.05, 0.14, 0.02}},
          {"Village tap 2", 1, {2.05, 0.16, 7.7}}};
}

// A number in [-1, 1] that looks irregular and is the same everywhere.
double wobble(int i, int j) {
  auto bits = static_cast<std::uint32_t>(i * 7919 + j * 104729);
  for (int round = 0; round < 2; ++round) {
    bits = (bits ^ (bits >> 16U)) * 0x45d9f3bU;
  }
  return static_cast<double>(bits >> 8U) / 8388607.5 - 1.0;
}

Injection injection(int number, const std::string& sample, Role role,
                    const std::string& level, double dilution) {
  Injection row;
  row.number = number;
  row.file = "data/inj" + std::to_string(number) + ".mzML";
  row.sample = sample;
  row.role = role;
  row.level = level;
  row.dilution = dilution;
  return row;
}

std::vector<Injection> injections() {
  std::vector<Injection> rows = {
      injection(1, "conditioning", Role::Conditioning, "", 1)};
  for (int i = kFirstBlank; i < kFirstStandard; ++i) {
    rows.push_back(injection(i, "solvent blank", Role::SolventBlank, "", 1));
  }
  for (int i = kFirstStandard; i < kFirstCheck; ++i) {
    const std::string level = "L" + std::to_string(i - kFirstStandard + 1);
    rows.push_back(injection(i, "standard " + level, Role::Standard, level, 1));
  }
  rows.push_back(
      injection(kFirstCheck, "check 1", Role::CheckStandard, "C", 1));
  int number = kFirstSample;
  for (const Vial& vial : vials()) {
    rows.push_back(
        injection(number++, vial.sample, Role::Sample, "", vial.dilution));
  }
  rows.push_back(injection(kLastCheck, "check 2", Role::CheckStandard, "C", 1));
  rows.push_back(injection(kRefused, "Old well", Role::Sample, "", 1));
  return rows;
}

Method method() {
  Method method;
  method.id = "well-water-herbicides";
  method.revision = "3";
  method.title = "Herbicides in well water, direct injection";
  method.units.concentration = "ug/L";
  method.units.result = "ug/L";
  for (const Compound& compound : kCompounds) {
    AnalyteSettings analyte;
    analyte.target.id = compound.name;
    analyte.target.trace = "uv220";
    analyte.target.retention_minutes = compound.minutes;
    method.analytes.push_back(analyte);
  }
  AnalyteSettings lost;
  lost.target.id = "diuron";
  lost.target.trace = "uv220";
  lost.target.retention_minutes = 7.5;
  method.analytes.push_back(lost);
  method.defaults_used = {{"integration", "baseline", "valley"},
                          {"noise", "span", "5"}};
  return method;
}

double response(const Compound& compound, double concentration, int number) {
  const int which = static_cast<int>(10 * compound.minutes);
  return 0.03 +
         compound.slope * concentration *
             (1 + compound.scatter * wobble(number, which)) +
         0.04 * wobble(number, which + 3);
}

Peak peak_of(const Compound& compound, double concentration, int number) {
  Peak peak;
  peak.found = concentration > 0.15;
  peak.retention_minutes = compound.minutes + 0.004 * wobble(number, 5);
  peak.start_minutes = peak.retention_minutes - 0.11;
  peak.end_minutes = peak.retention_minutes + 0.14;
  peak.area = response(compound, concentration, number);
  peak.height = peak.area / 0.085;
  peak.width_half_minutes = 0.08;
  peak.noise = 0.9;
  peak.noise_source = "blank 9";
  peak.signal_to_noise = 2 * peak.height / 0.9;
  return peak;
}

double amount_in(const Injection& row, std::size_t compound) {
  if (row.role == Role::Standard) {
    return kLevels[static_cast<std::size_t>(row.number - kFirstStandard)];
  }
  if (row.role == Role::CheckStandard) return 10.0;
  if (row.role != Role::Sample) return 0.0;
  return vials()[static_cast<std::size_t>(row.number - kFirstSample)]
      .vial_concentration[compound];
}

Calibration calibration_of(const Compound& compound) {
  Calibration line;
  line.settings.weight = CalibrationSettings::Weight::InverseX;
  line.intercept = 0.03;
  line.slope = compound.slope;
  line.residual_sd = 0.05 + compound.scatter;
  line.r2 = 0.99987;
  line.relative_standard_error = 100 * compound.scatter;
  line.degrees_of_freedom = 5;
  line.covariance[0] = {4e-4, -2e-5, 0};
  line.covariance[1] = {-2e-5, 3e-5, 0};
  for (std::size_t i = 0; i < kLevels.size(); ++i) {
    const int number = kFirstStandard + static_cast<int>(i);
    StandardPoint point;
    point.injection = number;
    point.level = "L" + std::to_string(i + 1);
    point.concentration = kLevels[i];
    point.response = response(compound, kLevels[i], number);
    point.weight = 1 / kLevels[i];
    point.back_calculated = (point.response - line.intercept) / line.slope;
    point.deviation_percent =
        100 * (*point.back_calculated - kLevels[i]) / kLevels[i];
    line.points.push_back(point);
    line.levels.push_back({kLevels[i], 1, point.deviation_percent, true});
  }
  line.points[4].used = false;
  line.points[4].note = "saturated";
  line.levels[4].accepted = false;
  line.lowest = kLevels.front();
  line.highest = kLevels.back();
  line.accepted_lowest = line.lowest;
  line.accepted_highest = line.highest;
  return line;
}

LimitRow limit_row(const std::string& procedure, double detection,
                   double quantitation, std::vector<LimitTerm> terms) {
  LimitEstimate estimate;
  estimate.detection = detection;
  estimate.quantitation = quantitation;
  estimate.n = 8;
  estimate.terms = std::move(terms);
  return {procedure, estimate, false, false};
}

void with_bounds(LimitRow& row) {
  LimitEstimate& estimate = row.estimate.value();
  estimate.detection_lower = 0.66 * *estimate.detection;
  estimate.detection_upper = 2.04 * *estimate.detection;
  estimate.quantitation_lower = 0.66 * *estimate.quantitation;
  estimate.quantitation_upper = 2.04 * *estimate.quantitation;
  estimate.degrees_of_freedom = 7;
}

LimitsOfAnalyte limits_of(const Compound& compound) {
  LimitsOfAnalyte limits;
  const double detection = 0.3 / compound.slope;
  LimitRow blank =
      limit_row("blank-deviation", detection, detection / 0.3,
                {{"standard deviation of the blanks",
                  detection * compound.slope / 3, "response"},
                 {"slope", compound.slope, "response/concentration"}});
  with_bounds(blank);
  blank.governs_detection = true;
  LimitRow residual =
      limit_row("calibration-residual", 1.7 * detection, 5.7 * detection,
                {{"s(y/x)", 0.094, "response"}});
  residual.estimate.value().findings.push_back(
      {Grade::NotValid, "variance-grows",
       "the scatter of the standards grows with the amount (p = 0.004)"});
  LimitRow noise = limit_row("signal-to-noise", 0.6 * detection,
                             2.1 * detection, {{"noise h", 0.9, "height"}});
  noise.estimate.value().findings.push_back(
      {Grade::Note, "instrument-noise-only", "H/h is 1.5 at the limit"});
  limits.rows = {
      blank,
      residual,
      noise,
      {"spike-replicates", NotApplicable{"no low spikes in the sequence"},
       false, false}};
  GoverningLimits governing;
  governing.detection = detection;
  governing.quantitation = std::max(detection / 0.3, kLevels.front());
  governing.decision_threshold = detection;
  governing.detection_procedure = "blank-deviation";
  governing.quantitation_procedure = "blank-deviation";
  if (governing.quantitation == kLevels.front()) {
    governing.quantitation_procedure = "lowest-standard";
  } else {
    limits.rows[0].governs_quantitation = true;
  }
  limits.governing = governing;
  return limits;
}

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
  run.sequence.injections = injections();
  run.method = method();
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
