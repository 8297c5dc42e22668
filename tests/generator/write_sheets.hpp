#pragma once

#include <string>

#include "generator/simulated_night.hpp"

namespace loqsmith::test {

std::string sequence_sheet(const SimulatedNight& night);
std::string levels_sheet(const SimulatedNight& night);

/// injection,analyte,vial_concentration,result: what every injection that is
/// quantified truly holds, in the vial as injected and in the sample.
std::string truth_table(const SimulatedNight& night);

}  // namespace loqsmith::test
