#pragma once

#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/judgement/judge_analyte.hpp"

namespace loqsmith {

/// The unit in which all measured standards state their signal (it may be
/// "not stated" for all of them: empty text). Signals are never rescaled, so a
/// calibration from several units is refused.
/// @return not applicable: "mixed-units: ...".
Outcome<std::string> common_signal_unit(
    const std::vector<MeasuredInjection>& injections);

/// Why an injection's response may not be held against standards of that unit;
/// empty where it may.
std::string why_unit_differs(const MeasuredInjection& injection,
                             const std::string& standards_unit);

}  // namespace loqsmith
