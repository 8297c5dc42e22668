#include "loqsmith/judgement/amended_results.hpp"

#include <algorithm>
#include <tuple>

namespace loqsmith {
namespace {

auto said(const ResultRow& row) {
  return std::tie(row.set, row.found, row.retention_minutes, row.response,
                  row.signal_to_noise, row.vial_concentration, row.result,
                  row.calibration_uncertainty, row.detection_limit,
                  row.quantitation_limit, row.detection_procedure,
                  row.quantitation_procedure, row.status, row.reported,
                  row.qualifier, row.reasons);
}

bool names(const Amendment& amendment, const ResultRow& row,
           const std::string& internal_standard) {
  if (!amendment.in_force || amendment.injection != row.injection) return false;
  const std::string& target = amendment.analyte;
  return target.empty() || target == row.analyte || target == internal_standard;
}

void mark(ResultRow& row, const ResultRow* automatic) {
  AutomaticResult unamended;
  if (automatic != nullptr) {
    unamended = {automatic->result, automatic->status, automatic->reported};
  }
  row.automatic = unamended;
  const bool behind = row.status == Status::Withheld && !row.reasons.empty();
  row.reasons.insert(row.reasons.begin() + (behind ? 1 : 0),
                     "amended-unsigned");
}

}  // namespace

void mark_amended(std::vector<ResultRow>& rows,
                  const std::vector<ResultRow>& automatic,
                  const std::vector<Amendment>& amendments,
                  const std::string& internal_standard) {
  for (ResultRow& row : rows) {
    const auto same = std::find_if(automatic.begin(), automatic.end(),
                                   [&](const ResultRow& other) {
                                     return other.injection == row.injection;
                                   });
    const ResultRow* found = same == automatic.end() ? nullptr : &*same;
    const bool named = std::any_of(
        amendments.begin(), amendments.end(), [&](const Amendment& amendment) {
          return names(amendment, row, internal_standard);
        });
    const bool changed = found == nullptr || said(*found) != said(row);
    if (named || changed) mark(row, found);
  }
}

}  // namespace loqsmith
