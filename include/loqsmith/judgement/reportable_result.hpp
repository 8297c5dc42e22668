#pragma once

#include <optional>
#include <string>
#include <vector>

#include "loqsmith/chromatogram/sequence.hpp"
#include "loqsmith/judgement/reportable_choice.hpp"
#include "loqsmith/judgement/reported_text.hpp"
#include "loqsmith/judgement/rows.hpp"
#include "loqsmith/judgement/settings.hpp"

namespace loqsmith {

/// What is reported of one analyte in one sample, whatever the number of its
/// injections and dilutions.
struct ReportableRow {
  int first_injection = 0;  ///< of the sample, counting or not
  std::string sample;
  std::string analyte;
  std::vector<std::string> groups;  ///< each that an injection names, once
  std::vector<int> injections;      ///< those that count, in run order
  std::optional<double> dilution;   ///< of those that count
  /// The mean of those that count, at full precision, never censored; nothing:
  /// they contradict each other, or one of them has no number.
  std::optional<double> result;
  std::string unit;
  /// The largest of those that count.
  std::optional<double> detection_limit;
  std::optional<double> quantitation_limit;
  Status status = Status::Withheld;
  ReportedValue value;  ///< what `reported` says, before rounding
  std::string reported;
  std::string qualifier;
  /// All of those that count, most serious first; "dilutions-disagree" alone
  /// where none does.
  std::vector<std::string> reasons;
  std::vector<RejectedRepeat> rejected;
};

/// One row a sample (and unit) in the order of their first injections, from the
/// results of role "sample". Where a single injection counts, status, result
/// and text are those of results.csv.
std::vector<ReportableRow> reportable_results(
    const AnalyteJudgement& analyte, const Sequence& sequence,
    const UnitSettings& units, const ReportingSettings& reporting);

}  // namespace loqsmith
