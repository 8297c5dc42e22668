#pragma once

#include <cstddef>
#include <functional>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "loqsmith/judgement/judge_analyte.hpp"
#include "loqsmith/night/learn_sequence.hpp"
#include "loqsmith/night/sequence_folder.hpp"
#include "loqsmith/record/published_run.hpp"

namespace loqsmith {

/// One injection, measured.
struct InjectionMeasured {
  int injection = 0;
  std::vector<Outcome<Peak>>
      peaks;  ///< one a target of Learned; conditioning: none
  std::vector<std::string> signal_units;  ///< one a peak; empty: not stated
  /// Where each peak was expected; one a peak, nothing: not known.
  std::vector<std::optional<double>> expected_minutes;
  SequenceFacts::FileFact fact;
  std::vector<InputProblem> problems;
  std::vector<FigureCurve> curves;
};

struct Measured {
  std::vector<InjectionMeasured> injections;  ///< in run order
  std::vector<InputFile> inputs;              ///< sorted by path
};

/// The measuring pass: every injection of every role but conditioning, over
/// the windows learned. One task a file; the outcome does not depend on
/// `jobs`.
Measured measure_sequence(
    const SequenceFolder& folder, const Learned& learned, unsigned jobs,
    const std::function<void(std::size_t, std::size_t)>& progress);

}  // namespace loqsmith
