#include "loqsmith/judgement/recovery.hpp"

namespace loqsmith {

double recovery_percent(double found, double expected) {
  return 100.0 * found / expected;
}

double added_recovery_percent(double fortified, double native, double added) {
  return 100.0 * (fortified - native) / added;
}

CheckRow recovery_row(const std::string& check, const KnownResult& of,
                      const Outcome<double>& percent, const PercentRange& range,
                      CheckAction action) {
  CheckRow row = check_row(check, of, action);
  row.low = range.low;
  row.high = range.high;
  if (!percent) {
    say_why_not(row, percent.reason());
    return row;
  }
  row.value = *percent;
  row.passed = *percent >= range.low && *percent <= range.high;
  return row;
}

}  // namespace loqsmith
