#include "loqsmith/judgement/summary_inputs.hpp"

namespace loqsmith {
namespace {

std::optional<CensoredValue> value_of(const ReportedValue& reported) {
  switch (reported.kind) {
    case ReportedValue::Kind::Number:
      return CensoredValue{reported.value, Censoring::Measured};
    case ReportedValue::Kind::Below:
      return CensoredValue{reported.value, Censoring::Below};
    case ReportedValue::Kind::Above:
      return CensoredValue{reported.value, Censoring::Above};
    case ReportedValue::Kind::Withheld:
      return std::nullopt;
  }
  return std::nullopt;
}

}  // namespace

std::vector<SummaryInput> summary_inputs(std::span<const ReportableRow> rows) {
  std::vector<SummaryInput> inputs;
  for (const ReportableRow& row : rows) {
    for (const std::string& group : row.groups) {
      inputs.push_back({group, row.analyte, row.unit, value_of(row.value)});
    }
  }
  return inputs;
}

}  // namespace loqsmith
