#include "loqsmith/base/files.hpp"

#include <fcntl.h>
#include <sys/stat.h>
#include <unistd.h>

#include <algorithm>
#include <cerrno>
#include <system_error>
#include <utility>

#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/file_ops.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;

void write_all(int descriptor, const fs::path& path, std::string_view bytes) {
  while (!bytes.empty()) {
    bytes.remove_prefix(
        file_ops::write(descriptor, path, bytes.data(), bytes.size()));
  }
}

// O_NOFOLLOW: a link planted under one of our names must not lead the writing
// to another file.
void write_file(const fs::path& path, int flags, std::string_view bytes) {
  Descriptor file(
      file_ops::open(path, O_WRONLY | O_CREAT | O_NOFOLLOW | flags, 0666));
  write_all(file.number(), path, bytes);
  file_ops::flush(file.number(), path);
  file.close(path);
}

fs::path parent_of(const fs::path& path) {
  const fs::path parent = path.parent_path();
  return parent.empty() ? fs::path(".") : parent;
}

// O_NONBLOCK: opening a FIFO that nobody writes to must not wait for ever.
int open_regular(const fs::path& path) {
  const int descriptor =
      file_ops::open(path, O_RDONLY | O_NOFOLLOW | O_NONBLOCK);
  struct stat found {};
  if (::fstat(descriptor, &found) != 0 || !S_ISREG(found.st_mode)) {
    ::close(descriptor);
    throw std::system_error(EINVAL, std::generic_category(),
                            "not a regular file: " + path.string());
  }
  return descriptor;
}

}  // namespace

std::string read_file(const fs::path& path) {
  const Descriptor file(open_regular(path));
  std::string bytes;
  std::string piece(std::size_t{1} << 16U, '\0');
  while (true) {
    const std::size_t count =
        file_ops::read(file.number(), path, piece.data(), piece.size());
    if (count == 0) return bytes;
    bytes.append(piece, 0, count);
  }
}

FileDigest digest_file(const fs::path& path) {
  const Descriptor file(open_regular(path));
  Sha256 digest;
  FileDigest result;
  std::string piece(std::size_t{1} << 16U, '\0');
  while (true) {
    const std::size_t count =
        file_ops::read(file.number(), path, piece.data(), piece.size());
    if (count == 0) break;
    digest.add(std::string_view(piece).substr(0, count));
    result.bytes += count;
  }
  result.sha256 = digest.finish_hex();
  return result;
}

void write_new_file(const fs::path& path, std::string_view bytes) {
  write_file(path, O_EXCL, bytes);
}

void replace_file(const fs::path& path, std::string_view bytes) {
  fs::path beside = path;
  beside += ".new";
  write_file(beside, O_TRUNC, bytes);
  file_ops::rename(beside, path);
  flush_folder(parent_of(path));
}

void append_to_file(const fs::path& path, std::string_view bytes) {
  write_file(path, O_APPEND, bytes);
}

void cut_file(const fs::path& path, std::uint64_t bytes) {
  Descriptor file(file_ops::open(path, O_WRONLY | O_NOFOLLOW));
  file_ops::truncate(file.number(), path, static_cast<off_t>(bytes));
  file_ops::flush(file.number(), path);
  file.close(path);
}

void flush_file(const fs::path& path) {
  const Descriptor file(open_regular(path));
  file_ops::flush(file.number(), path);
}

void flush_folder(const fs::path& path) {
  const Descriptor folder(file_ops::open(path, O_RDONLY | O_DIRECTORY));
  file_ops::flush(folder.number(), path);
}

void flush_tree(const fs::path& folder) {
  for (const auto& entry : fs::recursive_directory_iterator(folder)) {
    const fs::file_status status = entry.symlink_status();
    if (fs::is_regular_file(status)) flush_file(entry.path());
    if (fs::is_directory(status)) flush_folder(entry.path());
  }
  flush_folder(folder);
}

void make_folders(const fs::path& path) {
  if (path.empty() || fs::is_directory(path)) return;
  const fs::path parent = parent_of(path);
  if (parent != path) make_folders(parent);
  if (file_ops::make_folder(path)) flush_folder(parent);
}

void remove_file(const fs::path& path) { file_ops::remove_file(path); }

void remove_tree(const fs::path& folder) {
  std::vector<fs::path> entries;
  for (const auto& entry : fs::directory_iterator(folder)) {
    entries.push_back(entry.path());
  }
  std::sort(entries.begin(), entries.end());
  for (const fs::path& entry : entries) {
    if (fs::is_directory(fs::symlink_status(entry))) {
      remove_tree(entry);
    } else {
      file_ops::remove_file(entry);
    }
  }
  file_ops::remove_folder(folder);
}

bool is_there(const fs::path& path) {
  return fs::exists(fs::symlink_status(path));
}

void rename_new(const fs::path& from, const fs::path& to) {
  file_ops::rename_new(from, to);
}

std::vector<std::string> files_below(const fs::path& folder) {
  std::vector<std::string> names;
  for (const auto& entry : fs::recursive_directory_iterator(folder)) {
    if (fs::is_directory(entry.symlink_status())) continue;
    names.push_back(entry.path().lexically_relative(folder).generic_string());
  }
  std::sort(names.begin(), names.end());
  return names;
}

FileLock::~FileLock() { release(); }

FileLock::FileLock(FileLock&& other) noexcept
    : descriptor_(std::exchange(other.descriptor_, -1)) {}

FileLock& FileLock::operator=(FileLock&& other) noexcept {
  if (this != &other) {
    release();
    descriptor_ = std::exchange(other.descriptor_, -1);
  }
  return *this;
}

bool FileLock::try_lock(const fs::path& path) {
  release();
  while (true) {
    const int descriptor =
        file_ops::open(path, O_RDWR | O_CREAT | O_NOFOLLOW, 0666);
    Descriptor file(descriptor);
    if (!file_ops::try_lock(descriptor, path)) return false;
    // Somebody may have removed the file between opening and locking: the lock
    // would then be on a file that nobody else finds.
    struct stat locked {};
    struct stat found {};
    const bool same = ::fstat(descriptor, &locked) == 0 &&
                      ::stat(path.c_str(), &found) == 0 &&
                      locked.st_ino == found.st_ino &&
                      locked.st_dev == found.st_dev;
    if (!same) continue;
    descriptor_ = file.let_go();
    return true;
  }
}

void FileLock::release() {
  if (descriptor_ >= 0) ::close(std::exchange(descriptor_, -1));
}

}  // namespace loqsmith
