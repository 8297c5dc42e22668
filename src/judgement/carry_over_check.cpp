#include "loqsmith/judgement/carry_over_check.hpp"

#include <algorithm>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "loqsmith/calibration/inverse.hpp"
#include "loqsmith/judgement/check_rows.hpp"
#include "loqsmith/judgement/limit_evidence.hpp"
#include "loqsmith/numerics/mean.hpp"

namespace loqsmith {
namespace {

// Part of a result's response from which on it counts as carried over.
constexpr double kNotable = 0.1;

std::optional<double> highest_standard(const MeasuredAnalyte& night) {
  std::optional<double> highest;
  for (const InjectionResponse& one : night.injections) {
    if (one.injection->role != Role::Standard || !one.nominal) continue;
    if (!highest || *one.nominal > *highest) highest = *one.nominal;
  }
  return highest;
}

std::vector<const InjectionResponse*> blanks_after_highest(
    const MeasuredAnalyte& night) {
  std::vector<const InjectionResponse*> blanks;
  const std::optional<double> highest = highest_standard(night);
  if (!highest || !(*highest > 0.0)) return blanks;
  for (const InjectionResponse& one : night.injections) {
    if (!blank_kind(one, night)) continue;
    const InjectionResponse* before =
        right_before(night, one.injection->number);
    if (before == nullptr || before->injection->role != Role::Standard ||
        before->nominal != highest) {
      continue;
    }
    blanks.push_back(&one);
  }
  return blanks;
}

std::optional<double> lowest_response(const Calibration& calibration) {
  const double lowest =
      calibration.accepted_lowest.value_or(calibration.lowest);
  std::vector<double> responses;
  for (const StandardPoint& point : calibration.points) {
    if (point.used && point.concentration == lowest) {
      responses.push_back(point.response);
    }
  }
  if (responses.empty()) return std::nullopt;
  const double average = mean(responses);
  if (!(average > 0.0)) return std::nullopt;
  return average;
}

bool passes(double percent, const CarryOverAcceptance& acceptance) {
  return percent <= acceptance.maximum_percent;
}

class CarryOver {
 public:
  CarryOver(const FirstResults& first, const CalibrationSet& set)
      : first_(first),
        set_(set),
        accept_(*first.night.settings->acceptance.carry_over),
        pattern_(row_of_check("carry-over", first, accept_.action)) {
    name_set(pattern_, set);
    pattern_.high = accept_.maximum_percent;
    pattern_.unit = "%";
  }

  CheckOutcome check() {
    if (!set_.calibration) return not_checked(pattern_, "no calibration");
    const std::optional<double> lowest = lowest_response(*set_.calibration);
    if (!lowest) {
      return not_checked(pattern_,
                         "the lowest standard does not respond above zero");
    }
    for (const InjectionResponse* blank : blanks_after_highest(first_.night)) {
      judge(*blank, *lowest);
    }
    if (outcome_.rows.empty()) {
      return not_checked(pattern_, "no blank right after the highest standard");
    }
    if (worst_ > 0.0) affect();
    return std::move(outcome_);
  }

 private:
  void judge(const InjectionResponse& blank, double lowest) {
    CheckRow row = pattern_;
    row.injection = blank.injection->number;
    if (blank.response) {
      row.value = 100.0 * blank.response->value / lowest;
      row.passed = passes(*row.value, accept_);
    } else {
      row.note = "not checked: " + blank.response.reason();
    }
    if (row.passed == false) {
      worst_ = std::max(worst_, blank.response->value);
      row.affects = "detected low results right after high injections";
    }
    outcome_.rows.push_back(std::move(row));
  }

  void affect() {
    const double highest = response_from_concentration(
        *set_.calibration, *highest_standard(first_.night));
    if (!(highest > 0.0)) return;
    for (const ResultRow& result : first_.results) {
      if (result.set != set_.set || !result.response) continue;
      if (!is_detected(result)) continue;
      const InjectionResponse* before =
          right_before(first_.night, result.injection);
      if (before == nullptr || !before->response) continue;
      const double carried = worst_ / highest * before->response->value;
      if (carried < kNotable * *result.response) continue;
      outcome_.effects.push_back(
          {result.injection, "carry-over-failed", accept_.action});
    }
  }

  const FirstResults& first_;
  const CalibrationSet& set_;
  const CarryOverAcceptance& accept_;
  CheckRow pattern_;
  double worst_ = 0.0;  // response of the worst blank that fails
  CheckOutcome outcome_;
};

}  // namespace

CheckOutcome check_carry_over(const FirstResults& first) {
  CheckOutcome all;
  if (!first.night.settings->acceptance.carry_over) return all;
  for (const CalibrationSet& set : first.sets) {
    if (set.over_additions) continue;
    append(all, CarryOver(first, set).check());
  }
  return all;
}

bool carry_over_passes(const MeasuredAnalyte& night,
                       const Calibration& calibration) {
  const auto& acceptance = night.settings->acceptance.carry_over;
  const std::optional<double> lowest = lowest_response(calibration);
  if (!acceptance || !lowest) return false;
  const auto blanks = blanks_after_highest(night);
  return !blanks.empty() &&
         std::all_of(blanks.begin(), blanks.end(), [&](const auto* blank) {
           return blank->response &&
                  passes(100.0 * blank->response->value / *lowest, *acceptance);
         });
}

}  // namespace loqsmith
