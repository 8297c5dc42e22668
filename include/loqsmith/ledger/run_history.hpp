#pragma once

#include <cstdint>
#include <string>
#include <vector>

#include "loqsmith/ledger/deviation.hpp"
#include "loqsmith/ledger/line.hpp"

namespace loqsmith {

/// What the ledger says of one run. Line numbers; 0 where there is no such
/// line.
struct RunEvents {
  std::string object;    ///< "well-water-0412/run-0001"
  std::string sequence;  ///< "well-water-0412"
  int number = 0;
  std::string folder;  ///< where the sequence lay
  std::string host;
  std::string begun_time;
  std::uint64_t begun = 0;
  std::uint64_t published = 0;
  std::uint64_t abandoned = 0;
  std::string manifest;
  std::string amendments_sha256;  ///< of its amendments.csv; empty: had none

  bool pending() const { return published == 0 && abandoned == 0; }
};

struct RunHistory {
  std::vector<RunEvents> runs;  ///< in the order in which they began
  std::vector<Deviation> deviations;
};

/// Deviations: an object that is no run, a run begun twice or with a number not
/// above the earlier ones of its sequence, published or abandoned without
/// having begun or after its end.
RunHistory collect_runs(const std::vector<LedgerLine>& lines);

}  // namespace loqsmith
