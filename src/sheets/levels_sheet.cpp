#include "loqsmith/sheets/levels_sheet.hpp"

#include <map>
#include <utility>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/base/time.hpp"

namespace loqsmith {
namespace {

const std::vector<SheetColumn>& columns() {
  static const std::vector<SheetColumn> all{
      {"level", true}, {"analyte", true}, {"concentration", true},
      {"lot"},         {"expires"},
  };
  return all;
}

double read_concentration(LevelsSheet& sheet, std::size_t row) {
  const std::string written = sheet.table.cell(row, "concentration").text;
  if (written.empty()) return 0.0;
  const auto value = parse_number(written);
  if (value && *value >= 0.0) return *value;
  sheet.add(row, "concentration", in_quotes(written), "a number from 0 up",
            written.find(',') != std::string::npos
                ? "write a decimal point, not a comma"
                : "write a plain decimal number");
  return 0.0;
}

std::string read_expiry(LevelsSheet& sheet, std::size_t row) {
  const std::string written = sheet.table.cell(row, "expires").text;
  if (!written.empty() && !parse_moment(written)) {
    sheet.add(row, "expires", in_quotes(written), "a date or time (RFC 3339)",
              "write it like 2026-03-01");
  }
  return written;
}

LevelEntry read_entry(LevelsSheet& sheet, std::size_t row) {
  LevelEntry entry;
  const SheetCell level = sheet.table.cell(row, "level");
  entry.level = level.text;
  entry.line = level.line;
  entry.analyte = sheet.table.cell(row, "analyte").text;
  entry.concentration = read_concentration(sheet, row);
  entry.lot = sheet.table.cell(row, "lot").text;
  entry.expires = read_expiry(sheet, row);
  return entry;
}

void check_twice(LevelsSheet& sheet) {
  std::map<std::pair<std::string, std::string>, std::size_t> first;
  for (std::size_t row = 0; row < sheet.entries.size(); ++row) {
    const LevelEntry& entry = sheet.entries[row];
    if (entry.level.empty() || entry.analyte.empty()) continue;
    const auto [place, is_new] =
        first.emplace(std::pair(entry.level, entry.analyte), entry.line);
    if (is_new) continue;
    sheet.add(
        row, "level",
        in_quotes(entry.level) + " with " + in_quotes(entry.analyte) +
            " a second time",
        "each analyte once in a level",
        "it stands in line " + std::to_string(place->second) + " already");
  }
}

LevelsSheet open_sheet(std::string_view csv, const std::string& file) {
  SheetProblems problems(file);
  SheetTable table(csv, columns(), problems);
  return {{std::move(problems), std::move(table)}, {}};
}

}  // namespace

LevelsSheet read_levels_sheet(std::string_view csv, const std::string& file) {
  LevelsSheet sheet = open_sheet(csv, file);
  for (std::size_t row = 0; row < sheet.table.rows(); ++row) {
    sheet.entries.push_back(read_entry(sheet, row));
  }
  check_twice(sheet);
  return sheet;
}

}  // namespace loqsmith
