#include "loqsmith/base/file_ops.hpp"

#include <fcntl.h>
#include <sys/file.h>
#include <sys/stat.h>
#include <unistd.h>

#include <algorithm>
#include <cerrno>
#include <cstdio>
#include <string>
#include <system_error>
#include <utility>

namespace loqsmith {
namespace {

FileHook& hook() {
  static FileHook installed;
  return installed;
}

[[noreturn]] void fail(int error, const char* what,
                       const std::filesystem::path& path) {
  throw std::system_error(error, std::generic_category(),
                          std::string("cannot ") + what + ' ' + path.string());
}

FileFault ask(FileOperation operation, const std::filesystem::path& path) {
  return hook() ? hook()(operation, path) : FileFault{};
}

// Runs one system call, again while it is interrupted; -1 with errno set where
// it failed or the hook wants it to.
template <class Call>
auto call(FileOperation operation, const std::filesystem::path& path,
          Call system_call) {
  while (true) {
    const FileFault fault = ask(operation, path);
    decltype(system_call(fault)) result = -1;
    if (fault.error != 0) {
      errno = fault.error;
    } else {
      result = system_call(fault);
    }
    if (result != -1 || errno != EINTR) return result;
  }
}

// File systems without RENAME_NOREPLACE (some network ones) answer EINVAL.
// Looking first is enough there: whoever publishes holds the ledger's lock, and
// a folder never replaces another that has something in it.
int rename_without_replacing(const std::filesystem::path& from,
                             const std::filesystem::path& to) {
  const int result = ::renameat2(AT_FDCWD, from.c_str(), AT_FDCWD, to.c_str(),
                                 RENAME_NOREPLACE);
  if (result == 0 || (errno != EINVAL && errno != ENOSYS)) return result;
  struct stat found {};
  if (::lstat(to.c_str(), &found) == 0) {
    errno = EEXIST;
    return -1;
  }
  return ::rename(from.c_str(), to.c_str());
}

}  // namespace

void set_file_hook(FileHook installed) { hook() = std::move(installed); }

namespace file_ops {

int open(const std::filesystem::path& path, int flags, mode_t mode) {
  const int descriptor = call(FileOperation::Open, path, [&](const FileFault&) {
    return ::open(path.c_str(), flags | O_CLOEXEC, mode);
  });
  if (descriptor < 0) fail(errno, "open", path);
  return descriptor;
}

std::size_t read(int descriptor, const std::filesystem::path& path,
                 char* buffer, std::size_t size) {
  const ssize_t count = call(FileOperation::Read, path, [&](const FileFault&) {
    return ::read(descriptor, buffer, size);
  });
  if (count < 0) fail(errno, "read", path);
  return static_cast<std::size_t>(count);
}

std::size_t write(int descriptor, const std::filesystem::path& path,
                  const char* bytes, std::size_t size) {
  const ssize_t count =
      call(FileOperation::Write, path, [&](const FileFault& fault) {
        return ::write(descriptor, bytes, std::min(size, fault.most_bytes));
      });
  if (count < 0) fail(errno, "write", path);
  return static_cast<std::size_t>(count);
}

void flush(int descriptor, const std::filesystem::path& path) {
  const int result = call(FileOperation::Flush, path, [&](const FileFault&) {
    return ::fsync(descriptor);
  });
  if (result != 0) fail(errno, "flush", path);
}

void rename(const std::filesystem::path& from,
            const std::filesystem::path& to) {
  const int result = call(FileOperation::Rename, to, [&](const FileFault&) {
    return ::rename(from.c_str(), to.c_str());
  });
  if (result != 0) fail(errno, "rename into", to);
}

void rename_new(const std::filesystem::path& from,
                const std::filesystem::path& to) {
  const int result = call(FileOperation::Rename, to, [&](const FileFault&) {
    return rename_without_replacing(from, to);
  });
  if (result != 0) fail(errno, "rename into", to);
}

void remove_file(const std::filesystem::path& path) {
  const int result = call(FileOperation::Remove, path, [&](const FileFault&) {
    return ::unlink(path.c_str());
  });
  if (result != 0) fail(errno, "remove", path);
}

void remove_folder(const std::filesystem::path& path) {
  const int result = call(FileOperation::Remove, path, [&](const FileFault&) {
    return ::rmdir(path.c_str());
  });
  if (result != 0) fail(errno, "remove", path);
}

bool make_folder(const std::filesystem::path& path) {
  const int result =
      call(FileOperation::MakeFolder, path,
           [&](const FileFault&) { return ::mkdir(path.c_str(), 0777); });
  if (result == 0) return true;
  if (errno == EEXIST && std::filesystem::is_directory(path)) return false;
  fail(errno, "create the folder", path);
}

void truncate(int descriptor, const std::filesystem::path& path, off_t size) {
  const int result = call(FileOperation::Truncate, path, [&](const FileFault&) {
    return ::ftruncate(descriptor, size);
  });
  if (result != 0) fail(errno, "cut", path);
}

bool try_lock(int descriptor, const std::filesystem::path& path) {
  const int result = call(FileOperation::Lock, path, [&](const FileFault&) {
    return ::flock(descriptor, LOCK_EX | LOCK_NB);
  });
  if (result == 0) return true;
  if (errno == EWOULDBLOCK) return false;
  fail(errno, "lock", path);
}

}  // namespace file_ops

Descriptor::~Descriptor() {
  if (number_ >= 0) ::close(number_);
}

void Descriptor::close(const std::filesystem::path& path) {
  // Linux has let go of the descriptor even where close is interrupted.
  const int result = ::close(std::exchange(number_, -1));
  if (result != 0 && errno != EINTR) fail(errno, "close", path);
}

}  // namespace loqsmith
