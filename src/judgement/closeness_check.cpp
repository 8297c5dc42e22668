#include "loqsmith/judgement/closeness_check.hpp"

#include <optional>
#include <string>
#include <utility>

#include "loqsmith/judgement/repeats.hpp"
#include "loqsmith/judgement/reportable_choice.hpp"

namespace loqsmith {
namespace {

CheckRow blank_row(const AnalyteRules& settings,
                   const ClosenessAcceptance& accept) {
  CheckRow row;
  row.check = "closeness";
  row.analyte = settings.analyte;
  row.action = check_action_name(accept.action);
  return row;
}

std::string injections_of(const SampleRepeats& sample) {
  std::string text;
  for (const Repeat& one : sample.repeats) {
    if (one.row->status == Status::Withheld) continue;
    text += (text.empty() ? "injections " : ", ") +
            std::to_string(one.row->injection);
  }
  return text;
}

/// Nothing where the sample gives nothing to compare.
std::optional<CheckRow> compare(const SampleRepeats& sample, CheckRow row,
                                double most) {
  const std::vector<double> in_range = results_in_range(sample.repeats);
  const bool contradict = rule_each_other_out(sample.repeats);
  if (in_range.size() < 2 && !contradict) return std::nullopt;
  row.affects = "sample " + sample.sample;
  row.note = injections_of(sample);
  row.passed = !contradict;
  if (contradict) row.note += ": what one says rules out what another says";
  if (in_range.size() >= 2) {
    row.value = percent_difference(in_range);
    row.high = most;
    row.unit = "%";
    row.passed = !contradict && *row.value <= most;
  }
  return row;
}

CheckOutcome not_checked(CheckRow row, const std::string& why) {
  row.note = "not checked: " + why;
  return {{std::move(row)}, {}};
}

void withhold_or_flag(CheckOutcome& outcome, const SampleRepeats& sample,
                      CheckAction action) {
  for (const Repeat& one : sample.repeats) {
    outcome.effects.push_back(
        {one.row->injection, kDilutionsDisagree, action, false});
  }
}

}  // namespace

CheckOutcome check_closeness(const FirstResults& results) {
  const AnalyteRules& settings = *results.night.settings;
  if (!settings.acceptance.closeness) return {};
  const ClosenessAcceptance& accept = *settings.acceptance.closeness;
  const CheckRow blank = blank_row(settings, accept);
  if (settings.surrogate_concentration) {
    return not_checked(blank, "a surrogate is no part of samples");
  }
  CheckOutcome outcome;
  for (const SampleRepeats& sample :
       repeats_of_samples(results.results, results.sets,
                          *results.night.sequence, *results.night.units)) {
    std::optional<CheckRow> row = compare(sample, blank, accept.replicates);
    if (!row) continue;
    if (row->passed == false) withhold_or_flag(outcome, sample, accept.action);
    outcome.rows.push_back(*std::move(row));
  }
  if (!outcome.rows.empty()) return outcome;
  return not_checked(blank, "no sample has two results in range");
}

}  // namespace loqsmith
