#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/formats/chromatogram_file.hpp"

namespace loqsmith {

/// Reads mzML 1.1, plain or wrapped in indexedmzML.
///
/// @param bytes     the document in UTF-8
/// @param original  the file's bytes, where the document was converted; else
///                  the same view. Checksum and offsets mean these.
FileContents read_mzml(std::string_view bytes, std::string_view original,
                       const std::string& name, const ReadPolicy& policy,
                       const std::vector<TraceSelector>* wanted);

}  // namespace loqsmith
