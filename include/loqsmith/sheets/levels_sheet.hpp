#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/chromatogram/sequence.hpp"
#include "loqsmith/sheets/problems.hpp"
#include "loqsmith/sheets/sheet_table.hpp"

namespace loqsmith {

/// levels.csv as far as it could be read; entries in the table's row order.
struct LevelsSheet {
  SheetProblems problems;
  SheetTable table;
  std::vector<LevelEntry> entries;

  void add(std::size_t row, std::string_view column, std::string found,
           std::string expected, std::string mend);
};

LevelsSheet read_levels_sheet(std::string_view csv, const std::string& file);

}  // namespace loqsmith
