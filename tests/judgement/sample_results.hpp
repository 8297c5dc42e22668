#pragma once

#include <string>
#include <vector>

#include "loqsmith/judgement/judge_analyte.hpp"
#include "loqsmith/judgement/reportable_result.hpp"

namespace loqsmith::test {

/// Results of one analyte "zinol", put together by hand: the range ends at 100
/// in the vial, limits at 1 and 3.
class SampleResults {
 public:
  SampleResults() {
    judgement.analyte = "zinol";
    units.concentration = "ug/L";
    units.result = "ug/L";
    Calibration line;
    line.accepted_highest = 100.0;
    CalibrationSet set;
    set.set = "1";
    set.calibration = line;
    judgement.sets.push_back(set);
  }

  /// @param result  in the sample
  ResultRow& add(const std::string& sample, Status status, double result,
                 double dilution = 1.0, Role role = Role::Sample,
                 const std::string& group = "wells") {
    Injection injection;
    injection.number = static_cast<int>(sequence.injections.size()) + 1;
    injection.sample = sample;
    injection.role = role;
    injection.group = group;
    injection.dilution = dilution;
    sequence.injections.push_back(injection);
    ResultRow row;
    row.injection = injection.number;
    row.sample = sample;
    row.role = role;
    row.analyte = "zinol";
    row.set = "1";
    row.unit = "ug/L";
    row.dilution = dilution;
    row.status = status;
    row.result = result;
    row.detection_limit = dilution;
    row.quantitation_limit = 3.0 * dilution;
    judgement.results.push_back(row);
    return judgement.results.back();
  }

  std::vector<ReportableRow> reportable(
      const ReportingSettings& settings = {}) const {
    return reportable_results(judgement, sequence, units, settings);
  }

  AnalyteJudgement judgement;
  UnitSettings units;
  Sequence sequence;
};

}  // namespace loqsmith::test
