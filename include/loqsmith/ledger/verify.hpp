#pragma once

#include <chrono>
#include <cstdint>
#include <filesystem>
#include <string>
#include <vector>

#include "loqsmith/ledger/deviation.hpp"
#include "loqsmith/ledger/ledger.hpp"

namespace loqsmith {

struct VerifyReport {
  std::uint64_t lines = 0;
  std::uint64_t runs = 0;
  std::uint64_t files = 0;
  LedgerPlace head;
  std::vector<Deviation> deviations;
  std::vector<std::string> notes;  ///< e.g. a run at work, an abandoned staging
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
/// @param patience  how long to look again where a writer at work may be the
///                  explanation
/// @throws Halt 74 where `out` is no folder that can be read.
VerifyReport verify_out(
    const std::filesystem::path& out,
    std::chrono::milliseconds patience = std::chrono::milliseconds{250});

}  // namespace loqsmith
