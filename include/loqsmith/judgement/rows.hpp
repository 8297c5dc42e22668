#pragma once

#include <optional>
#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/calibration/calibration.hpp"
#include "loqsmith/calibration/diagnostics.hpp"
#include "loqsmith/calibration/inverse.hpp"
#include "loqsmith/calibration/standard_addition.hpp"
#include "loqsmith/chromatogram/role.hpp"
#include "loqsmith/judgement/check_effect.hpp"
#include "loqsmith/judgement/settings.hpp"
#include "loqsmith/limits/governing.hpp"

namespace loqsmith {

/// What the program says of a result without any amendment.
struct AutomaticResult {
  std::optional<double> result;
  Status status = Status::Withheld;
  std::string reported;
};

/// One row of results.csv. Limits are this sample's own.
struct ResultRow {
  int injection = 0;
  std::string sample;
  Role role = Role::Sample;
  std::string analyte;
  std::string set;  ///< calibration set, "1" where there is only one
  bool found = false;
  std::optional<double> retention_minutes;
  std::optional<double> response;
  std::optional<double> signal_to_noise;
  std::optional<double> vial_concentration;
  double dilution = 1.0;
  std::optional<double> result;  ///< full precision, never censored
  std::string unit;
  std::optional<double> calibration_uncertainty;  ///< expanded, 95 %
  std::optional<double> detection_limit;
  std::optional<double> quantitation_limit;
  std::string detection_procedure;
  std::string quantitation_procedure;
  Status status = Status::Withheld;
  std::string reported;  ///< the text that may leave the laboratory
  std::string qualifier;
  std::vector<std::string> reasons;  ///< most serious first
  /// Both ends of the inverse prediction's 95 % interval, in the sample.
  std::optional<ConcentrationInterval> calibration_interval;
  double response_divisor = 1.0;  ///< what the peak's response was divided by
  std::optional<double> range_end = {};  ///< in the sample
  std::string rule = {};  ///< the verdict rule that decided, in words
  std::optional<AutomaticResult> automatic;  ///< where an amendment touched it
};

/// One row of checks.csv.
struct CheckRow {
  std::string check;
  std::string analyte;           ///< empty: all
  std::optional<int> injection;  ///< nothing: none in particular
  std::optional<double> value;
  std::optional<double> low;
  std::optional<double> high;
  std::string unit;
  std::optional<bool> passed;  ///< nothing: not checked, the note says why
  std::string action;          ///< "withhold", "flag"; empty: none
  std::string affects;
  std::string note;
  std::string set = {};  ///< calibration set; empty: all, or only one
};

/// A standard that gave no response; it stands in standards.csv with its note.
struct UnmeasuredStandard {
  int injection = 0;
  std::string level;
  double concentration = 0.0;  ///< nominal, in the vial
  std::string note;            ///< "file-refused", "internal-standard-missing"
};

/// One calibration set of one analyte with its limits.
struct CalibrationSet {
  std::string set;
  bool alone = true;            ///< the analyte has no other set
  bool over_additions = false;  ///< a line of standard addition
  Outcome<Calibration> calibration = NotApplicable{"no standards"};
  /// All standards; where there is no calibration, as they were offered.
  std::vector<StandardPoint> standards;
  std::vector<UnmeasuredStandard> unmeasured;
  /// Where there is a calibration.
  Outcome<CalibrationDiagnostics> diagnostics = NotApplicable{"no calibration"};
  LimitsOfAnalyte limits;
  /// What the limits rest on, for the checks of them.
  std::vector<BlankResponse> blanks;
  std::vector<SpikeResult> low_spikes;
  /// With a line of standard addition: all results of the set are this amount;
  /// the concentrations of `calibration` are those added.
  std::optional<StandardAddition> addition;
};

/// All that is said of one analyte.
struct AnalyteJudgement {
  std::string analyte;
  std::string concentration_unit;
  std::vector<CalibrationSet> sets;
  std::vector<ResultRow> results;  ///< in run order
  std::vector<CheckRow> checks;
  /// Failed checks of this analyte that concern whole injections.
  std::vector<CheckEffect> for_others;
};

}  // namespace loqsmith
