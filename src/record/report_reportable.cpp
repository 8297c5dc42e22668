#include <algorithm>
#include <ostream>

#include "loqsmith/base/text.hpp"
#include "loqsmith/record/html.hpp"
#include "loqsmith/record/report_parts.hpp"
#include "loqsmith/record/reportable.hpp"

namespace loqsmith {
namespace {

std::string link(int injection, const std::string& analyte) {
  return "<a href=\"#" + result_id(injection, analyte) + "\">" +
         std::to_string(injection) + "</a>";
}

void counting(std::ostream& out, const ReportableRow& row) {
  if (row.injections.empty()) out << "none";
  for (std::size_t i = 0; i < row.injections.size(); ++i) {
    out << (i == 0 ? "" : ", ") << link(row.injections[i], row.analyte);
  }
  if (row.dilution && *row.dilution != 1.0) {
    out << " \xC3\x97" << html_number(*row.dilution);
  }
}

void rejected(std::ostream& out, const ReportableRow& row) {
  for (std::size_t i = 0; i < row.rejected.size(); ++i) {
    out << (i == 0 ? "" : ", ") << link(row.rejected[i].injection, row.analyte)
        << ' ' << html_text(row.rejected[i].why);
  }
}

void table_row(std::ostream& out, const ReportableRow& row) {
  out << "<tr><th scope=\"row\" class=\"sample\">" << html_name(row.sample)
      << "</th><td>" << html_name(row.analyte) << "</td><td class=\""
      << status_name(row.status) << "\">" << status_mark(row.status)
      << "<span class=\"value\">" << html_text(row.reported) << "</span>";
  if (!row.qualifier.empty()) {
    out << "<span class=\"letter\">" << html_text(row.qualifier) << "</span>";
  }
  out << "<span class=\"unseen\">" << status_words(row.status)
      << "</span></td><td>" << html_text(row.unit) << "</td><td>";
  counting(out, row);
  out << "</td><td>";
  rejected(out, row);
  out << "</td><td>" << html_text(join(row.reasons, ", ")) << "</td></tr>\n";
}

}  // namespace

void report_reportable(std::ostream& out, const PublishedRun& run) {
  std::vector<ReportableRow> rows = repeated_only(reportable_of(run));
  if (rows.empty()) return;
  std::stable_sort(rows.begin(), rows.end(),
                   [](const ReportableRow& a, const ReportableRow& b) {
                     return a.first_injection < b.first_injection;
                   });
  out << "<section id=\"repeats\">\n<h2>Samples injected more than once</h2>\n"
         "<p>Of each one result is reported: the least diluted in range, "
         "repeats averaged; above the range the most diluted, below the "
         "quantitation limit the least diluted. Injections that contradict "
         "each other give none. All samples stand in "
         "<code>reportable.csv</code>.</p>\n<div class=\"wide\" "
         "role=\"region\" tabindex=\"0\" aria-label=\"Samples injected more "
         "than once\"><table class=\"grid\">\n<thead><tr>";
  for (const char* title : {"Sample", "Analyte", "Reported", "Unit",
                            "Injections that count", "Rejected", "Reasons"}) {
    out << "<th scope=\"col\">" << title << "</th>";
  }
  out << "</tr></thead>\n<tbody>\n";
  for (const ReportableRow& row : rows) table_row(out, row);
  out << "</tbody></table></div>\n</section>\n";
}

}  // namespace loqsmith
