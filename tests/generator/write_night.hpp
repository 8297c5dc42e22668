#pragma once

#include <filesystem>

#include "generator/simulated_night.hpp"

namespace loqsmith::test {

/// Writes one night below `runs`: the folder of its name with sequence.csv,
/// levels.csv and data/ (what is there is replaced; method.xml is written by
/// hand and left alone), and truth/NAME.csv beside it.
void write_well_water(const std::filesystem::path& runs);
void write_tablet_coating(const std::filesystem::path& runs);

}  // namespace loqsmith::test
