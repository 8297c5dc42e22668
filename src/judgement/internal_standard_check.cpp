#include "loqsmith/judgement/internal_standard_check.hpp"

#include <algorithm>
#include <cmath>
#include <map>
#include <optional>
#include <string>
#include <vector>

#include "loqsmith/judgement/check_rows.hpp"
#include "loqsmith/judgement/reasons.hpp"
#include "loqsmith/numerics/mean.hpp"

namespace loqsmith {
namespace {

constexpr const char* kMissing = "internal-standard-missing";

using ByNumber = std::map<int, const InjectionResponse*>;

ByNumber by_number(const MeasuredAnalyte& night) {
  ByNumber all;
  for (const InjectionResponse& one : night.injections) {
    all[one.injection->number] = &one;
  }
  return all;
}

std::optional<double> mean_area(const CalibrationSet& set,
                                const ByNumber& night) {
  std::vector<double> areas;
  for (const StandardPoint& point : set.standards) {
    const auto one = night.find(point.injection);
    if (one == night.end() || !one->second->internal_standard_area) continue;
    areas.push_back(*one->second->internal_standard_area);
  }
  if (areas.empty()) return std::nullopt;
  return mean(areas);
}

bool is_without(const InjectionResponse& one) {
  if (one.injection->role != Role::SolventBlank) return false;
  if (!one.internal_standard_area) return true;
  if (!one.response) return false;
  const std::vector<std::string>& words = one.response->reasons;
  return std::find(words.begin(), words.end(), "mean-internal-standard") !=
         words.end();
}

class InternalStandard {
 public:
  InternalStandard(const FirstResults& first, const CalibrationSet& set)
      : first_(first),
        set_(set),
        accept_(*first.night.settings->acceptance.internal_standard) {}

  CheckOutcome check(const ByNumber& night) {
    CheckRow row = row_of_check("internal-standard", first_, accept_.action);
    name_set(row, set_);
    row.low = accept_.area.low;
    row.high = accept_.area.high;
    row.unit = "%";
    if (first_.night.settings->internal_standard.empty()) {
      return not_checked(row, "the analyte has no internal standard");
    }
    const std::optional<double> average = mean_area(set_, night);
    if (!average) {
      return not_checked(row, "no standard shows the internal standard");
    }
    InjectionRows rows(row);
    for (const ResultRow& result : first_.results) {
      if (result.set != set_.set) continue;
      judge(*night.at(result.injection), *average, rows);
    }
    outcome_.rows = rows.rows("no injection contains it");
    return std::move(outcome_);
  }

 private:
  void judge(const InjectionResponse& one, double average,
             InjectionRows& rows) {
    if (is_without(one)) return;
    const int number = one.injection->number;
    if (!one.internal_standard_area) {
      // Otherwise the file or trace is at fault, and says so.
      if (!one.response && reason_word(one.response.reason()) == kMissing) {
        fail(number, std::nullopt, rows, "no peak of it above zero");
      }
      return;
    }
    const double percent = 100.0 * *one.internal_standard_area / average;
    if (percent >= accept_.area.low && percent <= accept_.area.high) {
      rows.passed(number, percent, std::abs(std::log(percent / 100.0)));
    } else {
      fail(number, percent, rows);
    }
  }

  void fail(int number, std::optional<double> percent, InjectionRows& rows,
            const std::string& note = {}) {
    rows.failed(number, percent, "the analyte's result of the injection", note);
    outcome_.effects.push_back(
        {number, "internal-standard-failed", accept_.action});
  }

  const FirstResults& first_;
  const CalibrationSet& set_;
  const InternalStandardAcceptance& accept_;
  CheckOutcome outcome_;
};

}  // namespace

CheckOutcome check_internal_standard(const FirstResults& first) {
  CheckOutcome all;
  if (!first.night.settings->acceptance.internal_standard) return all;
  const ByNumber night = by_number(first.night);
  for (const CalibrationSet& set : first.sets) {
    append(all, InternalStandard(first, set).check(night));
  }
  return all;
}

}  // namespace loqsmith
