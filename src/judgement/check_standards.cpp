#include "loqsmith/judgement/check_standards.hpp"

#include <algorithm>
#include <iterator>

#include "loqsmith/calibration/inverse.hpp"

namespace loqsmith {
namespace {

using Governs = CheckStandardAcceptance::Governs;
using Outcomes = std::vector<CheckStandardOutcome>;

CheckStandardOutcome judge_one(const InjectionResponse& one,
                               const Calibration& calibration,
                               const PercentRange& range) {
  CheckStandardOutcome outcome;
  outcome.injection = one.injection->number;
  if (!one.response) {
    outcome.note = one.response.reason();
    return outcome;
  }
  const Outcome<InversePrediction> found =
      concentration_from_response(calibration, one.response->value);
  if (!found) {
    outcome.note = found.reason();
    return outcome;
  }
  outcome.recovery_percent = 100.0 * found->concentration / *one.nominal;
  outcome.passed = *outcome.recovery_percent >= range.low &&
                   *outcome.recovery_percent <= range.high;
  return outcome;
}

Outcomes::const_iterator first_from(const Outcomes& outcomes, int injection) {
  return std::lower_bound(outcomes.begin(), outcomes.end(), injection,
                          [](const CheckStandardOutcome& one, int number) {
                            return one.injection < number;
                          });
}

std::string affected(const Outcomes& outcomes, Outcomes::const_iterator failed,
                     Governs governs) {
  const auto passes = [](const CheckStandardOutcome& one) {
    return one.passed;
  };
  const auto next = std::find_if(failed, outcomes.end(), passes);
  const std::string until =
      next == outcomes.end()
          ? " to the end"
          : " until injection " + std::to_string(next->injection);
  if (governs == Governs::Forward) {
    return "injections after " + std::to_string(failed->injection) + until;
  }
  const auto last =
      std::find_if(std::make_reverse_iterator(failed), outcomes.rend(), passes);
  return (last == outcomes.rend()
              ? std::string("injections from the first")
              : "injections after " + std::to_string(last->injection)) +
         until;
}

CheckRow row_for(const CheckStandardAcceptance& acceptance,
                 const std::string& analyte) {
  CheckRow row;
  row.check = "check-standard";
  row.analyte = analyte;
  row.low = acceptance.recovery.low;
  row.high = acceptance.recovery.high;
  row.unit = "%";
  row.action = check_action_name(acceptance.action);
  return row;
}

}  // namespace

Outcomes judge_check_standards(const MeasuredAnalyte& analyte,
                               const Calibration& calibration,
                               const PercentRange& recovery) {
  Outcomes outcomes;
  for (const InjectionResponse& one : analyte.injections) {
    if (one.injection->role != Role::CheckStandard) continue;
    if (!one.nominal || !(*one.nominal > 0.0)) continue;
    outcomes.push_back(judge_one(one, calibration, recovery));
  }
  return outcomes;
}

Governed governed_by(const Outcomes& outcomes, Governs governs, int injection) {
  const auto after = first_from(outcomes, injection);
  Governed governed;
  if (after != outcomes.end() && after->injection == injection) {
    governed.failed = !after->passed;
    return governed;
  }
  if (after != outcomes.begin()) governed.failed = !std::prev(after)->passed;
  if (governs == Governs::Forward) return governed;
  if (after == outcomes.end()) {
    governed.no_closing = true;
  } else {
    governed.failed = governed.failed || !after->passed;
  }
  return governed;
}

std::vector<CheckRow> check_standard_rows(
    const Outcomes& outcomes, const CheckStandardAcceptance& acceptance,
    const std::string& analyte) {
  std::vector<CheckRow> rows;
  for (auto one = outcomes.begin(); one != outcomes.end(); ++one) {
    CheckRow row = row_for(acceptance, analyte);
    row.injection = one->injection;
    row.value = one->recovery_percent;
    row.passed = one->passed;
    row.note = one->note;
    if (!one->passed) row.affects = affected(outcomes, one, acceptance.governs);
    rows.push_back(std::move(row));
  }
  if (rows.empty()) {
    CheckRow row = row_for(acceptance, analyte);
    row.note = "not checked: no check standard contains the analyte";
    rows.push_back(std::move(row));
  }
  return rows;
}

}  // namespace loqsmith
