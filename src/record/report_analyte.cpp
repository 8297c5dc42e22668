#include <ostream>

#include "loqsmith/record/html.hpp"
#include "loqsmith/record/report_parts.hpp"

namespace loqsmith {

void report_analyte(std::ostream& out, const PublishedRun& run,
                    const AnalyteJudgement& analyte) {
  out << "<section id=\"" << analyte_id(analyte.analyte) << "\">\n<h2>"
      << html_name(analyte.analyte) << "</h2>\n";
  for (const CalibrationSet& set : analyte.sets) {
    if (analyte.sets.size() > 1) {
      out << (set.over_additions ? "<h3>Standard addition, "
                                 : "<h3>Calibration set ")
          << html_text(set.set) << "</h3>\n";
    }
    report_calibration(out, analyte, set);
    report_limits(out, run, analyte, set);
  }
  report_template(out, run, analyte.analyte);
  report_traces(out, run, analyte.analyte);
  if (!analyte.checks.empty()) {
    out << "<h3>Checks</h3>\n";
    report_checks_table(out, analyte.checks);
  }
  out << "</section>\n";
}

}  // namespace loqsmith
