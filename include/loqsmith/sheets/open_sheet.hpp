#pragma once

#include <cstddef>
#include <string>
#include <string_view>

#include "loqsmith/sheets/problems.hpp"
#include "loqsmith/sheets/sheet_table.hpp"

namespace loqsmith {

/// A CSV sheet's cells together with what was found wrong in them.
struct OpenSheet {
  SheetProblems problems;
  SheetTable table;

  /// What is wrong with one cell, at its place.
  void add(std::size_t row, std::string_view column, std::string found,
           std::string expected, std::string mend);
};

}  // namespace loqsmith
