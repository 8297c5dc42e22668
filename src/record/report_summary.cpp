#include <ostream>

#include "loqsmith/base/text.hpp"
#include "loqsmith/record/html.hpp"
#include "loqsmith/record/summaries.hpp"

namespace loqsmith {
namespace {

void explain(std::ostream& out) {
  out << "<p>One value a sample. A result below a limit counts as below that "
         "limit, one above the range as above its end; nothing is put in their "
         "place, and withheld results are left out. Kaplan-Meier assumes no "
         "shape; order statistics fill in what lies below limits from a "
         "lognormal line through the measured values; lognormal is maximum "
         "likelihood. The method in bold fits number and fraction at hand; "
         "with over 80 % censored, or fewer than 5 measured among censored "
         "ones, only the count is given. The upper limit of the mean is "
         "one-sided, 95 %, and approximate: by Student's t on the standard "
         "error (Kaplan-Meier's own; leaving out one result at a time), by "
         "Cox's method for the lognormal.</p>\n";
}

void number_cells(std::ostream& out, const CensoredEstimate& estimate) {
  for (const std::optional<double>& one :
       {estimate.mean, estimate.upper_mean, estimate.standard_deviation}) {
    out << "<td class=\"number\">" << html_number(one, 3) << "</td>";
  }
  for (const std::optional<double>& one : estimate.percentiles) {
    out << "<td class=\"number\">" << html_number(one, 3) << "</td>";
  }
}

void method_row(std::ostream& out, const SummaryRow& row,
                const MethodSummary& method) {
  const bool advised = row.summary.advised == method.method;
  out << "<tr" << (advised ? " class=\"governs\"" : "") << "><th scope=\"row\">"
      << summary_method_name(method.method);
  if (advised) out << "<span class=\"under\">advised</span>";
  out << "</th>";
  if (!method.estimate) {
    out << "<td colspan=\"10\" class=\"reason\">not applicable: "
        << html_text(method.estimate.reason()) << "</td></tr>\n";
    return;
  }
  number_cells(out, *method.estimate);
  out << "<td>" << html_text(join(method.estimate->notes, ", "))
      << "</td></tr>\n";
}

void method_table(std::ostream& out, const SummaryRow& row) {
  out << "<div class=\"wide\" role=\"region\" tabindex=\"0\" aria-label=\""
      << "Summary of " << html_text(row.analyte) << ", " << html_text(row.group)
      << "\"><table>\n<thead><tr><th scope=\"col\">Method</th>";
  for (const char* title : {"Mean", "Upper limit of mean", "Standard deviation",
                            "10 %", "25 %", "Median", "75 %", "90 %", "95 %"}) {
    out << "<th scope=\"col\" class=\"number\">" << title << "</th>";
  }
  out << "<th scope=\"col\">Note</th></tr></thead>\n<tbody>\n";
  for (const MethodSummary& method : row.summary.methods) {
    method_row(out, row, method);
  }
  out << "</tbody></table></div>\n";
}

void counts(std::ostream& out, const SummaryRow& row) {
  const CensoredCounts& counts = row.summary.counts;
  out << "<p>" << std::to_string(counts.all()) << " results in "
      << html_name(row.unit) << ": " << std::to_string(counts.measured)
      << " measured, " << std::to_string(counts.below) << " below limits, "
      << std::to_string(counts.above) << " above the range";
  if (row.withheld > 0) {
    out << "; " << std::to_string(row.withheld) << " withheld";
  }
  out << '.';
  if (row.summary.methods.empty()) {
    out << " Only the count is given: " << html_text(row.summary.advice) << '.';
  }
  out << "</p>\n";
}

void figure(std::ostream& out, const SummaryRow& row) {
  if (!has_summary_figure(row)) return;
  out << "<div class=\"figures\">\n<figure>\n";
  figure_summary(out, row);
  out << "<figcaption>Percent of results at or below each value "
         "(Kaplan-Meier): <span class=\"key\">\xE2\x97\x8F</span> measured. "
         "Hooks below point down from limits, hooks above point up from ends "
         "of the range.</figcaption>\n</figure>\n</div>\n";
}

}  // namespace

void report_summary(std::ostream& out, const PublishedRun& run) {
  if (!has_groups(run)) return;
  const std::vector<SummaryRow> rows = summaries_of(run);
  out << "<section id=\"groups\">\n<h2>Groups</h2>\n";
  explain(out);
  for (const SummaryRow& row : rows) {
    out << "<h3>" << html_name(row.group) << ": " << html_name(row.analyte)
        << "</h3>\n";
    counts(out, row);
    if (!row.summary.methods.empty()) method_table(out, row);
    figure(out, row);
  }
  out << "</section>\n";
}

}  // namespace loqsmith
