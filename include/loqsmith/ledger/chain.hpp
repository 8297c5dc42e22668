#pragma once

#include <cstdint>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/ledger/deviation.hpp"
#include "loqsmith/ledger/line.hpp"

namespace loqsmith {

/// ledger.jsonl, read and every link recomputed.
struct Chain {
  std::vector<LedgerLine> lines;    ///< those that are well formed
  std::vector<std::string> hashes;  ///< SHA-256 of every whole line's bytes
  std::uint64_t whole_bytes = 0;    ///< up to and with the last line feed
  std::string torn;                 ///< what follows the last line feed
  std::vector<Deviation> deviations;

  /// The last whole line; number 0 and kNoLine where there is none.
  LedgerPlace last() const;
};

/// Deviations: a malformed line, a number out of order, a `previous` that is
/// not the hash of the line above, a time before that of the line above. A torn
/// end is none here: the caller knows what it means.
Chain read_chain(std::string_view bytes);

/// What ledger.head says against the ledger.
struct HeadCheck {
  bool behind = false;      ///< names a line of the ledger, but not the last
  bool one_behind = false;  ///< names the last but one: an interruption
  std::optional<Deviation> damage;
};

/// The bytes of ledger.head for this last line.
std::string head_text(const LedgerPlace& last);

/// @param head  the bytes of ledger.head; nothing where it does not exist,
///              which is right while there is no line and one behind at one
HeadCheck check_head(const Chain& chain,
                     const std::optional<std::string>& head);

/// What shows that the ledger does not extend a place written down elsewhere;
/// nothing where it does. As each line holds the hash of the one above, one
/// place stands for all lines up to it.
/// @param earlier  its number is at least 1
std::optional<Deviation> check_extends(const Chain& chain,
                                       const LedgerPlace& earlier);

}  // namespace loqsmith
