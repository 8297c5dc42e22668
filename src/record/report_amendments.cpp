#include <algorithm>
#include <ostream>
#include <string>

#include "loqsmith/record/html.hpp"
#include "loqsmith/record/report_parts.hpp"

namespace loqsmith {
namespace {

void head(std::ostream& out, const std::string& label,
          const std::vector<std::string>& columns) {
  out << "<div class=\"wide\" role=\"region\" tabindex=\"0\" aria-label=\""
      << label << "\"><table>\n<thead><tr>";
  for (const std::string& column : columns) {
    out << "<th scope=\"col\">" << column << "</th>";
  }
  out << "</tr></thead>\n<tbody>\n";
}

void decisions(std::ostream& out, const PublishedRun& run) {
  head(out, "Amendments", {"What", "Who", "When", "Why", "In force"});
  for (const Amendment& amendment : run.amendments) {
    out << "<tr><th scope=\"row\">" << html_text(describe(amendment))
        << "</th><td>" << html_name(amendment.who) << "</td><td>"
        << html_text(amendment.when) << "</td><td>" << html_name(amendment.why)
        << "</td><td>" << (amendment.in_force ? "yes" : "no") << "</td></tr>\n";
  }
  out << "</tbody></table></div>\n";
}

void touched_row(std::ostream& out, const ResultRow& row) {
  out << "<tr><td class=\"number\"><a href=\"#"
      << result_id(row.injection, row.analyte) << "\">"
      << std::to_string(row.injection) << "</a></td><th scope=\"row\">"
      << html_name(row.sample) << "</th><td>" << html_name(row.analyte)
      << "</td><td class=\"number\">" << html_number(row.automatic->result)
      << "</td><td>" << status_words(row.automatic->status) << ": "
      << html_text(row.automatic->reported) << "</td><td class=\"number\">"
      << html_number(row.result) << "</td><td>" << status_words(row.status)
      << ": " << html_text(row.reported) << "</td></tr>\n";
}

void touched(std::ostream& out, const PublishedRun& run) {
  std::vector<const ResultRow*> rows;
  for (const AnalyteJudgement& analyte : run.analytes) {
    for (const ResultRow& row : analyte.results) {
      if (row.automatic) rows.push_back(&row);
    }
  }
  if (rows.empty()) {
    out << "<p>They change no result.</p>\n";
    return;
  }
  std::stable_sort(rows.begin(), rows.end(),
                   [](const ResultRow* a, const ResultRow* b) {
                     return a->injection < b->injection;
                   });
  out << "<h3>Results they touch</h3>\n";
  head(out, "Amended results",
       {"Inj.", "Sample", "Analyte", "Automatic result", "Automatic",
        "Amended result", "Amended"});
  for (const ResultRow* row : rows) touched_row(out, *row);
  out << "</tbody></table></div>\n";
}

void changed(std::ostream& out, const PublishedRun& run) {
  const std::string last = html_name(run.earlier_runs.back().run);
  if (!run.not_compared.empty()) {
    out << "<p>Not compared with " << html_text(run.not_compared) << "</p>\n";
    return;
  }
  if (run.reported_changes.empty()) {
    out << "<p>Every reported text is that of " << last << ".</p>\n";
    return;
  }
  out << "<p>Reported otherwise than in " << last << ":</p>\n";
  head(out, "Changes", {"Inj.", "Analyte", "Was", "Is"});
  for (const ReportedChange& change : run.reported_changes) {
    out << "<tr><td class=\"number\">" << std::to_string(change.injection)
        << "</td><th scope=\"row\">" << html_name(change.analyte) << "</th><td>"
        << html_text(change.was.empty() ? "none" : change.was) << "</td><td>"
        << html_text(change.is.empty() ? "none" : change.is) << "</td></tr>\n";
  }
  out << "</tbody></table></div>\n";
}

}  // namespace

void report_amendments(std::ostream& out, const PublishedRun& run) {
  if (run.amendments.empty()) return;
  out << "<section id=\"amendments\">\n<h2>Amendments</h2>\n<p>People decided "
         "otherwise than the program, unsigned. Every result that this touches "
         "bears the word amended-unsigned; beside it stands what the program "
         "alone says.</p>\n";
  decisions(out, run);
  touched(out, run);
  out << "</section>\n";
}

void report_earlier_runs(std::ostream& out, const PublishedRun& run) {
  if (run.earlier_runs.empty()) return;
  out << "<section id=\"earlier\">\n<h2>Earlier runs of this sequence</h2>\n"
         "<ul>\n";
  for (const EarlierRun& earlier : run.earlier_runs) {
    out << "<li>" << html_name(earlier.run) << ", begun "
        << html_text(earlier.begun)
        << (earlier.amended ? ", with amendments" : "") << "</li>\n";
  }
  out << "</ul>\n";
  changed(out, run);
  out << "</section>\n";
}

}  // namespace loqsmith
