#pragma once

#include <cstddef>
#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/chromatogram/sequence.hpp"
#include "loqsmith/sheets/open_sheet.hpp"

namespace loqsmith {

/// A row of sequence.csv as far as it could be read: what is wrong with it is
/// among the sheet's problems.
struct SequenceRow {
  Injection injection;
  bool number_known = false;
  bool role_known = false;
  std::size_t row = 0;  ///< of the table
};

struct SequenceSheet : OpenSheet {
  std::vector<SequenceRow> rows;
};

SequenceSheet read_sequence_sheet(std::string_view csv,
                                  const std::string& file);

/// Roles whose amount was taken and made up: what a preparation batch prepares.
bool is_prepared(Role role);

/// The rules between the rows: injections given twice, parents, batches.
void check_sequence_rows(SequenceSheet& sheet);

}  // namespace loqsmith
