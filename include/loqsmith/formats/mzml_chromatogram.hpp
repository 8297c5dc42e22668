#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/chromatogram/trace.hpp"
#include "loqsmith/formats/chromatogram_file.hpp"
#include "loqsmith/formats/document_source.hpp"
#include "loqsmith/formats/mzml_node.hpp"
#include "loqsmith/formats/mzml_terms.hpp"
#include "loqsmith/formats/text_places.hpp"

namespace loqsmith {

/// Where one array's numbers are and how they are stored.
struct MzmlArray {
  std::size_t offset = 0;
  std::string_view word;  ///< "time array", "signal array"
  NumberType type = NumberType::Float64;
  bool zlib = false;
  std::size_t points = 0;
  std::size_t encoded_length = 0;
  std::vector<TextPiece> text;
};

/// What a <chromatogram> says, its numbers not yet decoded.
struct MzmlChromatogram {
  TraceHeader header;
  std::vector<std::string> warnings;
  std::optional<InputProblem> fault;  ///< refused: the arrays mean nothing
  MzmlArray time;
  MzmlArray signal;
  TimeUnit unit;
};

/// Reads header, parameters (through groups too) and the arrays' description.
/// @param fault  what the scan already found wrong inside the element
/// @throws WholeFileError for lengths below zero
MzmlChromatogram read_mzml_chromatogram(
    const MzmlNode& node, const ParamGroups& groups, DocumentSource& source,
    const std::optional<InputProblem>& fault);

/// The parameters of an element, groups resolved.
/// @throws InputError for a group that is not there, or more than 1000 of them
std::vector<CvParam> resolved_params(const MzmlNode& node,
                                     const ParamGroups& groups,
                                     DocumentSource& source);

}  // namespace loqsmith
