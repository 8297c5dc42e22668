#pragma once

#include <deque>
#include <string>
#include <vector>

#include "loqsmith/judgement/judge_analyte.hpp"
#include "loqsmith/judgement/measured_analyte.hpp"

namespace loqsmith::test {

inline Peak peak_of(double area, bool found = true) {
  Peak peak;
  peak.found = found;
  peak.retention_minutes = 4.2;
  peak.area = area;
  peak.height = 10.0 * area;
  peak.signal_to_noise = 2.0 * peak.height;
  peak.noise = 1.0;
  return peak;
}

/// One injection as a test states it.
struct NightRow {
  Injection injection;
  Outcome<Peak> peak = NotApplicable{"not measured"};
  std::optional<Outcome<Peak>> internal_standard;
  std::string signal_unit = {};
  std::optional<double> expected_minutes = {};
  std::optional<Outcome<Peak>> second_trace = {};
};

/// One analyte "zinol" of a night, put together by hand. The detector gives an
/// area of `sensitivity` per concentration unit in the vial.
class NightBuilder {
 public:
  NightBuilder() {
    settings.analyte = "zinol";
    units.concentration = "ug/L";
    units.result = "ug/L";
  }

  NightRow& add(Role role, double area, bool found = true) {
    NightRow row;
    row.injection.number = static_cast<int>(rows.size()) + 1;
    row.injection.sample = "S" + std::to_string(row.injection.number);
    row.injection.role = role;
    row.peak = peak_of(area, found);
    rows.push_back(row);
    return rows.back();
  }

  /// With a level of its own, named after the amount.
  NightRow& add_level(Role role, double amount, double area,
                      bool found = true) {
    NightRow& row = add(role, area, found);
    row.injection.level = role_name(role) + "-" + std::to_string(amount);
    levels.push_back({row.injection.level, "zinol", amount, "", "", 0});
    return row;
  }

  NightRow& standard(double concentration) {
    return add_level(Role::Standard, concentration, sensitivity * concentration,
                     concentration > 0.0);
  }

  /// Brings the injections together; call again after adding.
  const std::vector<MeasuredInjection>& measured() {
    sequence.injections.clear();
    sequence.levels = levels;
    for (const NightRow& row : rows) {
      sequence.injections.push_back(row.injection);
    }
    measured_.clear();
    for (std::size_t i = 0; i < rows.size(); ++i) {
      if (rows[i].injection.role == Role::Conditioning) continue;
      measured_.push_back({&sequence.injections[i], rows[i].peak,
                           rows[i].internal_standard, rows[i].signal_unit,
                           rows[i].expected_minutes, rows[i].second_trace});
    }
    return measured_;
  }

  MeasuredAnalyte collect() {
    measured();
    return collect_responses(settings, units, sequence, measured_);
  }

  AnalyteJudgement judge(const std::string& template_reason = {}) {
    measured();
    return judge_analyte(settings, units, sequence, measured_, template_reason);
  }

  AnalyteRules settings;
  UnitSettings units;
  double sensitivity = 2.0;
  std::deque<NightRow> rows;
  std::vector<LevelEntry> levels;
  Sequence sequence;

 private:
  std::vector<MeasuredInjection> measured_;
};

/// A straight line through zero with the given slope and range.
inline Calibration line(double slope, double lowest, double highest) {
  Calibration calibration;
  calibration.slope = slope;
  calibration.residual_sd = 0.1;
  calibration.r2 = 0.999;
  calibration.relative_standard_error = 3.0;
  calibration.degrees_of_freedom = 5;
  calibration.lowest = lowest;
  calibration.highest = highest;
  calibration.accepted_lowest = lowest;
  calibration.accepted_highest = highest;
  for (int i = 0; i < 7; ++i) {
    const double x = lowest + (highest - lowest) * i / 6.0;
    StandardPoint point;
    point.injection = i + 1;
    point.concentration = x;
    point.response = slope * x;
    point.weight = 1.0;
    calibration.points.push_back(point);
    calibration.levels.push_back({x, 1, 0.0, true});
  }
  return calibration;
}

inline bool has_word(const std::vector<std::string>& words,
                     const std::string& word) {
  for (const std::string& one : words) {
    if (one == word) return true;
  }
  return false;
}

/// The rows of one check, in order.
inline std::vector<CheckRow> rows_of(const std::vector<CheckRow>& rows,
                                     const std::string& check) {
  std::vector<CheckRow> found;
  for (const CheckRow& row : rows) {
    if (row.check == check) found.push_back(row);
  }
  return found;
}

}  // namespace loqsmith::test
