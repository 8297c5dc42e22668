#include <algorithm>
#include <array>
#include <ostream>
#include <string_view>

#include "loqsmith/record/html.hpp"
#include "loqsmith/record/limit_text.hpp"
#include "loqsmith/record/report_parts.hpp"
#include "loqsmith/record/words.hpp"

namespace loqsmith {
namespace {

struct Table {
  const AnalyteJudgement& analyte;
  const CalibrationSet& set;
  const ReportingSettings& reporting;
  bool critical = false;  ///< some procedure gives a critical value
};

// Findings that the figure of the residuals lets a reader see.
bool seen_in_residuals(const LimitFinding& finding) {
  constexpr std::array<std::string_view, 4> kWords = {
      "variance-grows", "blank-differs-from-intercept", "curvature-at-low-end",
      "residuals-exceed-blanks"};
  return std::find(kWords.begin(), kWords.end(), finding.word) != kWords.end();
}

std::string with_bounds(const Table& table, const std::optional<double>& limit,
                        const std::optional<double>& lower,
                        const std::optional<double>& upper) {
  std::string html = html_limit(limit, table.reporting);
  if (lower && upper) {
    html += "<span class=\"bounds-text\">" + html_number(*lower, 3) + " to " +
            html_number(*upper, 3) + "</span>";
  }
  return html;
}

// What speaks against the procedure, in full beside its name: the worst first.
std::string objections(const Table& table, const LimitEstimate& estimate) {
  std::vector<const LimitFinding*> found;
  for (const LimitFinding& finding : estimate.findings) {
    if (finding.grade != Grade::Note) found.push_back(&finding);
  }
  std::stable_sort(found.begin(), found.end(),
                   [](const LimitFinding* a, const LimitFinding* b) {
                     return a->grade > b->grade;
                   });
  std::string html;
  for (const LimitFinding* finding : found) {
    html += "<li class=\"" + grade_name(finding->grade) + "\">" +
            grade_mark(finding->grade) + "<b>" + grade_words(finding->grade) +
            "</b>, " + html_text(finding->word);
    if (!finding->text.empty()) html += ": " + html_text(finding->text);
    if (seen_in_residuals(*finding) && table.set.calibration) {
      html += " (<a href=\"#" +
              residuals_id(table.analyte.analyte, table.set.set) +
              "\">see the residuals</a>)";
    }
    html += "</li>";
  }
  return html.empty() ? html : "<ul class=\"objections\">" + html + "</ul>";
}

std::string terms(const LimitEstimate& estimate) {
  std::string html;
  for (const LimitTerm& term : estimate.terms) {
    html += "<li>" + html_text(term.name) + ' ' + html_number(term.value) +
            (term.unit.empty() ? std::string{} : ' ' + html_text(term.unit)) +
            "</li>";
  }
  for (const LimitFinding& finding : estimate.findings) {
    if (finding.grade != Grade::Note) continue;
    html += "<li class=\"remark\">" + html_text(finding.word) +
            (finding.text.empty() ? std::string{}
                                  : ": " + html_text(finding.text)) +
            "</li>";
  }
  return html.empty() ? html : "<ul class=\"terms\">" + html + "</ul>";
}

void name_cell(std::ostream& out, const Table& table, const LimitRow& limit) {
  out << "<th scope=\"row\">" << html_text(limit.procedure);
  if (limit.governs_detection || limit.governs_quantitation) {
    out << "<span class=\"under\">governs " << governing_word(limit)
        << "</span>";
  }
  const Grade grade = limit.grade();
  if (!limit.estimate || grade == Grade::Valid || grade == Grade::Note) {
    out << "<span class=\"verdict " << grade_name(grade) << "\">"
        << grade_mark(grade) << grade_words(grade) << "</span>";
  } else {
    out << objections(table, *limit.estimate);
  }
  out << "</th>";
}

void row(std::ostream& out, const Table& table, const LimitRow& limit,
         std::size_t index) {
  const bool governs = limit.governs_detection || limit.governs_quantitation;
  out << "<tr id=\""
      << limit_row_id(table.analyte.analyte, table.set.set, index) << "\""
      << (governs ? " class=\"governs\"" : "") << '>';
  name_cell(out, table, limit);
  if (!limit.estimate) {
    out << "<td colspan=\"" << (table.critical ? 5 : 4)
        << "\" class=\"reason\">" << html_text(limit.estimate.reason())
        << "</td></tr>\n";
    return;
  }
  const LimitEstimate& estimate = *limit.estimate;
  if (table.critical) {
    out << "<td class=\"number\">"
        << html_limit(estimate.critical_value, table.reporting) << "</td>";
  }
  out << "<td class=\"number\">"
      << with_bounds(table, estimate.detection, estimate.detection_lower,
                     estimate.detection_upper)
      << "</td><td class=\"number\">"
      << with_bounds(table, estimate.quantitation, estimate.quantitation_lower,
                     estimate.quantitation_upper)
      << "</td><td class=\"number\">" << std::to_string(estimate.n)
      << "</td><td>" << terms(estimate) << "</td></tr>\n";
}

void head(std::ostream& out, const Table& table) {
  const std::string unit =
      ", " + html_name(table.analyte.concentration_unit) + "</th>";
  const std::string column = "<th class=\"number\" scope=\"col\">";
  out << "<thead><tr><th scope=\"col\">Procedure</th>";
  if (table.critical) out << column << "Critical value" << unit;
  out << column << "Detection" << unit << column << "Quantitation" << unit
      << column
      << "n</th><th scope=\"col\">What went into it</th></tr></thead>\n";
}

}  // namespace

void report_limits_table(std::ostream& out, const AnalyteJudgement& analyte,
                         const CalibrationSet& set,
                         const ReportingSettings& reporting) {
  const std::vector<LimitRow>& rows = set.limits.rows;
  if (rows.empty()) return;
  const bool critical =
      std::any_of(rows.begin(), rows.end(), [](const LimitRow& limit) {
        return limit.estimate && limit.estimate->critical_value;
      });
  const Table table{analyte, set, reporting, critical};
  out << "<div class=\"wide\" role=\"region\" "
         "tabindex=\"0\" aria-label=\"Limits of "
      << html_text(analyte.analyte) << "\"><table class=\"limits\">\n";
  head(out, table);
  out << "<tbody>\n";
  for (std::size_t i = 0; i < rows.size(); ++i) row(out, table, rows[i], i);
  out << "</tbody></table></div>\n";
}

}  // namespace loqsmith
