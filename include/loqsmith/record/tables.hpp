#pragma once

#include <iosfwd>

#include "loqsmith/record/published_run.hpp"

namespace loqsmith {

// The published tables: UTF-8, line feed, numbers in shortest round-trip form,
// empty for no value, `yes` or `no`. Byte-identical for the same run whatever
// the threads, folder and locale. Later versions add columns at the end only.
void write_results_table(std::ostream& out, const PublishedRun& run);
void write_limits_table(std::ostream& out, const PublishedRun& run);
void write_calibration_table(std::ostream& out, const PublishedRun& run);
/// One row a test, done or not, then the advice on weights and the standards
/// that tests point at.
void write_diagnostics_table(std::ostream& out, const PublishedRun& run);
void write_standards_table(std::ostream& out, const PublishedRun& run);
void write_peaks_table(std::ostream& out, const PublishedRun& run);
void write_checks_table(std::ostream& out, const PublishedRun& run);

}  // namespace loqsmith
