#include "loqsmith/night/stage_run.hpp"

#include <fstream>
#include <locale>
#include <system_error>

#include "loqsmith/base/files.hpp"
#include "loqsmith/base/halt.hpp"
#include "loqsmith/record/record_json.hpp"
#include "loqsmith/record/report.hpp"
#include "loqsmith/record/reportable.hpp"
#include "loqsmith/record/summaries.hpp"
#include "loqsmith/record/tables.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;

using Writer = void (*)(std::ostream&, const PublishedRun&);

void write(const fs::path& path, const PublishedRun& run, Writer writer) {
  std::ofstream out(path, std::ios::binary | std::ios::trunc);
  out.imbue(std::locale::classic());
  if (out) writer(out, run);
  out.close();
  if (!out) {
    throw Halt(ExitStatus::IoFailed,
               "cannot write " + path.string() + ": is the disk full?");
  }
}

void keep_sheets(const fs::path& staging, const SheetTexts& texts) {
  const fs::path inputs = staging / "inputs";
  fs::create_directory(inputs);
  write_new_file(inputs / "sequence.csv", texts.sequence_csv);
  write_new_file(inputs / "levels.csv", texts.levels_csv);
  write_new_file(inputs / "method.xml", texts.method_xml);
  if (texts.amendments_csv) {
    write_new_file(inputs / "amendments.csv", *texts.amendments_csv);
  }
}

}  // namespace

void stage_run(const fs::path& staging, const SequenceFolder& folder,
               const PublishedRun& run, bool with_report) {
  try {
    keep_sheets(staging, folder.texts);
  } catch (const std::system_error& error) {
    throw Halt(ExitStatus::IoFailed, error.what());
  }
  write(staging / "results.csv", run, write_results_table);
  write(staging / "reportable.csv", run, write_reportable_table);
  write(staging / "limits.csv", run, write_limits_table);
  write(staging / "calibration.csv", run, write_calibration_table);
  write(staging / "diagnostics.csv", run, write_diagnostics_table);
  write(staging / "standards.csv", run, write_standards_table);
  write(staging / "peaks.csv", run, write_peaks_table);
  write(staging / "checks.csv", run, write_checks_table);
  write(staging / "summary.csv", run, write_summary_table);
  write(staging / "record.json", run, write_record);
  if (with_report) write(staging / "report.html", run, write_report);
}

}  // namespace loqsmith
