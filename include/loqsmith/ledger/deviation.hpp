#pragma once

#include <string>

namespace loqsmith {

/// One thing that is not as the ledger says.
struct Deviation {
  std::string
      place;  ///< "ledger.jsonl line 12", "well-water/run-0001/results.csv"
  std::string what;
};

}  // namespace loqsmith
