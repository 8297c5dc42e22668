#pragma once

#include <sys/types.h>

#include <cstddef>
#include <filesystem>
#include <functional>
#include <limits>
#include <utility>

namespace loqsmith {

/// What is about to be asked of the operating system.
enum class FileOperation {
  Open,
  Read,
  Write,
  Flush,
  Rename,
  Remove,
  MakeFolder,
  Truncate,
  Lock,
};

/// What shall happen instead: an errno value (0: go ahead), and at most so many
/// bytes in one write, so that a line can be torn.
struct FileFault {
  int error = 0;
  std::size_t most_bytes = std::numeric_limits<std::size_t>::max();
};

using FileHook =
    std::function<FileFault(FileOperation, const std::filesystem::path&)>;

/// Asked before each file operation of this process; an empty function takes it
/// away. For tests of faults and kills, set before other threads start.
void set_file_hook(FileHook hook);

/// The calls themselves, the only way to the file system for whatever changes
/// it. Each is repeated while it is interrupted (EINTR), asks the hook first,
/// and throws std::system_error with the operation and the path.
namespace file_ops {

int open(const std::filesystem::path& path, int flags, mode_t mode = 0);
std::size_t read(int descriptor, const std::filesystem::path& path,
                 char* buffer, std::size_t size);
std::size_t write(int descriptor, const std::filesystem::path& path,
                  const char* bytes, std::size_t size);
void flush(int descriptor, const std::filesystem::path& path);
void rename(const std::filesystem::path& from, const std::filesystem::path& to);
void rename_new(const std::filesystem::path& from,
                const std::filesystem::path& to);
void remove_file(const std::filesystem::path& path);
void remove_folder(const std::filesystem::path& path);
/// False where it exists already.
bool make_folder(const std::filesystem::path& path);
void truncate(int descriptor, const std::filesystem::path& path, off_t size);
/// False where somebody else holds the lock.
bool try_lock(int descriptor, const std::filesystem::path& path);

}  // namespace file_ops

/// A file descriptor that is closed in any case.
class Descriptor {
 public:
  explicit Descriptor(int number) : number_(number) {}
  ~Descriptor();
  Descriptor(const Descriptor&) = delete;
  Descriptor& operator=(const Descriptor&) = delete;

  int number() const { return number_; }
  /// The caller closes it from now on.
  int let_go() { return std::exchange(number_, -1); }
  /// Closes now and throws where that fails: after writing, a failed close is
  /// a failed write.
  void close(const std::filesystem::path& path);

 private:
  int number_;
};

}  // namespace loqsmith
