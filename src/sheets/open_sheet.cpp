#include "loqsmith/sheets/open_sheet.hpp"

#include <utility>

namespace loqsmith {

void OpenSheet::add(std::size_t row, std::string_view column, std::string found,
                    std::string expected, std::string mend) {
  const SheetCell cell = table.cell(row, column);
  problems.add(cell.line, cell.column,
               std::string(column) + ' ' + std::move(found),
               std::move(expected), std::move(mend));
}

}  // namespace loqsmith
