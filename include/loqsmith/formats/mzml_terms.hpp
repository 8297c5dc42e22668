#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/chromatogram/trace.hpp"
#include "loqsmith/formats/binary_numbers.hpp"

namespace loqsmith {

// The few terms of the PSI-MS controlled vocabulary (release 4.1.257) and of
// the Unit Ontology (release 2026-01-16) that reading a chromatogram needs.
// The accession decides; names are decoration.

inline constexpr std::string_view kTimeArray = "MS:1000595";
inline constexpr std::string_view kIntensityArray = "MS:1000515";
inline constexpr std::string_view kTitle = "MS:1000809";
inline constexpr std::string_view kIsolationTarget = "MS:1000827";
inline constexpr std::string_view kSelectedIonMz = "MS:1000744";
inline constexpr std::string_view kSampleName = "MS:1000002";

/// A descendant of MS:1000626, chromatogram type; nothing for other terms.
std::optional<TraceKind> chromatogram_type(std::string_view accession);

/// True for the terms below MS:1000513, kind of a data array.
bool is_array_kind(std::string_view accession);
/// True for the kinds whose values can be a trace's signal.
bool is_signal_kind(std::string_view accession);

/// One term below MS:1000518, data type, or MS:1000572, compression.
struct EncodingTerm {
  std::string_view accession;
  std::string_view name;
  bool readable = false;  ///< by this version
};
const EncodingTerm* data_type_term(std::string_view accession);
const EncodingTerm* compression_term(std::string_view accession);
NumberType number_type(const EncodingTerm& readable_type);
inline constexpr std::string_view kZlib = "MS:1000574";

/// One unit.
struct UnitTerm {
  std::string_view accession;
  std::string_view name;
  std::string_view former_name;  ///< still written by some; empty: none
};
const UnitTerm* unit_term(std::string_view accession);

/// How many of a time unit make a minute, and whether mzML's vocabulary lists
/// the unit for time arrays. Nothing for units that are not read.
struct TimeUnit {
  double numerator = 1.0;  ///< minutes = value * numerator / denominator
  double denominator = 1.0;
  bool listed = true;
};
std::optional<TimeUnit> time_unit(std::string_view accession);

}  // namespace loqsmith
