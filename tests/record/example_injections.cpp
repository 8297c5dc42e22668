#include <cstdint>

#include "record/example_night.hpp"
#include "record/example_run.hpp"

namespace loqsmith::test {
namespace {

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

}  // namespace

double wobble(int i, int j) {
  auto bits = static_cast<std::uint32_t>(i * 7919 + j * 104729);
  for (int round = 0; round < 2; ++round) {
    bits = (bits ^ (bits >> 16U)) * 0x45d9f3bU;
  }
  return static_cast<double>(bits >> 8U) / 8388607.5 - 1.0;
}

std::vector<Injection> night_injections() {
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

Method night_method() {
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

double response_of(const Compound& compound, double concentration, int number) {
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
  peak.area = response_of(compound, concentration, number);
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

}  // namespace loqsmith::test
