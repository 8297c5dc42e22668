#pragma once

#include <cstdint>
#include <filesystem>
#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/ledger/deviation.hpp"

namespace loqsmith {

struct ManifestFile {
  std::string path;  ///< relative to the run's folder, with '/'
  std::uint64_t bytes = 0;
  std::string sha256;
};

/// manifest.json: every file of a run but itself, sorted by the paths' bytes.
struct Manifest {
  std::string run;  ///< "well-water-0412/run-0001"
  std::vector<ManifestFile> files;
};

/// Hashes every file below the folder, `owner` at its top left out.
/// @throws Halt 70 where something lies there that is no regular file or whose
///         name is no UTF-8: the program never writes such.
Manifest make_manifest(const std::filesystem::path& folder,
                       const std::string& run);

/// The only bytes that stand for this manifest.
std::string manifest_text(const Manifest& manifest);

/// Strict: the text must be what manifest_text() gives for what it says.
Outcome<Manifest> read_manifest(std::string_view text);

struct RunCheck {
  std::vector<Deviation> deviations;
  std::vector<std::string> files;  ///< that the manifest names
  bool manifest_trusted = false;   ///< it is the one that the ledger means
};

/// Holds a run's folder against the SHA-256 of its manifest that the ledger
/// gives, and its files against the manifest: only where that is the right one,
/// as a changed manifest would blame files that are not at fault. Files that
/// the manifest does not name are not looked for.
/// @param run  "well-water-0412/run-0001", names it in the deviations
RunCheck check_run_folder(const std::filesystem::path& folder,
                          const std::string& run,
                          const std::string& manifest_sha256);

}  // namespace loqsmith
