#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/chromatogram/trace.hpp"
#include "loqsmith/formats/chromatogram_file.hpp"
#include "loqsmith/formats/mzml_node.hpp"
#include "loqsmith/formats/mzml_terms.hpp"
#include "loqsmith/formats/text_places.hpp"

namespace loqsmith {

/// The document that is being read.
struct MzmlSource {
  std::string_view bytes;  ///< UTF-8
  const std::string& file;
  const ReadPolicy& policy;
  TextPlaces places;

  InputProblem problem(std::size_t offset, std::string found,
                       std::string expected, std::string mend = {});
};

/// A fault that refuses the file, not just the chromatogram it stands in.
class WholeFileError : public InputError {
 public:
  using InputError::InputError;
};

/// Where one array's numbers are and how they are stored.
struct MzmlArray {
  std::size_t offset = 0;
  std::string_view word;  ///< "time array", "signal array"
  NumberType type = NumberType::Float64;
  bool zlib = false;
  std::size_t points = 0;
  std::size_t encoded_length = 0;
  std::vector<MzmlText> text;
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

/// Most points of a trace; anything larger is refused before memory is taken.
inline constexpr std::size_t kMostPoints = std::size_t{1} << 27U;

/// Reads header, parameters (through groups too) and the arrays' description.
/// @param fault  what the scan already found wrong inside the element
/// @throws WholeFileError for lengths below zero
MzmlChromatogram read_mzml_chromatogram(
    const MzmlNode& node, const ParamGroups& groups, MzmlSource& source,
    const std::optional<InputProblem>& fault);

/// The parameters of an element, groups resolved.
/// @throws InputError for a group that is not there, or more than 1000 of them
std::vector<CvParam> resolved_params(const MzmlNode& node,
                                     const ParamGroups& groups,
                                     MzmlSource& source);

}  // namespace loqsmith
