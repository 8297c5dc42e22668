#pragma once

#include <optional>
#include <string>
#include <vector>

#include "loqsmith/chromatogram/sequence.hpp"
#include "loqsmith/judgement/rows.hpp"
#include "loqsmith/judgement/settings.hpp"

namespace loqsmith {

/// One injection of a sample, diluted or not, with its result.
struct Repeat {
  const ResultRow* row = nullptr;
  const Injection* injection = nullptr;
  std::optional<double> end_of_range;  ///< in the sample, as row->result is
};

/// All injections of one sample: same name, same unit, role "sample".
struct SampleRepeats {
  std::string sample;
  std::string unit;
  std::vector<Repeat> repeats;  ///< in run order, at least one
};

/// The samples in the order of their first injection. What is handed in must
/// outlive what is returned.
std::vector<SampleRepeats> repeats_of_samples(
    const std::vector<ResultRow>& results,
    const std::vector<CalibrationSet>& sets, const Sequence& sequence,
    const UnitSettings& units);

/// The results of those in range (status "reportable").
std::vector<double> results_in_range(const std::vector<Repeat>& repeats);

/// Largest minus smallest over their midpoint, in percent: the largest relative
/// difference between any two of them.
/// @pre at least one value, all above zero
double percent_difference(const std::vector<double>& values);

}  // namespace loqsmith
