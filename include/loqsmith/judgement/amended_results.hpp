#pragma once

#include <vector>

#include "loqsmith/judgement/amendment.hpp"
#include "loqsmith/judgement/rows.hpp"

namespace loqsmith {

/// Marks each row that an amendment touched: one that says something else than
/// the program alone would have said, or that an amendment in force names. Such
/// a row gets its automatic number and status, and the reason word
/// "amended-unsigned" (second where the result is withheld, so that what
/// withholds it stays first; otherwise first).
///
/// @param rows       of one analyte, as amended
/// @param automatic  the same rows without any amendment, in the same order
/// @param internal_standard  of the analyte; empty: none
void mark_amended(std::vector<ResultRow>& rows,
                  const std::vector<ResultRow>& automatic,
                  const std::vector<Amendment>& amendments,
                  const std::string& internal_standard);

}  // namespace loqsmith
