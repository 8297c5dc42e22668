#pragma once

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/low_range_line.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

/// critical_and_detectable for a standard deviation that is linear in the
/// concentration; formulas, findings and reasons stand in its header.
/// @param low  the standards; its own line gives nothing but them
Outcome<LimitEstimate> linear_variance_limits(
    const LowRangeLine& low, const LimitEvidence& evidence,
    const LimitSettings& settings, const ProcedureSettings& procedure);

}  // namespace loqsmith
