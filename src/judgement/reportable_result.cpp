#include "loqsmith/judgement/reportable_result.hpp"

#include <algorithm>
#include <utility>

#include "loqsmith/judgement/reasons.hpp"
#include "loqsmith/judgement/sample_units.hpp"
#include "loqsmith/judgement/verdict.hpp"
#include "loqsmith/numerics/mean.hpp"

namespace loqsmith {
namespace {

using Counting = std::vector<const Repeat*>;

void take_larger(std::optional<double>& largest,
                 const std::optional<double>& one) {
  if (one && (!largest || *one > *largest)) largest = one;
}

std::optional<double> mean_result(const Counting& counting) {
  std::vector<double> results;
  for (const Repeat* one : counting) {
    if (!one->row->result) return std::nullopt;
    results.push_back(*one->row->result);
  }
  if (results.empty()) return std::nullopt;
  return results.size() == 1 ? results.front() : mean(results);
}

ReportedNumbers numbers_of(const Counting& counting) {
  ReportedNumbers numbers;
  numbers.result = mean_result(counting);
  for (const Repeat* one : counting) {
    take_larger(numbers.detection_limit, one->row->detection_limit);
    take_larger(numbers.quantitation_limit, one->row->quantitation_limit);
    take_larger(numbers.highest, one->end_of_range);
  }
  return numbers;
}

// The status' letter once, then what single injections carry besides it.
std::string letters_of(const ReportableChoice& choice,
                       const ReportingSettings& reporting) {
  const std::string own = qualifier_letter(choice.status, reporting);
  std::string letters = own;
  for (const Repeat* one : choice.counting) {
    const std::string& has = one->row->qualifier;
    if (!has.starts_with(own)) continue;
    const std::string more = has.substr(own.size());
    if (letters.find(more) == std::string::npos) letters += more;
  }
  return letters;
}

std::vector<std::string> reasons_of(const ReportableChoice& choice) {
  if (choice.disagree) return {kDilutionsDisagree};
  if (choice.counting.size() == 1) return choice.counting.front()->row->reasons;
  std::vector<std::string> words;
  for (const Repeat* one : choice.counting) {
    const std::vector<std::string>& own = one->row->reasons;
    words.insert(words.end(), own.begin(), own.end());
  }
  // What withholds stands first in each of them already.
  return choice.status == Status::Withheld
             ? without_repetition(std::move(words))
             : most_serious_first(std::move(words));
}

std::vector<std::string> groups_of(const std::vector<Repeat>& repeats) {
  std::vector<std::string> groups;
  for (const Repeat& one : repeats) groups.push_back(one.injection->group);
  return without_repetition(std::move(groups));
}

void describe_counting(ReportableRow& row, const ReportableChoice& choice,
                       const UnitSettings& units,
                       const ReportingSettings& reporting) {
  const ReportedNumbers numbers = numbers_of(choice.counting);
  const ResultRow& first = *choice.counting.front()->row;
  for (const Repeat* one : choice.counting) {
    row.injections.push_back(one->row->injection);
  }
  row.dilution = first.dilution;
  row.result = numbers.result;
  row.detection_limit = numbers.detection_limit;
  row.quantitation_limit = numbers.quantitation_limit;
  const ReportingSettings own =
      reporting_of(*choice.counting.front()->injection, units, reporting);
  row.value = reported_value(row.status, numbers, own);
  row.reported = choice.counting.size() == 1
                     ? first.reported
                     : reported_text(row.status, numbers, own);
}

ReportableRow row_of(const SampleRepeats& sample, const std::string& analyte,
                     const UnitSettings& units,
                     const ReportingSettings& reporting) {
  ReportableChoice choice = choose_reportable(sample.repeats);
  ReportableRow row;
  row.first_injection = sample.repeats.front().row->injection;
  row.sample = sample.sample;
  row.analyte = analyte;
  row.groups = groups_of(sample.repeats);
  row.unit = sample.unit;
  row.status = choice.status;
  row.reported = kWithheldText;
  row.qualifier = letters_of(choice, reporting);
  row.reasons = reasons_of(choice);
  if (!choice.counting.empty()) {
    describe_counting(row, choice, units, reporting);
  }
  row.rejected = std::move(choice.rejected);
  return row;
}

}  // namespace

std::vector<ReportableRow> reportable_results(
    const AnalyteJudgement& analyte, const Sequence& sequence,
    const UnitSettings& units, const ReportingSettings& reporting) {
  std::vector<ReportableRow> rows;
  for (const SampleRepeats& sample :
       repeats_of_samples(analyte.results, analyte.sets, sequence, units)) {
    rows.push_back(row_of(sample, analyte.analyte, units, reporting));
  }
  return rows;
}

}  // namespace loqsmith
