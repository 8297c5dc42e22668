#pragma once

#include <optional>
#include <string>

#include "loqsmith/chromatogram/trace.hpp"

namespace loqsmith {

/// Which chromatogram of a file a method means (`<trace>` of the method).
struct TraceSelector {
  enum class Kind { Any, Absorption, Emission, Srm, Sim, Tic, Extracted };

  std::string id;
  Kind kind = Kind::Any;
  std::string name;  ///< contained, case-sensitive; empty: any
  std::optional<double> precursor_mz;
  std::optional<double> product_mz;
  std::optional<double> mz;
  double tolerance_mz = 0.5;            ///< m/z units
  std::optional<double> tolerance_ppm;  ///< parts per million, instead
};

/// True when the header fits everything the selector states. `mz` means the
/// precursor of a SIM or selected-ion trace. A selector that states an m/z
/// never matches a trace that states none.
bool matches(const TraceSelector& selector, const TraceHeader& header);

/// "srm, precursor 233.1, product 72.1 (+/- 0.3)": for messages.
std::string describe(const TraceSelector& selector);

}  // namespace loqsmith
