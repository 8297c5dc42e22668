#include <array>
#include <cstddef>
#include <string>
#include <utility>
#include <vector>

#include "generator/animl_writer.hpp"
#include "generator/nights.hpp"

namespace loqsmith::test {
namespace {

constexpr double kInternalStandard = 200.0;  // mg/L in an undiluted vial
constexpr double kCheckLevel = 80.0;
constexpr double kFinalVolume = 5.0;  // mL

struct Coating {
  const char* name;
  double grams;
  std::array<double, 3> in_vial;  ///< mg/L: acetone, propan-2-ol, ethanol
};

// From nothing to beyond the range (5 to 500 mg/L). C-14 is close to the
// limits on purpose.
constexpr std::array<Coating, 16> kCoatings{{
    {"C-01", 0.5013, {0.0, 0.0, 0.0}},
    {"C-02", 0.4987, {2.6, 0.0, 40.0}},
    {"C-03", 0.5039, {0.0, 4.0, 220.0}},
    {"C-04", 0.4992, {12.0, 30.0, 2.8}},
    {"C-05", 0.5008, {0.0, 85.0, 620.0}},
    {"C-06", 0.4975, {3.0, 0.0, 0.0}},
    {"C-07", 0.5024, {47.0, 4.2, 130.0}},
    {"C-08", 0.5001, {700.0, 0.0, 75.0}},
    {"C-09", 0.4996, {0.0, 3.8, 0.0}},
    {"C-10", 0.5050, {150.0, 12.0, 3.2}},
    {"C-11", 0.4963, {0.0, 900.0, 26.0}},
    {"C-12", 0.5017, {3.4, 0.0, 300.0}},
    {"C-13", 0.5005, {88.0, 240.0, 560.0}},
    {"C-14", 0.4981, {0.7, 2.2, 4.8}},
    {"C-15", 0.5029, {310.0, 4.0, 0.0}},
    {"C-16", 0.4999, {28.0, 60.0, 18.0}},
}};

constexpr std::array<std::pair<const char*, double>, 7> kStandards{
    {{"S1", 5.0},
     {"S2", 10.0},
     {"S3", 20.0},
     {"S4", 50.0},
     {"S5", 100.0},
     {"S6", 200.0},
     {"S7", 500.0}}};

class Tray {
 public:
  /// Following injections become steps of this file; "": a file each.
  void into(std::string file) { file_ = std::move(file); }

  Vial& add(const std::string& role, const std::string& sample,
            std::vector<double> concentrations) {
    Vial vial;
    vial.number = static_cast<int>(vials_.size()) + 1;
    const std::string step = step_id(vial.number);
    vial.file =
        "data/" + (file_.empty() ? step + "-" + sample : file_) + ".animl";
    if (!file_.empty()) vial.run = step;
    vial.sample = sample;
    vial.role = role;
    vial.concentrations = std::move(concentrations);
    vial.internal_standard = kInternalStandard;
    vials_.push_back(std::move(vial));
    return vials_.back();
  }

  void diluent() {
    add("solvent-blank", "diluent", {0.0, 0.0, 0.0}).internal_standard = 0.0;
  }
  void check() {
    add("check-standard", "check", std::vector<double>(3, kCheckLevel)).level =
        "CK";
  }
  void standards() {
    for (const auto& [level, amount] : kStandards) {
      add("standard", level, std::vector<double>(3, amount)).level = level;
    }
  }
  void method_blank(const std::string& prep) {
    Vial& vial = add("method-blank", "uncoated", {0.0, 0.0, 0.0});
    vial.prep = prep;
    vial.sample_amount = 0.5;
    vial.final_volume = kFinalVolume;
  }
  void coating(std::size_t index, const std::string& prep,
               double dilution = 1.0, double internal_standard_dilution = 1.0) {
    const Coating& from = kCoatings[index];
    std::vector<double> in_vial;
    for (const double amount : from.in_vial) {
      in_vial.push_back(amount / dilution);
    }
    Vial& vial = add("sample", from.name, std::move(in_vial));
    vial.prep = prep;
    vial.sample_amount = from.grams;
    vial.final_volume = kFinalVolume;
    vial.dilution = dilution;
    vial.internal_standard_dilution = internal_standard_dilution;
    vial.internal_standard /= internal_standard_dilution;
  }
  void coatings(std::size_t first, std::size_t last, const std::string& prep) {
    for (std::size_t i = first; i <= last; ++i) coating(i, prep);
  }

  std::vector<Vial> take() { return std::move(vials_); }

 private:
  std::string file_;
  std::vector<Vial> vials_;
};

std::vector<Vial> run_order() {
  Tray tray;
  tray.into("opening");
  tray.add("conditioning", "system", std::vector<double>(3, kCheckLevel));
  for (int i = 0; i < 4; ++i) tray.diluent();
  tray.standards();
  tray.check();
  tray.diluent();
  tray.into("");
  tray.method_blank("P1");
  tray.into("batch-1");
  tray.coatings(0, 7, "P1");
  tray.into("");
  tray.check();
  tray.diluent();
  tray.method_blank("P2");
  tray.into("batch-2");
  tray.coatings(8, 15, "P2");
  tray.into("");
  tray.check();
  tray.diluent();
  tray.coating(4, "P1", 10.0, 10.0);  // diluted with its internal standard
  tray.coating(7, "P1", 10.0);        // diluted before it was added
  tray.coating(10, "P2", 5.0, 5.0);
  tray.into("closing");
  tray.standards();
  tray.check();
  tray.diluent();
  return tray.take();
}

std::vector<NamedLevel> known_levels() {
  std::vector<NamedLevel> levels;
  for (const auto& [name, amount] : kStandards) {
    levels.push_back(
        {name, std::vector<double>(3, amount), "RS-31", "2026-10-31"});
  }
  levels.push_back(
      {"CK", std::vector<double>(3, kCheckLevel), "RS-28", "2026-08-31"});
  return levels;
}

Detector flame_detector() {
  Detector detector;
  detector.run_minutes = 6.0;
  detector.step = 0x1p-9;  // 2 fA
  detector.offset = 12.0;  // pA
  detector.noise_sd = 0.11;
  detector.wave_amplitude = 0.08;
  detector.wave_period_minutes = 9.0;
  detector.slope_per_minute = 0.02;
  return detector;
}

}  // namespace

SimulatedNight tablet_coating_night() {
  SimulatedNight night;
  night.name = "tablet-coating-solvents";
  night.analytes = {{"acetone", 1.95, 0.020, 0.023, 0.006},
                    {"propan-2-ol", 2.75, 0.020, 0.024, 0.006},
                    {"ethanol", 3.35, 0.017, 0.024, 0.006}};
  night.internal_standard = Substance{"butan-1-ol", 4.80, 0.040, 0.026, 0.006};
  night.every_injection = {{{"solvent front", 0.90, 1.0, 0.03, 0.015}, 6.0}};
  night.samples_only = {{{"excipient", 5.50, 1.0, 0.03, 0.01}, 4.0}};
  night.detector = flame_detector();
  night.start_microseconds = std::int64_t{1776799800} * 1'000'000;
  night.minutes_between = 9;
  night.retention_drift_minutes = 0.01;
  night.retention_jitter_minutes = 0.001;
  night.injection_error = 0.03;
  night.peak_error = 0.004;
  night.columns = {
      "injection",     "file",         "run",      "sample",
      "role",          "level",        "dilution", "internal_standard_dilution",
      "sample_amount", "final_volume", "prep",     "acquired"};
  night.levels = known_levels();
  night.vials = run_order();
  return night;
}

}  // namespace loqsmith::test
