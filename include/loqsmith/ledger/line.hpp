#pragma once

#include <cstdint>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/ledger/ledger.hpp"

namespace loqsmith {

/// One line of ledger.jsonl. The fields stand in the file in this order, all of
/// them always, empty where there is nothing; later versions add actions and
/// members of `detail`, never fields.
struct LedgerLine {
  std::uint64_t number = 0;  ///< of the line in the file, from 1
  std::string time;          ///< RFC 3339 UTC, never before the line above
  std::string actor;
  std::string operator_;
  std::string host;
  std::string program;
  std::string action;
  std::string object;
  std::string manifest;
  std::string reason;
  std::vector<std::pair<std::string, std::string>> detail;
  std::string previous;  ///< SHA-256 of all bytes of the line above, line feed
                         ///< included; 64 zeros in the first
};

/// `previous` of the first line.
inline constexpr std::string_view kNoLine =
    "0000000000000000000000000000000000000000000000000000000000000000";

/// The line's bytes, line feed included. Bytes that are no UTF-8 become U+FFFD.
std::string ledger_line_text(const LedgerLine& line);

/// Reads one line (without its line feed), strictly: one JSON object with
/// exactly these fields in this order, no key twice at any depth, a time with
/// zone. A member of `detail` that is no text is kept as its JSON.
Outcome<LedgerLine> read_ledger_line(std::string_view text);

/// The member of `detail`; empty where it is not there.
std::string detail_of(const LedgerLine& line, std::string_view key);

/// The text as a line of the ledger gives it back.
std::string as_ledger_text(std::string_view text);

/// True for 64 lower-case hex digits.
bool is_sha256(std::string_view text);

}  // namespace loqsmith
