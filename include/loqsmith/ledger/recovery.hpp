#pragma once

#include "loqsmith/ledger/open_ledger.hpp"

namespace loqsmith {

/// Second half of recovery, after OpenLedger has mended the ledger itself:
/// - a register of signers that is one change behind: renewed;
/// - published without its folder (its staging was found whole, otherwise the
///   ledger would not have opened): line `recovery`, moved into place;
/// - begun, not published, and nobody holds its staging: line `run-abandoned`,
///   staging removed;
/// - staging folders of runs that are over: removed.
/// Lines come before what they announce, so that an interruption in between
/// leads here again. What was found is said through the ledger's say().
void recover_runs(OpenLedger& ledger);

/// Renames a complete staging folder to OUT/run and flushes the folders that
/// changed. Nothing may be there yet.
void move_into_place(const OutLayout& layout, std::uint64_t begun,
                     const std::string& run);

}  // namespace loqsmith
