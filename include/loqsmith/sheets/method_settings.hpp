#pragma once

#include <string>
#include <vector>

#include "loqsmith/judgement/settings.hpp"
#include "loqsmith/sheets/method.hpp"
#include "loqsmith/sheets/method_tree.hpp"

namespace loqsmith {

// From elements that passed every check to the rooms' settings. `own` is the
// analyte's element, `shared` the method's; either may be null.

IntegrationSettings integration_settings(const MethodElement* own,
                                         const MethodElement* shared);
NoiseSettings noise_settings(const MethodElement* own,
                             const MethodElement* shared);
CalibrationSettings calibration_settings(const MethodElement* own,
                                         const MethodElement* shared);
LimitSettings limit_settings(const MethodElement& limits);

/// Which procedure rules: as written, else "established" where that child is
/// present, else "first".
std::string governing_of(const MethodElement& limits);

AcceptanceSettings acceptance_settings(const MethodElement* own,
                                       const MethodElement* shared);
ReportingSettings reporting_settings(const MethodElement* own,
                                     const MethodElement* shared);
UnitSettings unit_settings(const MethodElement& units);

/// All defaults that were used, in document order of the vocabulary.
std::vector<DefaultUsed> defaults_used(const MethodElement& method);

}  // namespace loqsmith
