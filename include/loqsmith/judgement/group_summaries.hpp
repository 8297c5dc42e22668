#pragma once

#include <optional>
#include <span>
#include <string>
#include <vector>

#include "loqsmith/judgement/censored_summary.hpp"

namespace loqsmith {

/// One sample's result in a group.
struct SummaryInput {
  std::string group;  ///< empty: in none
  std::string analyte;
  std::string unit;
  std::optional<CensoredValue> value;  ///< nothing: withheld
};

/// All results of one analyte in one group and one unit.
struct SummaryRow {
  std::string group;
  std::string analyte;
  std::string unit;
  std::size_t withheld = 0;  ///< left out
  std::vector<CensoredValue> values;
  CensoredSummary summary;
};

/// Groups in the order of their first result, in each the analytes likewise.
/// Results in different units are never put together. Withheld results are
/// counted and left out.
std::vector<SummaryRow> summarise_groups(std::span<const SummaryInput> inputs);

}  // namespace loqsmith
