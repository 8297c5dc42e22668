#pragma once

#include <cstdint>
#include <filesystem>
#include <string>
#include <string_view>
#include <vector>

namespace loqsmith {

// The only place that touches the file system. Failures of the operating
// system throw std::system_error with the path in its message.

/// The whole regular file (a symbolic link to one is followed); refuses
/// folders, FIFOs and anything larger than `most_bytes` (InputError, named
/// `shown` in messages), and a file whose size or modification time changes
/// while it is read.
std::string read_input_file(const std::filesystem::path& path,
                            const std::string& shown,
                            std::uint64_t most_bytes = std::uint64_t{4} << 30U);

/// The whole file, for our own files.
std::string read_file(const std::filesystem::path& path);

/// Writes and flushes to the disk; the file must not exist yet.
void write_new_file(const std::filesystem::path& path, std::string_view bytes);

/// Writes NAME.new beside it, flushes, renames over, flushes the folder.
void replace_file(const std::filesystem::path& path, std::string_view bytes);

/// Appends and flushes to the disk.
void append_to_file(const std::filesystem::path& path, std::string_view bytes);

void flush_file(const std::filesystem::path& path);
void flush_folder(const std::filesystem::path& path);

/// Creates the folder and those above it that are missing; flushes each folder
/// in which one was created.
void make_folders(const std::filesystem::path& path);

/// Cuts the file to its first `bytes` bytes and flushes it.
void cut_file(const std::filesystem::path& path, std::uint64_t bytes);

void remove_file(const std::filesystem::path& path);

/// Removes the folder and all below it; symbolic links are not followed.
void remove_tree(const std::filesystem::path& folder);

/// Flushes every regular file and every folder at and below `folder`.
void flush_tree(const std::filesystem::path& folder);

struct FileDigest {
  std::string sha256;
  std::uint64_t bytes = 0;
};

/// SHA-256 and size of a regular file, read in pieces. Anything else, a
/// symbolic link included, throws std::system_error.
FileDigest digest_file(const std::filesystem::path& path);

/// Whether there is anything by that name, a broken symbolic link included.
bool is_there(const std::filesystem::path& path);

/// Renames without replacing anything (renameat2, RENAME_NOREPLACE).
void rename_new(const std::filesystem::path& from,
                const std::filesystem::path& to);

/// All that is no folder below a folder, as relative paths with '/', sorted by
/// bytes: regular files, and also FIFOs and the like. Symbolic links are listed
/// but not followed.
std::vector<std::string> files_below(const std::filesystem::path& folder);

/// Why a relative path of a sheet may not be used: "empty", "absolute", "holds
/// a control character", "leaves the folder" (any ".." in it), "a symbolic link
/// out of the folder" (or in circles); empty where it may. Does not require
/// that the file exists; the folder must.
std::string unsafe_path(const std::filesystem::path& folder,
                        const std::string& relative);

/// An advisory lock (flock) on a file, released when destroyed.
class FileLock {
 public:
  FileLock() = default;
  ~FileLock();
  FileLock(FileLock&& other) noexcept;
  FileLock& operator=(FileLock&& other) noexcept;
  FileLock(const FileLock&) = delete;
  FileLock& operator=(const FileLock&) = delete;

  /// Creates the file where needed; false when another process holds it.
  bool try_lock(const std::filesystem::path& path);
  bool held() const { return descriptor_ >= 0; }
  void release();

 private:
  int descriptor_ = -1;
};

}  // namespace loqsmith
