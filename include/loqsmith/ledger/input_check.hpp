#pragma once

#include <filesystem>
#include <map>
#include <string>

#include "loqsmith/ledger/run_history.hpp"
#include "loqsmith/ledger/verify.hpp"

namespace loqsmith {

/// Holds the files that runs were computed from against the SHA-256 that each
/// run's record.json gives them. A file is hashed once, however many runs used
/// it.
class InputCheck {
 public:
  /// A file that differs is a deviation; one that is not there any more, or
  /// could not be read when the run was made, a note.
  /// @param folder  where the run's files lie; they are what the manifest says
  void check_run(const std::filesystem::path& folder, const RunEvents& run,
                 VerifyReport& report);

 private:
  struct Found {
    std::string sha256;  ///< empty: not there or not readable
    std::string why;     ///< then
  };
  const Found& find(const std::filesystem::path& folder,
                    const std::string& file);

  std::map<std::string, Found> found_;
};

}  // namespace loqsmith
