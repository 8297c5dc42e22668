#include <algorithm>

#include "loqsmith/record/published_run.hpp"
#include "loqsmith/record/reportable.hpp"

namespace loqsmith {
namespace {

bool any_failed(const std::vector<CheckRow>& checks) {
  return std::any_of(checks.begin(), checks.end(), [](const CheckRow& check) {
    return check.passed == false;
  });
}

bool any_withheld(const std::vector<ResultRow>& results) {
  return std::any_of(results.begin(), results.end(), [](const ResultRow& row) {
    return row.status == Status::Withheld;
  });
}

bool any_disagreement(const PublishedRun& run) {
  const std::vector<ReportableRow> rows = reportable_of(run);
  return std::any_of(rows.begin(), rows.end(), [](const ReportableRow& row) {
    return row.status == Status::Withheld;
  });
}

bool lacks_a_base(const AnalyteJudgement& analyte) {
  return std::any_of(analyte.sets.begin(), analyte.sets.end(),
                     [](const CalibrationSet& set) {
                       return !set.calibration || !set.limits.governing;
                     });
}

}  // namespace

bool needs_a_person(const PublishedRun& run) {
  if (!run.problems.empty() || any_failed(run.sequence_checks)) return true;
  if (any_disagreement(run)) return true;
  return std::any_of(run.analytes.begin(), run.analytes.end(),
                     [](const AnalyteJudgement& analyte) {
                       return any_withheld(analyte.results) ||
                              any_failed(analyte.checks) ||
                              lacks_a_base(analyte);
                     });
}

}  // namespace loqsmith
