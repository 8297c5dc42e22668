#include "loqsmith/sheets/sheet_table.hpp"

#include <algorithm>

#include "loqsmith/base/text.hpp"

namespace loqsmith {
namespace {

std::vector<std::string> names(const std::vector<SheetColumn>& columns) {
  std::vector<std::string> all;
  for (const SheetColumn& column : columns) all.emplace_back(column.name);
  return all;
}

bool is_empty(const CsvRow& row) {
  return std::all_of(row.cells.begin(), row.cells.end(),
                     [](const CsvCell& cell) { return cell.text.empty(); });
}

}  // namespace

SheetTable::SheetTable(std::string_view csv,
                       const std::vector<SheetColumn>& columns,
                       SheetProblems& problems) {
  std::vector<CsvRow> rows;
  try {
    rows = read_csv(csv, problems.file());
  } catch (const InputError& error) {
    problems.add(error);
    return;
  }
  if (rows.empty()) {
    problems.add(1, 1, "an empty sheet",
                 "a header row with " + join(names(columns), ","),
                 "add the header row");
    return;
  }
  read_header(rows.front(), columns, problems);
  for (std::size_t i = 1; i < rows.size(); ++i) {
    read_row(rows[i], rows.front().cells.size(), columns, problems);
  }
}

void SheetTable::read_header(const CsvRow& header,
                             const std::vector<SheetColumn>& columns,
                             SheetProblems& problems) {
  const std::vector<std::string> known = names(columns);
  for (std::size_t i = 0; i < header.cells.size(); ++i) {
    const CsvCell& cell = header.cells[i];
    if (std::find(known.begin(), known.end(), cell.text) == known.end()) {
      const std::string near = nearest_name(cell.text, known);
      problems.add(header.line, cell.column,
                   "the column " + in_quotes(cell.text),
                   "one of " + join(known, ", "),
                   near.empty() ? "remove the column"
                                : "did you mean \"" + near + "\"?");
    } else if (!index_.emplace(cell.text, i).second) {
      problems.add(header.line, cell.column,
                   "the column " + in_quotes(cell.text) + " a second time",
                   "each column once", "remove one of them");
    }
  }
  for (const SheetColumn& column : columns) {
    if (column.required && !index_.contains(column.name)) {
      problems.add(header.line, 1, "no such column",
                   "the column \"" + std::string(column.name) + '"', "add it");
    }
  }
}

void SheetTable::read_row(const CsvRow& row, std::size_t width,
                          const std::vector<SheetColumn>& columns,
                          SheetProblems& problems) {
  if (is_empty(row)) {
    problems.add(row.line, 1, "an empty row", "a filled one", "delete it");
    return;
  }
  if (row.cells.size() != width) {
    problems.add(row.line, 1, std::to_string(row.cells.size()) + " cells",
                 std::to_string(width) + " cells, as in the header row",
                 "look for a missing or unquoted comma");
    return;
  }
  rows_.push_back(row);
  for (const SheetColumn& column : columns) {
    const SheetCell filled = cell(rows_.size() - 1, column.name);
    if (filled.text.empty()) {
      if (column.required && index_.contains(column.name)) {
        problems.add(
            filled.line, filled.column, "an empty cell",
            "something in the column \"" + std::string(column.name) + '"',
            "fill it in");
      }
    } else if (trim(filled.text).size() != filled.text.size()) {
      problems.add(filled.line, filled.column, in_quotes(filled.text),
                   "no blanks at the ends of a cell", "remove them");
    }
  }
}

SheetCell SheetTable::cell(std::size_t row, std::string_view column) const {
  const CsvRow& cells = rows_[row];
  const auto place = index_.find(column);
  if (place == index_.end()) return {{}, cells.line, 1};
  const CsvCell& cell = cells.cells[place->second];
  return {cell.text, cells.line, cell.column};
}

}  // namespace loqsmith
