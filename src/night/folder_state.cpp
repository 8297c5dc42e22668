#include "loqsmith/night/folder_state.hpp"

#include <algorithm>
#include <set>
#include <system_error>

#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/files.hpp"
#include "loqsmith/base/input_error.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;

std::vector<std::string> files_that_count(const fs::path& folder) {
  try {
    const SequenceFolder opened = open_sequence_folder(folder, "state");
    return files_of(opened);
  } catch (const InputError&) {
    // Sheets that cannot be read list nothing: any change may mend them.
    return files_below(folder);
  }
}

}  // namespace

std::vector<std::string> files_of(const SequenceFolder& folder) {
  std::set<std::string> files;
  for (const InputFile& sheet : folder.sheet_files) files.insert(sheet.path);
  for (const Injection& injection : folder.sheets.sequence.injections) {
    files.insert(fs::path(injection.file).lexically_normal().generic_string());
  }
  return {files.begin(), files.end()};
}

std::string contents_of(
    std::vector<std::pair<std::string, std::string>> files) {
  std::sort(files.begin(), files.end());
  std::string text;
  for (const auto& [path, sha256] : files) {
    if (!sha256.empty()) text += sha256 + ' ' + path + '\n';
  }
  return sha256_hex(text);
}

FolderState state_of_files(const fs::path& folder,
                           std::vector<std::string> files) {
  std::sort(files.begin(), files.end());
  files.erase(std::unique(files.begin(), files.end()), files.end());
  FolderState state;
  state.newest = fs::file_time_type::min();
  std::string text;
  for (const std::string& file : files) {
    std::error_code error;
    const auto bytes = fs::file_size(folder / file, error);
    if (error) {
      state.missing.push_back(file);
      continue;
    }
    const auto changed = fs::last_write_time(folder / file, error);
    state.newest = std::max(state.newest, changed);
    text += file + '\n' + std::to_string(bytes) + '\n' +
            std::to_string(changed.time_since_epoch().count()) + '\n';
    state.files.push_back(file);
  }
  state.listing = sha256_hex(text);
  return state;
}

FolderState look_at_folder(const fs::path& folder) {
  return state_of_files(folder, files_that_count(folder));
}

std::string hash_contents(const fs::path& folder, const FolderState& state) {
  std::vector<std::pair<std::string, std::string>> hashes;
  for (const std::string& file : state.files) {
    std::string sha256;
    try {
      sha256 = digest_file(fs::canonical(folder / file)).sha256;
    } catch (const std::system_error&) {
      sha256.clear();
    }
    hashes.emplace_back(file, sha256);
  }
  return contents_of(std::move(hashes));
}

}  // namespace loqsmith
