#include <array>
#include <cstddef>
#include <cstdio>
#include <string>
#include <utility>
#include <vector>

#include "generator/nights.hpp"

namespace loqsmith::test {
namespace {

struct Well {
  const char* name;
  std::array<double, 3> ug_per_litre;  ///< simazine, atrazine, diuron
};

// From nothing to beyond the range (0.5 to 50 ug/L). Most values stand well
// away from the limits that the night's noise gives; W-116 and W-123 are close
// to them on purpose.
constexpr std::array<Well, 24> kWells{{
    {"W-101", {0.0, 0.0, 0.0}},    {"W-102", {0.0, 0.28, 0.0}},
    {"W-103", {0.26, 0.0, 2.4}},   {"W-104", {1.2, 3.5, 0.0}},
    {"W-105", {0.0, 0.0, 0.4}},    {"W-106", {0.3, 0.2, 8.0}},
    {"W-107", {4.1, 0.0, 14.0}},   {"W-108", {62.0, 18.0, 31.0}},
    {"W-109", {0.0, 0.3, 0.0}},    {"W-110", {0.24, 1.7, 3.3}},
    {"W-111", {12.5, 75.0, 1.1}},  {"W-112", {0.0, 0.0, 0.0}},
    {"W-113", {0.32, 0.34, 0.45}}, {"W-114", {2.2, 0.9, 19.0}},
    {"W-115", {33.0, 6.4, 0.0}},   {"W-116", {0.05, 0.04, 0.15}},
    {"W-117", {0.0, 24.0, 90.0}},  {"W-118", {8.8, 0.26, 5.5}},
    {"W-119", {0.0, 0.0, 2.0}},    {"W-120", {120.0, 140.0, 46.0}},
    {"W-121", {0.28, 2.9, 0.0}},   {"W-122", {21.0, 58.0, 27.0}},
    {"W-123", {0.45, 0.55, 0.7}},  {"W-124", {3.0, 11.0, 1.6}},
}};

constexpr std::array<std::pair<const char*, double>, 7> kStandards{
    {{"S1", 0.5},
     {"S2", 1.0},
     {"S3", 2.0},
     {"S4", 5.0},
     {"S5", 10.0},
     {"S6", 20.0},
     {"S7", 50.0}}};
constexpr double kCheckLevel = 8.0;
constexpr double kSpikeLevel = 0.4;

class Rack {
 public:
  void add(const std::string& role, const std::string& sample,
           std::vector<double> concentrations, const std::string& level = "") {
    Vial vial;
    vial.number = static_cast<int>(vials_.size()) + 1;
    char number[16];
    std::snprintf(number, sizeof number, "%03d", vial.number);
    vial.file = std::string("data/") + number + "-" + sample + ".mzML";
    vial.sample = sample;
    vial.role = role;
    vial.level = level;
    vial.concentrations = std::move(concentrations);
    vials_.push_back(std::move(vial));
  }

  void conditioning() { add("conditioning", "system", {8.0, 8.0, 8.0}); }
  void blank() { add("solvent-blank", "water", {0.0, 0.0, 0.0}); }
  void check() {
    add("check-standard", "check", std::vector<double>(3, kCheckLevel), "CK");
  }
  void standards() {
    for (const auto& [level, amount] : kStandards) {
      add("standard", level, std::vector<double>(3, amount), level);
    }
  }
  void spikes() {
    for (int i = 1; i <= 8; ++i) {
      add("low-spike", "spike-" + std::to_string(i),
          std::vector<double>(3, kSpikeLevel), "SP");
    }
  }
  void method_blank(const std::string& prep) {
    add("method-blank", "field-water", {0.0, 0.0, 0.0});
    vials_.back().prep = prep;
  }
  void well(std::size_t index, const std::string& prep, double dilution = 1.0) {
    const Well& from = kWells[index];
    std::vector<double> in_vial;
    for (const double amount : from.ug_per_litre) {
      in_vial.push_back(amount / dilution);
    }
    add("sample", from.name, std::move(in_vial));
    vials_.back().prep = prep;
    vials_.back().dilution = dilution;
  }
  void wells(std::size_t first, std::size_t last, const std::string& prep) {
    for (std::size_t i = first; i <= last; ++i) well(i, prep);
  }

  std::vector<Vial> take() { return std::move(vials_); }

 private:
  std::vector<Vial> vials_;
};

std::vector<Vial> run_order() {
  Rack rack;
  for (int i = 0; i < 2; ++i) rack.conditioning();
  for (int i = 0; i < 3; ++i) rack.blank();
  rack.standards();
  rack.check();
  rack.blank();
  rack.spikes();
  rack.blank();
  rack.method_blank("P1");
  rack.wells(0, 7, "P1");
  rack.check();
  rack.blank();
  rack.wells(8, 15, "P1");
  rack.check();
  rack.blank();
  rack.method_blank("P2");
  rack.wells(16, 23, "P2");
  rack.check();
  rack.blank();
  rack.well(7, "P1", 5.0);
  rack.well(10, "P1", 10.0);
  rack.well(16, "P2", 10.0);
  rack.well(19, "P2", 10.0);
  rack.standards();
  rack.check();
  for (int i = 0; i < 2; ++i) rack.blank();
  return rack.take();
}

std::vector<NamedLevel> known_levels() {
  std::vector<NamedLevel> levels;
  for (const auto& [name, amount] : kStandards) {
    levels.push_back(
        {name, std::vector<double>(3, amount), "HB-2604", "2026-09-30"});
  }
  levels.push_back(
      {"CK", std::vector<double>(3, kCheckLevel), "HB-2517", "2026-06-30"});
  levels.push_back(
      {"SP", std::vector<double>(3, kSpikeLevel), "HB-2517", "2026-06-30"});
  return levels;
}

Detector absorbance_detector() {
  Detector detector;
  detector.run_minutes = 7.0;
  detector.step = 0x1p-22;  // 0.24 micro absorbance units
  detector.noise_sd = 20e-6;
  detector.wave_amplitude = 30e-6;
  detector.wave_period_minutes = 11.0;
  detector.slope_per_minute = 10e-6;
  return detector;
}

}  // namespace

SimulatedNight well_water_night() {
  SimulatedNight night;
  night.name = "well-water-herbicides";
  night.analytes = {{"simazine", 3.42, 80e-6, 0.034, 0.012},
                    {"atrazine", 4.36, 100e-6, 0.036, 0.012},
                    {"diuron", 5.25, 32e-6, 0.038, 0.014}};
  night.every_injection = {{{"void", 1.02, 1.0, 0.02, 0.01}, 40e-6},
                           {{"void dip", 1.12, 1.0, 0.02, 0.01}, -40e-6}};
  night.samples_only = {{{"early matrix", 2.10, 1.0, 0.05, 0.02}, 800e-6},
                        {{"late matrix", 6.30, 1.0, 0.05, 0.02}, 300e-6}};
  night.detector = absorbance_detector();
  night.start_microseconds = std::int64_t{1773165600} * 1'000'000;
  night.minutes_between = 12;
  night.retention_drift_minutes = 0.03;
  night.retention_jitter_minutes = 0.002;
  night.injection_error = 0.005;
  night.columns = {"injection", "file",     "sample", "role",
                   "level",     "dilution", "prep"};
  night.levels = known_levels();
  night.vials = run_order();
  return night;
}

}  // namespace loqsmith::test
