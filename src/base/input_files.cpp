#include <fcntl.h>
#include <sys/stat.h>

#include <algorithm>
#include <cerrno>
#include <system_error>

#include "loqsmith/base/file_ops.hpp"
#include "loqsmith/base/files.hpp"
#include "loqsmith/base/input_error.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;

struct stat state_of(int descriptor, const fs::path& path) {
  struct stat state {};
  if (::fstat(descriptor, &state) != 0) {
    throw std::system_error(errno, std::generic_category(),
                            "cannot look at " + path.string());
  }
  return state;
}

void refuse(const std::string& shown, const std::string& found,
            const std::string& expected, const std::string& mend) {
  InputProblem problem;
  problem.file = shown;
  problem.found = found;
  problem.expected = expected;
  problem.mend = mend;
  throw InputError(problem);
}

void check_kind(const struct stat& state, const std::string& shown,
                std::uint64_t most_bytes) {
  if (S_ISDIR(state.st_mode)) {
    refuse(shown, "a folder", "a file", "name the file inside it");
  }
  if (!S_ISREG(state.st_mode)) {
    refuse(shown, "a pipe, socket or device", "a regular file",
           "copy its contents into a file");
  }
  if (static_cast<std::uint64_t>(state.st_size) > most_bytes) {
    refuse(shown, std::to_string(state.st_size) + " bytes",
           "at most " + std::to_string(most_bytes) + " bytes",
           "check that this is the right file");
  }
}

bool same_state(const struct stat& a, const struct stat& b) {
  return a.st_size == b.st_size && a.st_mtim.tv_sec == b.st_mtim.tv_sec &&
         a.st_mtim.tv_nsec == b.st_mtim.tv_nsec;
}

// One byte more than the size is asked for, so that growth shows.
std::string read_up_to(int descriptor, const fs::path& path,
                       std::size_t most_bytes) {
  std::string bytes(most_bytes, '\0');
  std::size_t filled = 0;
  while (filled < bytes.size()) {
    const std::size_t count = file_ops::read(
        descriptor, path, bytes.data() + filled, bytes.size() - filled);
    if (count == 0) break;
    filled += count;
  }
  bytes.resize(filled);
  return bytes;
}

bool is_below(const fs::path& path, const fs::path& folder) {
  const auto [stop, ignored] =
      std::mismatch(folder.begin(), folder.end(), path.begin(), path.end());
  return stop == folder.end();
}

bool has_control_character(const std::string& text) {
  return std::any_of(text.begin(), text.end(), [](char c) {
    const auto byte = static_cast<unsigned char>(c);
    return byte < 0x20U || byte == 0x7FU;
  });
}

// Follows the links of the path one after the other, so that one that leads to
// nothing yet is judged too. True where every step stays in the folder.
bool links_stay_inside(const fs::path& folder, const fs::path& path,
                       int links_left) {
  fs::path reached;
  for (auto part = path.begin(); part != path.end(); ++part) {
    if (*part == "..") {
      reached = reached.parent_path();
      continue;
    }
    reached /= *part;
    if (!fs::is_symlink(fs::symlink_status(reached))) continue;
    // Links above the folder are the user's own way to it.
    fs::path next = fs::read_symlink(reached);
    if (next.is_relative()) next = reached.parent_path() / next;
    for (++part; part != path.end(); ++part) next /= *part;
    return links_left > 0 && links_stay_inside(folder, next, links_left - 1);
  }
  return is_below(reached.lexically_normal(), folder);
}

}  // namespace

std::string read_input_file(const fs::path& path, const std::string& shown,
                            std::uint64_t most_bytes) {
  // O_NONBLOCK: opening a FIFO that nobody writes to must not wait for ever.
  const Descriptor file(file_ops::open(path, O_RDONLY | O_NONBLOCK));
  const struct stat before = state_of(file.number(), path);
  check_kind(before, shown, most_bytes);
  const auto size = static_cast<std::size_t>(before.st_size);
  std::string bytes = read_up_to(file.number(), path, size + 1);
  if (bytes.size() != size ||
      !same_state(before, state_of(file.number(), path))) {
    refuse(shown, "one that changed while it was read", "a finished file",
           "wait until it is complete and start again");
  }
  return bytes;
}

std::string unsafe_path(const fs::path& folder, const std::string& relative) {
  constexpr int kMostLinks = 40;
  if (relative.empty()) return "empty";
  if (has_control_character(relative)) return "holds a control character";
  const fs::path path(relative);
  if (path.is_absolute()) return "absolute";
  if (std::find(path.begin(), path.end(), "..") != path.end()) {
    return "leaves the folder";
  }
  const fs::path root = fs::canonical(folder);
  if (!links_stay_inside(root, root / path, kMostLinks)) {
    return "a symbolic link out of the folder";
  }
  return {};
}

}  // namespace loqsmith
