#include "loqsmith/judgement/trace_checks.hpp"

#include <algorithm>
#include <string>

#include "loqsmith/judgement/reasons.hpp"

namespace loqsmith {
namespace {

bool trace_missing(const InjectionResponse& one) {
  return !one.peak && reason_word(one.peak.reason()) == "trace-missing";
}

bool saturated(const InjectionResponse& one) {
  if (!one.peak) return false;
  const std::vector<std::string>& reasons = one.peak->reasons;
  return std::find(reasons.begin(), reasons.end(), "saturated") !=
         reasons.end();
}

std::vector<CheckRow> rows_of(const std::string& check,
                              const MeasuredAnalyte& analyte,
                              bool (*found)(const InjectionResponse&),
                              const std::string& affects) {
  std::vector<CheckRow> rows;
  CheckRow row;
  row.check = check;
  row.analyte = analyte.settings->analyte;
  row.action = check_action_name(CheckAction::Flag);
  for (const InjectionResponse& one : analyte.injections) {
    if (!found(one)) continue;
    row.injection = one.injection->number;
    row.passed = false;
    row.affects = affects;
    row.note = one.peak ? std::string{} : one.peak.reason();
    rows.push_back(row);
  }
  if (!rows.empty()) return rows;
  row.passed = true;
  return {row};
}

}  // namespace

std::vector<CheckRow> check_traces(const MeasuredAnalyte& analyte) {
  std::vector<CheckRow> rows =
      rows_of("trace-missing", analyte, trace_missing, "the injection");
  for (CheckRow& row : rows_of("saturation", analyte, saturated,
                               "the result; a standard is not used")) {
    rows.push_back(std::move(row));
  }
  return rows;
}

}  // namespace loqsmith
