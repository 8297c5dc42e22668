#pragma once

#include <iosfwd>
#include <string>
#include <vector>

#include "loqsmith/record/published_run.hpp"

namespace loqsmith {

// The report's sections, in the order of the page.

/// Sequence, method, times, fingerprints, links to the sections.
void report_head(std::ostream& out, const PublishedRun& run);
/// "What needs a person", each linked to its place.
void report_attention(std::ostream& out, const PublishedRun& run);
/// Samples by analytes, then blanks, standards and controls.
void report_grid(std::ostream& out, const PublishedRun& run);
void report_analyte(std::ostream& out, const PublishedRun& run,
                    const AnalyteJudgement& analyte);
/// Checks of the sequence, problems, inputs with their hashes.
void report_files(std::ostream& out, const PublishedRun& run);
/// What the numbers do not say.
void report_cautions(std::ostream& out, const PublishedRun& run);

/// The limits of a set with their terms in words.
void report_limits_table(std::ostream& out, const AnalyteJudgement& analyte,
                         const CalibrationSet& set);
void report_checks_table(std::ostream& out,
                         const std::vector<CheckRow>& checks);

/// The page's style sheet and the marks of the states.
extern const char* const kReportStyle;
extern const char* const kReportMarks;

/// Roles whose result goes to a customer: samples and what repeats or
/// fortifies them.
bool is_sample_like(Role role);

/// "not detected", "above the range": for people.
std::string status_words(Status status);
/// The shape that stands for the state, whatever the colour.
std::string status_mark(Status status);

/// Ids that links point to.
std::string result_id(int injection, const std::string& analyte);
std::string analyte_id(const std::string& analyte);

}  // namespace loqsmith
