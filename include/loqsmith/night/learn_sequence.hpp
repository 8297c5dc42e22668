#pragma once

#include <cstddef>
#include <map>
#include <optional>
#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/night/sequence_folder.hpp"
#include "loqsmith/signal/baseline_bias.hpp"
#include "loqsmith/signal/learn.hpp"
#include "loqsmith/signal/noise.hpp"
#include "loqsmith/signal/settings.hpp"

namespace loqsmith {

/// Noise of one solvent blank around one target's expected time.
struct BlankNoise {
  int injection = 0;
  NoiseEstimate noise;
};

/// What the first pass fixes before anything is measured.
struct Learned {
  /// Internal standards, analytes, second traces, each in the method's order.
  std::vector<TargetSettings> targets;
  std::vector<Outcome<WindowTemplate>> windows;  ///< one a target
  std::vector<std::vector<BlankNoise>>
      blank_noise;  ///< one a target, run order
  /// One a target, with the blanks' noise; nothing: no estimated baseline, or
  /// no blank to learn the noise from.
  std::vector<std::optional<SimulatedBaseline>> simulated_baselines;
  /// SHA-256 of the files read in this pass: a file that has another one when
  /// it is measured is refused.
  std::map<std::string, std::string> hashes;
};

/// Internal standards first, then analytes, then their second traces.
std::vector<TargetSettings> method_targets(const Method& method);

/// The learning pass: standards, check standards and controls teach windows
/// and expected times; then the blanks that noise needs are measured there.
/// Files that cannot be read teach nothing; measuring names them.
Learned learn_sequence(const SequenceFolder& folder, unsigned jobs);

/// The noise for an injection: the nearest earlier solvent blank's, otherwise
/// the nearest later one's; null where there is none.
const BlankNoise* nearest_blank(const std::vector<BlankNoise>& blanks,
                                int injection);

}  // namespace loqsmith
