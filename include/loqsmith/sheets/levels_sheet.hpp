#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/chromatogram/sequence.hpp"
#include "loqsmith/sheets/open_sheet.hpp"

namespace loqsmith {

/// levels.csv as far as it could be read; entries in the table's row order.
struct LevelsSheet : OpenSheet {
  std::vector<LevelEntry> entries;
};

LevelsSheet read_levels_sheet(std::string_view csv, const std::string& file);

}  // namespace loqsmith
