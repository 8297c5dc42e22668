#pragma once

#include <string>

#include "generator/simulated_night.hpp"

namespace loqsmith::test {

/// The injection as mzML 1.1, with index and SHA-1: an absorption chromatogram
/// at 220 nm (64-bit times in minutes, 32-bit absorbance) and the column
/// pressure, both zlib.
std::string mzml_document(const SimulatedNight& night, const Vial& vial);

}  // namespace loqsmith::test
