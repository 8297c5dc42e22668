#pragma once

#include <chrono>
#include <string>
#include <vector>

#include "loqsmith/base/ed25519.hpp"
#include "loqsmith/base/files.hpp"
#include "loqsmith/ledger/chain.hpp"
#include "loqsmith/ledger/ledger.hpp"
#include "loqsmith/ledger/out_layout.hpp"
#include "loqsmith/ledger/publication.hpp"

namespace loqsmith {

/// The ledger of one OUT under its lock: read, checked, and mended where an
/// interruption left a torn last line or a head one line behind. The only way
/// to append. Gives the lock back when destroyed.
class OpenLedger {
 public:
  /// @param patience  how long to wait for the lock
  /// @throws Halt 73 where OUT cannot be created, 75 where the lock is not to
  ///         be had, 74 where OUT is damaged (damage.hpp): it is then never
  ///         touched.
  OpenLedger(const PublicationPlace& place, std::chrono::seconds patience);

  const OutLayout& layout() const { return layout_; }
  const std::vector<LedgerLine>& lines() const { return chain_.lines; }
  const PublicationPlace& place() const { return place_; }

  /// Writes and flushes one line, then the head.
  /// @param key  signs the line (signatures.hpp); null: no signature
  LedgerPlace append(const LedgerEntry& entry, const SigningKey* key = nullptr);

  /// What was found and mended, one sentence each.
  const std::vector<std::string>& found() const { return found_; }
  void say(std::string sentence) { found_.push_back(std::move(sentence)); }

 private:
  void mend_torn_line();
  void mend_head(const std::optional<std::string>& head);
  void report_torn_lines();

  PublicationPlace place_;
  OutLayout layout_;
  FileLock lock_;
  Chain chain_;
  std::vector<std::string> found_;
};

}  // namespace loqsmith
