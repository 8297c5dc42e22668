#include <ostream>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/record/html.hpp"
#include "loqsmith/record/report_parts.hpp"

namespace loqsmith {
namespace {

void problems(std::ostream& out, const PublishedRun& run) {
  out << "<h3 id=\"problems\">Problems</h3>\n";
  if (run.problems.empty()) {
    out << "<p class=\"calm\">Every file was read.</p>\n";
    return;
  }
  out << "<ul class=\"attention\">\n";
  for (const auto& [injection, problem] : run.problems) {
    out << "<li>Injection " << std::to_string(injection) << ": "
        << html_text(describe(problem)) << "</li>\n";
  }
  out << "</ul>\n";
}

void warnings(std::ostream& out, const PublishedRun& run) {
  std::string html;
  for (const InputFile& file : run.inputs) {
    if (file.warnings.empty()) continue;
    html += "<li>" + html_name(file.path) + ": " +
            html_text(join(file.warnings, "; ")) + "</li>\n";
  }
  if (html.empty()) return;
  out << "<h3>Warnings</h3>\n<ul>\n" << html << "</ul>\n";
}

void inputs(std::ostream& out, const PublishedRun& run) {
  out << "<h3>Inputs</h3>\n<details><summary>"
      << std::to_string(run.inputs.size())
      << " files with their SHA-256</summary>\n<div class=\"wide\" "
         "role=\"region\" tabindex=\"0\" aria-label=\"Inputs\"><table "
         "class=\"small\">\n<thead><tr><th scope=\"col\">File</th><th "
         "scope=\"col\">Format</th><th scope=\"col\">Bytes</th><th "
         "scope=\"col\">SHA-256</th></tr></thead>\n<tbody>\n";
  for (const InputFile& file : run.inputs) {
    out << "<tr><th scope=\"row\">" << html_name(file.path) << "</th><td>"
        << html_text(file.format) << "</td><td class=\"number\">"
        << std::to_string(file.bytes) << "</td><td><code>"
        << (file.sha256.empty() ? "not read" : html_text(file.sha256))
        << "</code></td></tr>\n";
  }
  out << "</tbody></table></div></details>\n";
}

}  // namespace

void report_files(std::ostream& out, const PublishedRun& run) {
  out << "<section id=\"files\">\n<h2>Files</h2>\n";
  problems(out, run);
  if (!run.sequence_checks.empty()) {
    out << "<h3>Checks of the sequence</h3>\n";
    report_checks_table(out, run.sequence_checks);
  }
  warnings(out, run);
  inputs(out, run);
  out << "</section>\n";
}

}  // namespace loqsmith
