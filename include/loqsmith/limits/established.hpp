#pragma once

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

/// Limits that a laboratory has validated, taken as given (vial
/// concentrations above zero), with their source as a note.
/// @return not applicable: neither is given, or one is not above zero.
Outcome<LimitEstimate> established(const LimitEvidence& evidence,
                                   const LimitSettings& settings,
                                   const ProcedureSettings& procedure);

}  // namespace loqsmith
