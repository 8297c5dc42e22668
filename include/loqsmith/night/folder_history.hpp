#pragma once

#include <filesystem>
#include <string>
#include <vector>

#include "loqsmith/ledger/line.hpp"

namespace loqsmith {

/// What the ledger last said of one sequence folder.
struct FolderHistory {
  enum class Last { Nothing, AtWork, Abandoned, Published, Refused };

  Last last = Last::Nothing;
  std::string sequence;  ///< the name it was published under; may be empty
  std::string state;     ///< listing of folder_state.hpp; may be empty
  std::string contents;  ///< hash of the contents; may be empty
};

FolderHistory history_of_folder(const std::vector<LedgerLine>& lines,
                                const std::filesystem::path& folder);

/// The ledger as it stands, without lock; no lines where there is none.
std::vector<LedgerLine> ledger_lines(const std::filesystem::path& out);

}  // namespace loqsmith
