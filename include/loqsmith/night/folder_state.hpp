#pragma once

#include <chrono>
#include <filesystem>
#include <string>
#include <utility>
#include <vector>

#include "loqsmith/night/sequence_folder.hpp"

namespace loqsmith {

/// Sheets and listed files, sorted, each once, there or not.
std::vector<std::string> files_of(const SequenceFolder& folder);

/// In what state a sequence folder was found.
struct FolderState {
  /// SHA-256 over path, size and modification time of each file, sorted by
  /// path: cheap, and changes when a file is merely touched.
  std::string listing;
  std::vector<std::string> files;    ///< sheets and listed files that are there
  std::vector<std::string> missing;  ///< listed, but not there
  std::filesystem::file_time_type newest;  ///< latest modification
};

/// The sheets and the files that sequence.csv lists; where the sheets cannot be
/// read, all files below the folder.
FolderState look_at_folder(const std::filesystem::path& folder);

/// The same for a list of files that is known already.
/// @param files  relative to the folder
FolderState state_of_files(const std::filesystem::path& folder,
                           std::vector<std::string> files);

/// SHA-256 over path and SHA-256 of each file, sorted by path; one that
/// has no hash, because it is missing or cannot be read, does not count.
std::string contents_of(std::vector<std::pair<std::string, std::string>> files);

/// The same, with every file of the state read and hashed.
std::string hash_contents(const std::filesystem::path& folder,
                          const FolderState& state);

}  // namespace loqsmith
