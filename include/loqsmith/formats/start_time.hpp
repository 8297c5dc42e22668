#pragma once

#include <optional>
#include <string>

namespace loqsmith {

/// What is worth saying of a run's start as the file has it: no date at all, or
/// a zone that is not stated (none is supposed then). Nothing for an empty text
/// and for a moment with its zone.
std::optional<std::string> start_time_warning(const std::string& written);

}  // namespace loqsmith
