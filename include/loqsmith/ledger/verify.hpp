#pragma once

#include <chrono>
#include <cstdint>
#include <filesystem>
#include <optional>
#include <string>
#include <vector>

#include "loqsmith/ledger/deviation.hpp"
#include "loqsmith/ledger/ledger.hpp"

namespace loqsmith {

struct VerifyReport {
  std::uint64_t lines = 0;
  std::uint64_t runs = 0;
  std::uint64_t files = 0;
  std::uint64_t inputs =
      0;  ///< hashed again and the same, one a run that used it
  std::uint64_t signatures = 0;  ///< of runs, by persons
  LedgerPlace head;
  std::vector<Deviation> deviations;
  std::vector<std::string> notes;  ///< e.g. a run at work, an abandoned staging
};

/// What is looked at beside the promise itself.
struct VerifyRequest {
  /// How long to look again where a writer at work may be the explanation.
  std::chrono::milliseconds patience{250};
  /// A place written down elsewhere that the ledger must still extend.
  std::optional<LedgerPlace> since;
  /// Whether to hash the sheets and files that each run was computed from
  /// again, where they still are: what is missing is a note.
  bool inputs = false;
  /// The machine's public key, which published lines must be signed by
  /// (check_machine_key()); empty: only by the key that each names.
  std::string machine_key;
};

/// Reads only: every published file, every link, head, manifests against the
/// ledger, files that no manifest names. Needs no lock and no write access.
///
/// A run that has begun and not ended is a note: it may be at work. Time that
/// goes back from one line to the next is a deviation, as no line is written
/// so. What an interruption left between line and head, or between line and
/// folder, is a deviation until the next start has mended it; where a writer
/// at work explains it, looking again after some milliseconds settles it.
///
/// Chain and head written anew as a whole by someone with write access look
/// right: that shows only against a LedgerPlace written down elsewhere.
///
/// @throws Halt 74 where `out` is no folder that can be read.
VerifyReport verify_out(const std::filesystem::path& out,
                        const VerifyRequest& request);

/// The same without a place to extend and without the inputs.
VerifyReport verify_out(
    const std::filesystem::path& out,
    std::chrono::milliseconds patience = std::chrono::milliseconds{250});

}  // namespace loqsmith
