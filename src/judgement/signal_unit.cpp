#include "loqsmith/judgement/signal_unit.hpp"

#include <optional>

#include "loqsmith/base/text.hpp"

namespace loqsmith {
namespace {

std::string unit_words(const std::string& unit) {
  return unit.empty() ? "no stated unit" : in_quotes(unit);
}

}  // namespace

Outcome<std::string> common_signal_unit(
    const std::vector<MeasuredInjection>& injections) {
  std::optional<std::string> common;
  for (const MeasuredInjection& measured : injections) {
    if (measured.injection->role != Role::Standard || !measured.peak) continue;
    if (!common) common = measured.signal_unit;
    if (*common != measured.signal_unit) {
      return NotApplicable{"mixed-units: standards with " +
                           unit_words(*common) + " and with " +
                           unit_words(measured.signal_unit)};
    }
  }
  return common.value_or("");
}

std::string why_unit_differs(const MeasuredInjection& injection,
                             const std::string& standards_unit) {
  if (injection.signal_unit == standards_unit) return {};
  return "mixed-units: signal with " + unit_words(injection.signal_unit) +
         ", standards with " + unit_words(standards_unit);
}

}  // namespace loqsmith
