#pragma once

#include <cstdint>
#include <filesystem>
#include <string>
#include <vector>

#include "loqsmith/ledger/ledger.hpp"

namespace loqsmith {

/// One thing that is not as the ledger says.
struct Deviation {
  std::string place;  ///< "ledger.jsonl line 12", "well-water/run-0001/results.csv"
  std::string what;
};

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
VerifyReport verify_out(const std::filesystem::path& out);

}  // namespace loqsmith
