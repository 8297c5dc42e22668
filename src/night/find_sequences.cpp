#include "loqsmith/night/find_sequences.hpp"

#include <algorithm>
#include <system_error>

#include "loqsmith/base/halt.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;

bool lies_in(const fs::path& inner, const fs::path& outer) {
  return std::mismatch(outer.begin(), outer.end(), inner.begin(), inner.end())
             .first == outer.end();
}

void search(const fs::path& folder, const fs::path& out,
            std::vector<fs::path>& found) {
  std::error_code error;
  if (fs::is_regular_file(folder / "sequence.csv", error)) {
    if (lies_in(out, folder)) {
      throw Halt(ExitStatus::WrongUse,
                 out.string() + " lies in the sequence folder " +
                     folder.string() +
                     ", which is only read; name another place with --out");
    }
    found.push_back(folder);
    return;
  }
  std::vector<fs::path> below;
  for (const auto& entry : fs::directory_iterator(
           folder, fs::directory_options::skip_permission_denied, error)) {
    const std::string name = entry.path().filename().string();
    if (name.starts_with('.') || entry.is_symlink(error)) continue;
    if (entry.is_directory(error)) below.push_back(entry.path());
  }
  std::sort(below.begin(), below.end());
  for (const fs::path& one : below) {
    if (one != out) search(one, out, found);
  }
}

}  // namespace

std::vector<fs::path> find_sequences(const fs::path& root,
                                     const fs::path& out) {
  std::error_code error;
  if (!fs::is_directory(root, error)) {
    throw Halt(ExitStatus::WrongUse, root.string() + " is no folder");
  }
  std::vector<fs::path> found;
  search(fs::canonical(root), fs::weakly_canonical(out), found);
  return found;
}

}  // namespace loqsmith
