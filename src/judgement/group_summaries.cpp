#include "loqsmith/judgement/group_summaries.hpp"

#include <algorithm>

namespace loqsmith {
namespace {

SummaryRow& row_for(std::vector<SummaryRow>& rows, const SummaryInput& input) {
  const auto found =
      std::find_if(rows.begin(), rows.end(), [&](const SummaryRow& row) {
        return row.group == input.group && row.analyte == input.analyte &&
               row.unit == input.unit;
      });
  if (found != rows.end()) return *found;
  SummaryRow row;
  row.group = input.group;
  row.analyte = input.analyte;
  row.unit = input.unit;
  // Behind its group, so that a group stays together.
  const auto last = std::find_if(
      rows.rbegin(), rows.rend(),
      [&](const SummaryRow& other) { return other.group == input.group; });
  const auto place = last == rows.rend() ? rows.end() : last.base();
  return *rows.insert(place, std::move(row));
}

}  // namespace

std::vector<SummaryRow> summarise_groups(std::span<const SummaryInput> inputs) {
  std::vector<SummaryRow> rows;
  for (const SummaryInput& input : inputs) {
    if (input.group.empty()) continue;
    SummaryRow& row = row_for(rows, input);
    if (input.value) {
      row.values.push_back(*input.value);
    } else {
      ++row.withheld;
    }
  }
  for (SummaryRow& row : rows) row.summary = summarise_censored(row.values);
  return rows;
}

}  // namespace loqsmith
