#pragma once

#include <filesystem>
#include <vector>

namespace loqsmith {

/// Every folder at or below `root` that holds a sequence.csv, sorted by path.
/// A sequence folder's own folders are not searched; `out`, hidden folders and
/// symbolic links are not entered, nor what may not be read.
/// @throws Halt 64 where root is no folder, or OUT lies in a sequence folder
std::vector<std::filesystem::path> find_sequences(
    const std::filesystem::path& root, const std::filesystem::path& out);

}  // namespace loqsmith
