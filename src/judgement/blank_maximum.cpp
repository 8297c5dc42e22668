#include "loqsmith/judgement/blank_maximum.hpp"

#include <optional>
#include <string>

namespace loqsmith {
namespace {

struct Most {
  std::optional<double> value;  // nothing: no limit governs
  bool may_be_reached = false;
  std::string words;
};

Most most_of(const BlankMaximum& maximum, const ResultRow& blank) {
  switch (maximum.kind) {
    case BlankMaximum::Kind::DetectionLimit:
      return {blank.detection_limit, false, "below the detection limit"};
    case BlankMaximum::Kind::QuantitationLimit:
      return {blank.quantitation_limit, false, "below the quantitation limit"};
    case BlankMaximum::Kind::Number:
      return {maximum.number, true, "at most the number stated"};
  }
  return {};
}

}  // namespace

CheckRow judge_blank(CheckRow row, const ResultRow& blank,
                     const BlankMaximum& maximum) {
  const Most most = most_of(maximum, blank);
  row.injection = blank.injection;
  row.value = blank.result;
  row.high = most.value;
  row.unit = blank.unit;
  if (!blank.result) {
    const std::string why =
        blank.reasons.empty() ? "no result" : blank.reasons.front();
    row.note = "not checked: " + why;
    return row;
  }
  if (!most.value) {
    row.note = "not checked: no valid limit governs";
    return row;
  }
  row.passed = *blank.result < *most.value ||
               (most.may_be_reached && *blank.result == *most.value);
  row.note = most.words;
  return row;
}

}  // namespace loqsmith
