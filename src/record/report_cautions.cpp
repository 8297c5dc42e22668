#include <algorithm>
#include <ostream>

#include "loqsmith/record/report_parts.hpp"

namespace loqsmith {
namespace {

bool any_analyte(const PublishedRun& run, auto&& condition) {
  return std::any_of(run.method.analytes.begin(), run.method.analytes.end(),
                     [&](const AnalyteSettings& analyte) {
                       return condition(analyte.limits);
                     });
}

}  // namespace

void report_cautions(std::ostream& out, const PublishedRun& run) {
  out << "<section id=\"cautions\">\n<h2>What these numbers do not say</h2>\n"
         "<ul>\n<li>This report supports, and does not replace, the "
         "laboratory's validated procedures, the regulations that bind it, "
         "and review by qualified people.</li>\n"
         "<li><code>calibration_uncertainty</code> comes from the inverse "
         "prediction alone (95 %). Sampling, preparation and recovery are not "
         "in it: it is not the method's whole uncertainty.</li>\n"
         "<li>States are decided on unrounded values. A reported text may "
         "therefore equal a printed limit and still lie below it. Printed "
         "limits are rounded up, never down.</li>\n"
         "<li>Confidence bounds of limits come from the spread that the limit "
         "is proportional to; they do not contain the uncertainty of the "
         "slope.</li>\n";
  if (any_analyte(run, [](const LimitSettings& limits) {
        return limits.decision == LimitSettings::Decision::DetectionLimit;
      })) {
    out << "<li>The decision is taken at the detection limit: of samples that "
           "truly lie at that limit, about half are called not "
           "detected.</li>\n";
  }
  if (any_analyte(run, [](const LimitSettings& limits) {
        return limits.governing == "largest";
      })) {
    out << "<li>The largest limit governs. It is chosen from this night's own "
           "data and therefore biased upward: about 1.1 times the truth with "
           "two equal procedures, 1.3 times with eight.</li>\n";
  }
  out << "<li>Limits computed from one night move from night to night; a "
         "reporting limit should come from a validation.</li>\n</ul>\n"
         "</section>\n";
}

}  // namespace loqsmith
