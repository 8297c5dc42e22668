#pragma once

#include <cstddef>
#include <string>
#include <string_view>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/formats/chromatogram_file.hpp"
#include "loqsmith/formats/text_places.hpp"

namespace loqsmith {

/// The document that is being read.
struct DocumentSource {
  std::string_view bytes;  ///< UTF-8
  const std::string& file;
  const ReadPolicy& policy;
  TextPlaces places;

  InputProblem problem(std::size_t offset, std::string found,
                       std::string expected, std::string mend = {});
};

/// A fault that refuses the file, not just the trace it stands in.
class WholeFileError : public InputError {
 public:
  using InputError::InputError;
};

/// Most points of a trace; anything larger is refused before memory is taken.
inline constexpr std::size_t kMostPoints = std::size_t{1} << 27U;

}  // namespace loqsmith
