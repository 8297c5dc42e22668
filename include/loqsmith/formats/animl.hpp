#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/formats/chromatogram_file.hpp"

namespace loqsmith {

/// Reads an AnIML document. Parameters, result and errors as
/// read_chromatogram_file has them.
///
/// @param bytes  the document in UTF-8, not proved well-formed yet
FileContents read_animl(std::string_view bytes, const std::string& name,
                        const ReadPolicy& policy,
                        const std::vector<TraceSelector>* wanted);

}  // namespace loqsmith
