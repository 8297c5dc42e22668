#pragma once

#include <cstddef>
#include <map>
#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/base/csv.hpp"
#include "loqsmith/sheets/problems.hpp"

namespace loqsmith {

struct SheetColumn {
  std::string_view name;
  bool required = false;  ///< the column must be there, and its cells filled
};

struct SheetCell {
  std::string text;
  std::size_t line = 0;
  std::size_t column = 0;
};

/// A CSV sheet with a header row, columns in any order. Reports unknown,
/// repeated and missing columns, rows of another length (left out), required
/// cells that are empty, and blanks at the ends of cells.
class SheetTable {
 public:
  SheetTable(std::string_view csv, const std::vector<SheetColumn>& columns,
             SheetProblems& problems);

  std::size_t rows() const { return rows_.size(); }

  /// The cell of a known column; without text where the sheet lacks it.
  SheetCell cell(std::size_t row, std::string_view column) const;

 private:
  void read_header(const CsvRow& header,
                   const std::vector<SheetColumn>& columns,
                   SheetProblems& problems);
  void read_row(const CsvRow& row, std::size_t width,
                const std::vector<SheetColumn>& columns,
                SheetProblems& problems);

  std::map<std::string, std::size_t, std::less<>> index_;
  std::vector<CsvRow> rows_;
};

}  // namespace loqsmith
