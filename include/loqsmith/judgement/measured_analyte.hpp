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
};

/// One analyte of the night, before anything is judged. In run order.
struct MeasuredAnalyte {
  const AnalyteRules* settings = nullptr;
  const UnitSettings* units = nullptr;
  const Sequence* sequence = nullptr;
  std::vector<InjectionResponse> injections;
};

/// The arguments must outlive what is returned.
MeasuredAnalyte collect_responses(
    const AnalyteRules& settings, const UnitSettings& units,
    const Sequence& sequence, const std::vector<MeasuredInjection>& injections);

}  // namespace loqsmith
