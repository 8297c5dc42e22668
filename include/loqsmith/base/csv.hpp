#pragma once

#include <cstddef>
#include <iosfwd>
#include <string>
#include <string_view>
#include <vector>

namespace loqsmith {

struct CsvCell {
  std::string text;
  std::size_t column = 0;  ///< of its first byte in the line, from 1
};

struct CsvRow {
  std::size_t line = 0;  ///< where the row begins, from 1
  std::vector<CsvCell> cells;
};

/// RFC 4180: comma separated, optional double quotes, CRLF or LF, UTF-8 with or
/// without BOM, blank lines at the end ignored (elsewhere a blank line is a
/// row of one empty cell).
///
/// @throws InputError: no UTF-8, a NUL or other control character (a tab is
///         allowed, and line ends inside quotes), a quote inside an unquoted
///         cell, text after a closing quote, a quote never closed, more than
///         1,000,000 rows or 1 MiB in a cell.
std::vector<CsvRow> read_csv(std::string_view text, const std::string& file);

/// One cell: quoted where needed. A text that a spreadsheet would run (begins
/// with = + - @ tab or CR) or that begins with an apostrophe gets a leading
/// apostrophe. For texts; numbers are written as they are.
std::string csv_text_cell(std::string_view text);

/// Writes one row: the cells as they are (texts have been through
/// csv_text_cell), joined by commas, ended by a line feed.
void write_csv_row(std::ostream& out, const std::vector<std::string>& cells);

}  // namespace loqsmith
