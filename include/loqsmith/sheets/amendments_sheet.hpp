#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/judgement/amendment.hpp"
#include "loqsmith/sheets/levels_sheet.hpp"
#include "loqsmith/sheets/method.hpp"
#include "loqsmith/sheets/open_sheet.hpp"
#include "loqsmith/sheets/sequence_sheet.hpp"

namespace loqsmith {

/// amendments.csv as far as it could be read; entries in the table's row order.
///
/// - exclude-standard: `injection` a standard, `analyte` one or empty (all);
/// - integration-bounds: `injection`, `analyte` (or an internal standard),
///   `value` both feet in minutes, "3.31 3.52";
/// - invalid-injection: `injection` alone;
/// - calibration-model: `analyte`, `value` model and weight, where wanted the
///   intercept, "linear 1/x", "linear none zero";
/// - override-status: `injection`, `analyte`, `value` the status;
/// - withdraw: `injection` and `analyte` of the row it takes back, `value` that
///   row's word.
struct AmendmentsSheet : OpenSheet {
  std::vector<Amendment> entries;
};

AmendmentsSheet read_amendments_sheet(std::string_view csv,
                                      const std::string& file);

/// What no row may say of this night: injections and analytes that are not in
/// it, standards that are none, results that do not exist.
void check_amendments(AmendmentsSheet& sheet, const Sequence& sequence,
                      const Method& method);

/// Of rows with the same `what`, injection and analyte the latest holds, unless
/// it is withdrawn later. Names rows that withdraw nothing, and two of the same
/// moment.
void settle_amendments(AmendmentsSheet& sheet);

/// The method with all amendments in force worked in.
Method amended(Method method, const std::vector<Amendment>& amendments);

}  // namespace loqsmith
