#pragma once

#include <stdlib.h>

#include <filesystem>
#include <stdexcept>
#include <string>
#include <system_error>

namespace loqsmith::test {

/// A fresh empty folder below the system's temporary folder, removed with all
/// that is in it when the test ends.
class TempFolder {
 public:
  TempFolder() : TempFolder(std::filesystem::temp_directory_path()) {}

  /// Below another folder: kept_in_memory() for tests that flush often.
  explicit TempFolder(const std::filesystem::path& below) {
    std::string name = (below / "loqsmith-test-XXXXXX").string();
    if (::mkdtemp(name.data()) == nullptr) {
      throw std::runtime_error("cannot create " + name);
    }
    path_ = std::filesystem::canonical(name);
  }

  ~TempFolder() {
    std::error_code ignored;
    std::filesystem::remove_all(path_, ignored);
  }

  /// Linux's file system in memory where there is one.
  static std::filesystem::path kept_in_memory() {
    return std::filesystem::is_directory("/dev/shm")
               ? std::filesystem::path("/dev/shm")
               : std::filesystem::temp_directory_path();
  }

  TempFolder(const TempFolder&) = delete;
  TempFolder& operator=(const TempFolder&) = delete;

  const std::filesystem::path& path() const { return path_; }

  std::filesystem::path operator/(const std::filesystem::path& name) const {
    return path_ / name;
  }

 private:
  std::filesystem::path path_;
};

}  // namespace loqsmith::test
