#include "golden/sheet.hpp"

#include <cstddef>
#include <stdexcept>

#include "loqsmith/base/csv.hpp"
#include "loqsmith/base/files.hpp"
#include "loqsmith/base/numbers.hpp"

namespace loqsmith::test {

std::vector<SheetRow> read_sheet(const std::filesystem::path& path) {
  const std::vector<CsvRow> rows = read_csv(read_file(path), path.string());
  if (rows.empty()) throw std::runtime_error(path.string() + " is empty");
  std::vector<SheetRow> sheet;
  for (std::size_t i = 1; i < rows.size(); ++i) {
    if (rows[i].cells.size() != rows[0].cells.size()) {
      throw std::runtime_error(path.string() + ":" +
                               std::to_string(rows[i].line) +
                               ": not as many cells as the header");
    }
    SheetRow row;
    for (std::size_t k = 0; k < rows[0].cells.size(); ++k) {
      row[rows[0].cells[k].text] = rows[i].cells[k].text;
    }
    sheet.push_back(std::move(row));
  }
  return sheet;
}

double number(const SheetRow& row, const std::string& column) {
  const std::string& text = row.at(column);
  const auto value = parse_number(text);
  if (!value) {
    throw std::runtime_error("no number in " + column + ": \"" + text + "\"");
  }
  return *value;
}

std::string row_key(const SheetRow& row) {
  return row.at("injection") + "/" + row.at("analyte");
}

std::map<std::string, SheetRow> by_key(const std::vector<SheetRow>& rows) {
  std::map<std::string, SheetRow> keyed;
  for (const SheetRow& row : rows) {
    if (!keyed.emplace(row_key(row), row).second) {
      throw std::runtime_error("two rows for " + row_key(row));
    }
  }
  return keyed;
}

}  // namespace loqsmith::test
