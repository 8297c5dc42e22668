#pragma once

#include <cstddef>
#include <iosfwd>
#include <string>
#include <vector>

#include "loqsmith/record/published_run.hpp"

namespace loqsmith {

// The report's sections, in the order of the page.

/// Sequence, method, times, fingerprints, links to the sections.
void report_head(std::ostream& out, const PublishedRun& run);
/// What people decided, and each result that it touches, automatic and amended;
/// nothing where nobody decided anything.
void report_amendments(std::ostream& out, const PublishedRun& run);
/// Earlier runs of the sequence and what is reported otherwise since the last.
void report_earlier_runs(std::ostream& out, const PublishedRun& run);
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

/// The traces drawn for an analyte; nothing where there are none.
void report_traces(std::ostream& out, const PublishedRun& run,
                   const std::string& analyte);
/// What the template response scales; nothing where no shape was learned.
void report_template(std::ostream& out, const PublishedRun& run,
                     const std::string& analyte);

/// A set's curve in words and figures, with its diagnostics.
void report_calibration(std::ostream& out, const AnalyteJudgement& analyte,
                        const CalibrationSet& set);
/// Advice on the weight, and the standards to look at; nothing where the curve
/// was not diagnosed.
void report_advice(std::ostream& out, const AnalyteJudgement& analyte,
                   const CalibrationSet& set);
/// What the tests of a set's curve say; likewise.
void report_diagnostics(std::ostream& out, const CalibrationSet& set);
/// The limits of a set: those that govern, the scale, the table.
void report_limits(std::ostream& out, const PublishedRun& run,
                   const AnalyteJudgement& analyte, const CalibrationSet& set);
/// The limits of a set with their terms in words.
void report_limits_table(std::ostream& out, const AnalyteJudgement& analyte,
                         const CalibrationSet& set,
                         const ReportingSettings& reporting);
void report_checks_table(std::ostream& out,
                         const std::vector<CheckRow>& checks);

/// The page's style sheet, that of its figures, and the marks of states, grades
/// and limits.
extern const char* const kReportStyle;
extern const char* const kFigureStyle;
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
std::string residuals_id(const std::string& analyte, const std::string& set);
std::string limit_row_id(const std::string& analyte, const std::string& set,
                         std::size_t row);

}  // namespace loqsmith
