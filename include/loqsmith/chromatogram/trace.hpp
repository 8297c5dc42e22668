#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <vector>

#include "loqsmith/base/input_error.hpp"

namespace loqsmith {

/// What a chromatogram shows, as far as the file says it.
enum class TraceKind {
  Unknown,
  Absorption,
  Emission,
  Srm,  ///< selected reaction monitoring
  Sim,  ///< selected ion monitoring
  Tic,  ///< total ion current
  BasePeak,
  SelectedIon,
  Pressure,
  Flow,
  Temperature,
  Other,
};

std::string trace_kind_name(TraceKind kind);

/// What a file says of one trace, without its points.
struct TraceHeader {
  std::string id;   ///< mzML chromatogram id; AnIML step id / result / series
  std::string run;  ///< mzML run id; AnIML id of the outermost step
  std::vector<std::string> names;  ///< every text a method's `name` may match
  TraceKind kind = TraceKind::Unknown;
  std::optional<double> precursor_mz;
  std::optional<double> product_mz;
  std::string time_unit;    ///< as the file states it: "minute", "second", ...
  std::string signal_unit;  ///< as the file states it; empty: not stated
  std::string encoding;     ///< e.g. "64-bit float, zlib"
  std::size_t points = 0;
};

/// One chromatogram. Times strictly increase; all numbers are finite; both
/// vectors have the same length. Nothing is rescaled but the time.
struct Trace {
  TraceHeader header;
  std::vector<double> minutes;
  std::vector<double> signal;         ///< in header.signal_unit
  std::vector<std::string> warnings;  ///< accepted, but worth saying
};

/// A trace that was refused, and why. Asking for it is an InputError.
struct RefusedTrace {
  TraceHeader header;
  InputProblem problem;
};

}  // namespace loqsmith
