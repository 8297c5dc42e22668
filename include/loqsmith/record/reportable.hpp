#pragma once

#include <iosfwd>
#include <vector>

#include "loqsmith/base/json_writer.hpp"
#include "loqsmith/judgement/reportable_result.hpp"
#include "loqsmith/record/published_run.hpp"

namespace loqsmith {

/// One row a sample and analyte, analytes in the method's order, in each the
/// samples by their first injection. Surrogates are nobody's result: none.
std::vector<ReportableRow> reportable_of(const PublishedRun& run);
std::vector<ReportableRow> reportable_of(const PublishedRun& run,
                                         const AnalyteJudgement& analyte);

/// reportable.csv: what is reported of each sample, one row an analyte, samples
/// by their first injection.
///
/// - `sample`, `analyte`, `group` (all that its injections name);
/// - `injections` that count, separated by semicolons, and their `dilution`;
/// - `result`: their mean at full precision, never censored; empty where they
///   contradict each other; `unit`;
/// - `detection_limit`, `quantitation_limit`: their own (the largest);
/// - `status`, `reported`, `qualifier`, `reasons` as in results.csv;
/// - `rejected`: the sample's other injections, each with the reason why it
///   does not count, "27:above-range;56:more-diluted".
void write_reportable_table(std::ostream& out, const PublishedRun& run);

/// `reportable` of record.json: the samples with more than one injection; of
/// the others the decision is the reportable result.
void record_reportable(JsonWriter& json, const PublishedRun& run);

/// The report's section; nothing where no sample was injected more than once.
void report_reportable(std::ostream& out, const PublishedRun& run);

/// True where a sample was injected more than once.
bool has_repeats(const PublishedRun& run);

/// Those that stand for more than one injection.
std::vector<ReportableRow> repeated_only(std::vector<ReportableRow> rows);

/// "27:above-range", "56:more-diluted".
std::vector<std::string> rejected_words(const ReportableRow& row);

}  // namespace loqsmith
