#include <ostream>

#include "loqsmith/base/text.hpp"
#include "loqsmith/record/figures.hpp"
#include "loqsmith/record/html.hpp"
#include "loqsmith/record/limit_text.hpp"
#include "loqsmith/record/report_parts.hpp"
#include "loqsmith/record/svg.hpp"

namespace loqsmith {
namespace {

void governing_words(std::ostream& out, const AnalyteJudgement& analyte,
                     const CalibrationSet& set,
                     const ReportingSettings& reporting) {
  if (!set.limits.governing) {
    out << "<p class=\"trouble\">No limits govern: "
        << html_text(set.limits.governing.reason()) << ".</p>\n";
    return;
  }
  const GoverningLimits& limits = *set.limits.governing;
  const std::string unit = ' ' + html_name(analyte.concentration_unit);
  out << "<p>Detection limit <strong>"
      << html_limit(limits.detection, reporting) << unit << "</strong> ("
      << html_text(limits.detection_procedure)
      << "), quantitation limit <strong>"
      << html_limit(limits.quantitation, reporting) << unit << "</strong> ("
      << html_text(limits.quantitation_procedure) << "), present from "
      << html_limit(limits.decision_threshold, reporting) << unit
      << " up; in the undiluted vial.";
  if (!limits.notes.empty()) {
    out << " Notes: " << html_text(join(limits.notes, ", ")) << '.';
  }
  out << "</p>\n";
}

bool any_critical_value(const CalibrationSet& set) {
  for (const LimitRow& row : set.limits.rows) {
    if (row.estimate && row.estimate->critical_value) return true;
  }
  return false;
}

// How the scale is read.
void reading(std::ostream& out, const CalibrationSet& set) {
  out << "<p class=\"reading\">";
  if (any_critical_value(set)) {
    svg_swatch_mark(out, "limit-critical", "critical", "critical value");
  }
  svg_swatch_mark(out, "limit-detection", "detection", "detection limit");
  svg_swatch_mark(out, "limit-quantitation", "quantitation",
                  "quantitation limit");
  svg_swatch(out, "bounds", "95 % bounds, where they are known");
  svg_swatch_mark(out, "limit-struck", "struck", "struck out: not valid");
  out << "Upright lines: the limits that govern; between them a result is an "
         "estimate. Standards: their levels, struck out where left out. "
         "Samples: by the marks of the results, and what stands close together "
         "piled up. Limits are rounded up.</p>\n";
}

}  // namespace

void report_limits(std::ostream& out, const PublishedRun& run,
                   const AnalyteJudgement& analyte, const CalibrationSet& set) {
  const ReportingSettings reporting = reporting_of(run.method, analyte.analyte);
  out << "<h3>Limits";
  if (analyte.sets.size() > 1) out << ", set " << html_text(set.set);
  out << "</h3>\n";
  governing_words(out, analyte, set, reporting);
  if (has_limits_figure(analyte, set)) {
    figure_limits(out, analyte, set, reporting);
    reading(out, set);
  }
  report_limits_table(out, analyte, set, reporting);
}

}  // namespace loqsmith
