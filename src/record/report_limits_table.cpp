#include <ostream>

#include "loqsmith/record/html.hpp"
#include "loqsmith/record/report_parts.hpp"
#include "loqsmith/record/words.hpp"

namespace loqsmith {
namespace {

std::string with_bounds(const std::optional<double>& limit,
                        const std::optional<double>& lower,
                        const std::optional<double>& upper) {
  std::string html = html_number(limit);
  if (lower && upper) {
    html += "<span class=\"bounds-text\">" + html_number(*lower, 3) + " to " +
            html_number(*upper, 3) + "</span>";
  }
  return html;
}

std::string grade_words(Grade grade) {
  switch (grade) {
    case Grade::Valid:
      return "valid";
    case Grade::Note:
      return "valid, with a note";
    case Grade::Caution:
      return "caution";
    case Grade::NotValid:
      return "not valid";
    case Grade::NotApplicable:
      return "not applicable";
  }
  return {};
}

std::string terms(const LimitEstimate& estimate) {
  std::string html;
  for (const LimitTerm& term : estimate.terms) {
    html += "<li>" + html_text(term.name) + ' ' + html_number(term.value) +
            (term.unit.empty() ? std::string{} : ' ' + html_text(term.unit)) +
            "</li>";
  }
  for (const LimitFinding& finding : estimate.findings) {
    html += "<li class=\"finding\"><b>" + html_text(finding.word) + "</b>" +
            (finding.text.empty() ? std::string{}
                                  : ": " + html_text(finding.text)) +
            "</li>";
  }
  return html.empty() ? html : "<ul class=\"terms\">" + html + "</ul>";
}

void row(std::ostream& out, const LimitRow& limit) {
  const bool governs = limit.governs_detection || limit.governs_quantitation;
  out << "<tr" << (governs ? " class=\"governs\"" : "") << "><th scope=\"row\">"
      << html_text(limit.procedure);
  if (governs) {
    out << "<span class=\"under\">governs " << governing_word(limit)
        << "</span>";
  }
  out << "</th>";
  if (!limit.estimate) {
    out << "<td colspan=\"5\" class=\"reason\">not applicable: "
        << html_text(limit.estimate.reason()) << "</td></tr>\n";
    return;
  }
  const LimitEstimate& estimate = *limit.estimate;
  out << "<td class=\"number\">"
      << with_bounds(estimate.detection, estimate.detection_lower,
                     estimate.detection_upper)
      << "</td><td class=\"number\">"
      << with_bounds(estimate.quantitation, estimate.quantitation_lower,
                     estimate.quantitation_upper)
      << "</td><td class=\"number\">" << std::to_string(estimate.n)
      << "</td><td>" << grade_words(estimate.grade()) << "</td><td>"
      << terms(estimate) << "</td></tr>\n";
}

}  // namespace

void report_limits_table(std::ostream& out, const AnalyteJudgement& analyte,
                         const CalibrationSet& set) {
  if (set.limits.rows.empty()) return;
  out << "<div class=\"wide\" role=\"region\" "
         "tabindex=\"0\" aria-label=\"Limits of "
      << html_text(analyte.analyte)
      << "\"><table>\n<thead><tr><th scope=\"col\">Procedure</th><th "
         "class=\"number\" "
         "scope=\"col\">Detection, "
      << html_name(analyte.concentration_unit)
      << "</th><th class=\"number\" scope=\"col\">Quantitation, "
      << html_name(analyte.concentration_unit)
      << "</th><th class=\"number\" scope=\"col\">n</th><th "
         "scope=\"col\">Grade</th><th "
         "scope=\"col\">What went into it</th></tr></thead>\n<tbody>\n";
  for (const LimitRow& limit : set.limits.rows) row(out, limit);
  out << "</tbody></table></div>\n";
}

}  // namespace loqsmith
