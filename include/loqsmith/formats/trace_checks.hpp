#pragma once

#include <optional>
#include <string>
#include <vector>

#include "loqsmith/chromatogram/trace.hpp"
#include "loqsmith/chromatogram/trace_selector.hpp"

namespace loqsmith {

/// True where one of the selectors matches, or where nothing is said and every
/// trace is wanted.
bool is_wanted(const std::vector<TraceSelector>* wanted,
               const TraceHeader& header);

/// Why points are no chromatogram.
struct PointFault {
  std::string found;
  std::string expected;
};

/// The first fault of a trace's points: lengths that differ, a number that is
/// not finite, a time not after the one before it. Nothing is sorted, cut or
/// replaced.
std::optional<PointFault> find_point_fault(const std::vector<double>& minutes,
                                           const std::vector<double>& signal);

/// What is accepted but worth saying: a signal without a unit, an interval
/// longer than 5 times the median one ("gap"), negative ion counts.
std::vector<std::string> point_warnings(const Trace& trace);

}  // namespace loqsmith
