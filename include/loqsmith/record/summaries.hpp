#pragma once

#include <iosfwd>
#include <vector>

#include "loqsmith/judgement/group_summaries.hpp"
#include "loqsmith/record/published_run.hpp"

namespace loqsmith {

/// The groups that the sequence names, one row an analyte and unit, analytes in
/// the method's order; none where no sample is in a group.
std::vector<SummaryRow> summaries_of(const PublishedRun& run);

/// True where the sequence names a group of samples.
bool has_groups(const PublishedRun& run);

/// summary.csv, always published; without groups only its head. One row a
/// method for each group, analyte and unit; one row without method where only
/// the count is due:
///
/// - `group`, `analyte`, `unit`;
/// - `n` results used, one a sample; of them `measured`, `below_limit`,
///   `above_range`; `withheld` ones are left out; `detected_percent` of n is
///   what was measured or above the range;
/// - `method`: kaplan-meier, order-statistics, lognormal (maximum likelihood);
///   `advised`: yes for the one that fits number and fraction;
/// - `mean`, `upper_mean` (95 % upper confidence limit of the mean, one-sided),
///   `standard_deviation`, `p10`, `p25`, `median`, `p75`, `p90`, `p95`: empty
///   where they do not follow from the data;
/// - `note`: why a number is missing or what bounds it, and the reason for the
///   advice.
void write_summary_table(std::ostream& out, const PublishedRun& run);

/// The report's section; nothing where there are no groups.
void report_summary(std::ostream& out, const PublishedRun& run);

/// Distribution of one group and analyte: its steps, a dot at each measured
/// value, strokes to the left at "<" limits and to the right at ">" ends.
void figure_summary(std::ostream& out, const SummaryRow& row);

/// True where figure_summary() has something to draw.
bool has_summary_figure(const SummaryRow& row);

}  // namespace loqsmith
