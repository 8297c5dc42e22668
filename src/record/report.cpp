#include "loqsmith/record/report.hpp"

#include <ostream>

#include "loqsmith/record/html.hpp"
#include "loqsmith/record/report_parts.hpp"
#include "loqsmith/record/reportable.hpp"
#include "loqsmith/record/summaries.hpp"

namespace loqsmith {

void write_report(std::ostream& out, const PublishedRun& run) {
  out << "<!DOCTYPE html>\n<html lang=\"en\">\n<head>\n"
         "<meta charset=\"utf-8\">\n"
         "<meta name=\"viewport\" content=\"width=device-width, "
         "initial-scale=1\">\n"
         "<meta name=\"color-scheme\" content=\"light dark\">\n"
         // Nothing is fetched and nothing runs, whatever a name contains.
         "<meta http-equiv=\"Content-Security-Policy\" content=\"default-src "
         "'none'; style-src 'unsafe-inline'\">\n<title>"
      << html_text(run.sequence.name) << ", run "
      << std::to_string(run.run_number) << "</title>\n<style>" << kReportStyle
      << kFigureStyle << "</style>\n</head>\n<body>\n"
      << kReportMarks << "<main>\n";
  report_head(out, run);
  report_amendments(out, run);
  report_attention(out, run);
  report_grid(out, run);
  report_reportable(out, run);
  report_summary(out, run);
  for (const AnalyteJudgement& analyte : run.analytes) {
    report_analyte(out, run, analyte);
  }
  report_earlier_runs(out, run);
  report_files(out, run);
  report_cautions(out, run);
  out << "</main>\n</body>\n</html>\n";
}

}  // namespace loqsmith
