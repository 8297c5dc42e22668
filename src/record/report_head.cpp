#include <algorithm>
#include <ostream>

#include "loqsmith/record/html.hpp"
#include "loqsmith/record/report_parts.hpp"
#include "loqsmith/record/reportable.hpp"
#include "loqsmith/record/summaries.hpp"

namespace loqsmith {
namespace {

void fact(std::ostream& out, const std::string& name, const std::string& html) {
  out << "<div><dt>" << name << "</dt><dd>" << html << "</dd></div>\n";
}

std::string times(const PublishedRun& run) {
  return "<time>" + html_text(run.begun) + "</time> to <time>" +
         html_text(run.finished) + "</time>";
}

std::string inputs(const PublishedRun& run) {
  const auto with_hash =
      std::count_if(run.inputs.begin(), run.inputs.end(),
                    [](const InputFile& file) { return !file.sha256.empty(); });
  return "<a href=\"#files\">" + std::to_string(run.inputs.size()) +
         " files, " + std::to_string(with_hash) + " with SHA-256</a>";
}

std::string ledger(const PublishedRun& run) {
  const std::size_t colon = run.ledger_head.find(':');
  if (colon == std::string::npos) return html_text(run.ledger_head);
  return "line " + html_text(run.ledger_head.substr(0, colon)) +
         " <code class=\"hash\">" +
         html_text(run.ledger_head.substr(colon + 1)) + "</code>";
}

void links(std::ostream& out, const PublishedRun& run) {
  out << "<nav aria-label=\"Sections\"><a href=\"#attention\">Needs a "
         "person</a> <a href=\"#results\">Results</a>";
  if (has_repeats(run)) out << " <a href=\"#repeats\">Repeats</a>";
  if (has_groups(run)) out << " <a href=\"#groups\">Groups</a>";
  for (const AnalyteJudgement& analyte : run.analytes) {
    out << " <a href=\"#" << analyte_id(analyte.analyte) << "\">"
        << html_name(analyte.analyte) << "</a>";
  }
  out << " <a href=\"#files\">Files</a> <a href=\"#cautions\">Cautions</a>"
         "</nav>\n";
}

}  // namespace

void report_head(std::ostream& out, const PublishedRun& run) {
  const Method& method = run.method;
  out << "<header>\n<p class=\"over\">Sequence report</p>\n<h1>"
      << html_name(run.sequence.name) << " <small>run "
      << std::to_string(run.run_number) << "</small></h1>\n<p class=\"lead\">"
      << html_name(method.title) << "</p>\n<dl class=\"facts\">\n";
  fact(out, "Method",
       html_name(method.id) + ", revision " + html_name(method.revision));
  fact(out, "Processed", times(run));
  fact(out, "Program",
       "loqsmith " + html_text(run.program_version) + ", " +
           html_text(run.build) + ", " + html_text(run.processor_class));
  fact(out, "Injections", std::to_string(run.sequence.injections.size()));
  fact(out, "Inputs", inputs(run));
  fact(out, "Ledger", ledger(run));
  if (!run.signed_before.empty()) {
    fact(out, "Earlier runs signed", html_text(run.signed_before));
  }
  out << "</dl>\n";
  links(out, run);
  out << "</header>\n";
}

}  // namespace loqsmith
