#pragma once

#include <filesystem>
#include <map>
#include <string>
#include <vector>

namespace loqsmith::test {

/// A table with a header row: each row by column name. A column that is not
/// there throws.
using SheetRow = std::map<std::string, std::string>;
std::vector<SheetRow> read_sheet(const std::filesystem::path& path);

/// The cell as a finite number; throws where it is none.
double number(const SheetRow& row, const std::string& column);

/// "17/atrazine": what rows of results and truth are known by.
std::string row_key(const SheetRow& row);
std::map<std::string, SheetRow> by_key(const std::vector<SheetRow>& rows);

}  // namespace loqsmith::test
