#include "loqsmith/judgement/bracketing_check.hpp"

#include <cmath>
#include <utility>

#include "loqsmith/base/reading_figures.hpp"
#include "loqsmith/calibration/curve_difference.hpp"

namespace loqsmith {
namespace {

std::string words_of(const CurveDifference& difference) {
  return "F test of a curve for each side against one for both, F(" +
         std::to_string(difference.numerator_df) + ", " +
         std::to_string(difference.denominator_df) +
         "), p = " + figure(difference.p) + "; the later standards respond " +
         figure(std::abs(difference.mean_percent)) + " % " +
         (difference.mean_percent < 0.0 ? "less" : "more");
}

CheckRow row_for(const SetMembers& members) {
  CheckRow row;
  row.check = "bracketing";
  row.analyte = members.analyte.settings->analyte;
  row.action = check_action_name(CheckAction::Flag);
  row.affects = "results of injections " + std::to_string(members.opens) +
                " to " + std::to_string(members.closes);
  return row;
}

}  // namespace

void check_bracket(SetVerdict& verdict, const SetMembers& members,
                   const CalibrationSet& set) {
  if (members.opens == 0) return;
  verdict.findings.bracket = Bracket{members.opens, members.closes};
  CheckRow row = row_for(members);
  if (members.closing.empty()) {
    row.note = "not checked: no standards follow the samples";
    verdict.checks.push_back(std::move(row));
    return;
  }
  if (!set.calibration) {
    row.note = "not checked: no calibration";
    verdict.checks.push_back(std::move(row));
    return;
  }
  const auto difference = compare_curves(*set.calibration, members.closing);
  if (!difference) {
    row.note = "not checked: " + difference.reason();
  } else {
    row.value = difference->f;
    row.high = difference->critical;
    row.unit = "F";
    row.passed = difference->f <= difference->critical;
    row.note = words_of(*difference);
    if (!*row.passed) verdict.findings.careful.emplace_back("brackets-differ");
  }
  verdict.checks.push_back(std::move(row));
}

}  // namespace loqsmith
