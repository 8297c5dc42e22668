#pragma once

#include <string>
#include <vector>

#include "generator/simulated_night.hpp"

namespace loqsmith::test {

/// One AnIML document and how its numbers are written.
struct AnimlFile {
  enum class Times { Increment, IndividualMinutes, EncodedSeconds };
  enum class Signal { Encoded, Individual };

  std::string path;  ///< relative to the night's folder
  Times times = Times::Increment;
  Signal signal = Signal::Encoded;
  std::vector<int> injections;  ///< one experiment step each
};

/// The experiment step of an injection, "inj-07".
std::string step_id(int injection);

/// Which injections of the tablet coating night stand in which file.
std::vector<AnimlFile> tablet_coating_files(const SimulatedNight& night);

/// The document, AnIML 0.90: for each injection a chromatography step whose
/// result holds the flame ionization detector's step with its trace.
std::string animl_document(const SimulatedNight& night, const AnimlFile& file);

}  // namespace loqsmith::test
