#pragma once

#include <cstdint>
#include <filesystem>
#include <functional>
#include <optional>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

namespace loqsmith {

/// RFC 3339 UTC with milliseconds; handed in so that tests can set it.
using Clock = std::function<std::string()>;

/// Who is at work, for every line.
struct LedgerActor {
  std::string actor;      ///< operating system user
  std::string operator_;  ///< person named on the command line; may be empty
  std::string host;
  std::string program;  ///< "loqsmith 0.1.0"
};

/// What one appended line says; number, time and previous are the ledger's.
struct LedgerEntry {
  std::string action;    ///< "run-begun", "run-published", ...
  std::string object;    ///< "well-water-0412/run-0001"
  std::string manifest;  ///< SHA-256 or empty
  std::string reason;
  /// Members of `detail`, in order; values are texts.
  std::vector<std::pair<std::string, std::string>> detail;
};

/// A place in the ledger: the number of a line and the SHA-256 of its bytes.
struct LedgerPlace {
  std::uint64_t number = 0;
  std::string sha256;
};

/// Names a line and its hash as "12:ab34...": what people write down.
std::string describe(const LedgerPlace& place);

/// Reads what describe() gives; nothing for any other text.
std::optional<LedgerPlace> read_ledger_place(std::string_view text);

}  // namespace loqsmith
