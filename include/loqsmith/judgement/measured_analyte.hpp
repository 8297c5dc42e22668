#pragma once

#include <optional>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/judgement/judge_analyte.hpp"
#include "loqsmith/judgement/response.hpp"

namespace loqsmith {

/// One injection with its response.
struct InjectionResponse {
  const Injection* injection = nullptr;
  Outcome<Peak> peak = NotApplicable{"not measured"};
  Outcome<Response> response = NotApplicable{"not measured"};
  /// What the level states for the analyte, in the vial or in the sample as
  /// the role has it; nothing: no level, or the analyte is not in it.
  std::optional<double> nominal;
  /// Where the peak was expected, corrected for drift; nothing: not known.
  std::optional<double> expected_minutes = {};
  /// Area of the internal standard, referred to the undiluted one; nothing: no
  /// internal standard, or no peak of it above zero.
  std::optional<double> internal_standard_area = {};
  /// Nothing: the analyte has no second trace.
  std::optional<Outcome<Peak>> second_trace = {};
  bool excluded = false;  ///< a standard that people left out of the fit
};

/// One analyte of the night, before anything is judged. In run order.
struct MeasuredAnalyte {
  const AnalyteRules* settings = nullptr;
  const UnitSettings* units = nullptr;
  const Sequence* sequence = nullptr;
  std::vector<InjectionResponse> injections;
};

/// What was measured right before an injection in the sequence; null where that
/// is nothing, or conditioning.
const InjectionResponse* right_before(const MeasuredAnalyte& night, int number);

/// The arguments must outlive what is returned.
MeasuredAnalyte collect_responses(
    const AnalyteRules& settings, const UnitSettings& units,
    const Sequence& sequence, const std::vector<MeasuredInjection>& injections);

}  // namespace loqsmith
