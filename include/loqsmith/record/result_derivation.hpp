#pragma once

#include <optional>
#include <string>

#include "loqsmith/base/json_writer.hpp"
#include "loqsmith/record/published_run.hpp"

namespace loqsmith {

/// What of one result's way stands in no table: record.json holds it beside
/// the decision, and `explain` reads it from there.
struct ResultDerivation {
  std::string file;  ///< as the sequence names it
  std::string file_run;
  std::string trace;               ///< id and selector, "uv220: absorption"
  double expected_minutes = 0.0;   ///< as the method states it
  double tolerance_minutes = 0.0;  ///< plus or minus
  std::string measure;             ///< "area", "height", "template"
  std::string internal_standard;   ///< empty: none
  double internal_standard_dilution = 1.0;
  double divisor = 1.0;          ///< of the peak's own response
  bool divisor_is_mean = false;  ///< of the standards, not this injection's
  double dilution = 1.0;
  std::optional<double> final_volume;  ///< nothing: not used for this result
  std::optional<double> sample_amount;
  double unit_factor = 1.0;
  double sample_factor = 1.0;  ///< vial to sample, all of the above
  std::optional<double> decision_threshold;  ///< in the sample
  bool decides_at_critical_value = false;
  std::optional<double> range_end;  ///< in the sample
  std::string rule;                 ///< of the verdict, in words
  std::string printed;              ///< "number", "below", "above", "withheld"
  std::optional<double> printed_value;  ///< unrounded
  std::optional<double> printed_uncertainty;
  std::optional<double> reporting_limit;
  std::string rounding;  ///< "3 significant digits, half-even"
};

ResultDerivation derivation_of(const PublishedRun& run,
                               const CalibrationSet& set, const ResultRow& row);

/// The member `derivation` of a decision.
void record_derivation(JsonWriter& json, const ResultDerivation& derivation);

}  // namespace loqsmith
