#include "loqsmith/judgement/second_trace_check.hpp"

#include <algorithm>
#include <cmath>
#include <map>
#include <optional>
#include <string>

#include "loqsmith/judgement/check_rows.hpp"

namespace loqsmith {
namespace {

double size_of(const Peak& peak, ResponseKind response) {
  return response == ResponseKind::Height ? peak.height : peak.area;
}

// The ratio in percent of the method's; nothing, with the reason, where there
// is none.
std::optional<double> ratio_percent(const InjectionResponse& one,
                                    const AnalyteRules& rules,
                                    std::string& why) {
  const Outcome<Peak>& second = *one.second_trace;
  if (!second) {
    why = "second trace: " + second.reason();
    return std::nullopt;
  }
  if (!second->found) {
    why = "no peak in the second trace";
    return std::nullopt;
  }
  const double whole = size_of(*one.peak, rules.response);
  if (!(whole > 0.0)) {
    why = "the peak in the first trace has no size above zero";
    return std::nullopt;
  }
  return 100.0 * size_of(*second, rules.response) / whole /
         rules.second_trace->ratio;
}

}  // namespace

CheckOutcome check_second_trace(const FirstResults& first) {
  const AnalyteRules& rules = *first.night.settings;
  const auto& acceptance = rules.acceptance.second_trace;
  if (!acceptance) return {};
  CheckRow pattern = row_of_check("second-trace", first, acceptance->action);
  if (!rules.second_trace) {
    return not_checked(pattern, "the analyte has no second trace");
  }
  const double tolerance = rules.second_trace->tolerance_percent;
  pattern.low = std::max(0.0, 100.0 - tolerance);
  pattern.high = 100.0 + tolerance;
  pattern.unit = "%";
  std::map<int, bool> detected;
  for (const ResultRow& row : first.results) {
    detected[row.injection] = detected[row.injection] || is_detected(row);
  }

  InjectionRows rows(pattern);
  CheckOutcome outcome;
  for (const InjectionResponse& one : first.night.injections) {
    const int number = one.injection->number;
    if (!one.peak || !one.peak->found || !one.second_trace) continue;
    const auto known = detected.find(number);
    if (known == detected.end() || !known->second) continue;
    std::string why;
    const auto percent = ratio_percent(one, rules, why);
    if (percent && *percent >= *pattern.low && *percent <= *pattern.high) {
      rows.passed(number, *percent, std::abs(*percent - 100.0));
      continue;
    }
    rows.failed(number, percent, "the result", why);
    outcome.effects.push_back(
        {number, "second-trace-failed", acceptance->action});
  }
  outcome.rows = rows.rows("nothing was detected");
  return outcome;
}

}  // namespace loqsmith
