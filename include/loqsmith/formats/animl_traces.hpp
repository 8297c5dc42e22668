#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <vector>

#include "loqsmith/formats/animl_units.hpp"
#include "loqsmith/formats/animl_values.hpp"

namespace loqsmith {

/// What a SeriesSet says of one trace, its numbers not yet decoded.
struct AnimlTrace {
  TraceHeader header;
  std::vector<std::string> warnings;
  std::optional<InputProblem> fault;  ///< refused: the series mean nothing
  AnimlSeries time;
  AnimlSeries signal;
  TimeUnit unit;
};

/// The traces of one SeriesSet, and why its other Series are none. A trace is
/// the one independent numeric Series in a unit of time together with one
/// dependent numeric Series.
struct AnimlSetTraces {
  std::vector<AnimlTrace> traces;
  std::vector<std::string> skipped;
};

/// Headers hold what the set itself says: no run, no id.
/// @throws WholeFileError for a seriesID given twice and for a negative length
AnimlSetTraces read_animl_series_set(const AnimlNode& set,
                                     const AnimlTree& tree,
                                     DocumentSource& source);

}  // namespace loqsmith
