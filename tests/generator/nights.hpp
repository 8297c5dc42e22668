#pragma once

#include "generator/simulated_night.hpp"

namespace loqsmith::test {

/// Three herbicides in well water by ultraviolet absorption, 69 injections.
SimulatedNight well_water_night();

/// Residual solvents of a tablet coating by gas chromatography with an
/// internal standard, 48 injections.
SimulatedNight tablet_coating_night();

}  // namespace loqsmith::test
