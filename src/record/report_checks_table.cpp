#include <ostream>

#include "loqsmith/record/html.hpp"
#include "loqsmith/record/report_parts.hpp"

namespace loqsmith {
namespace {

std::string range(const CheckRow& check) {
  if (check.low && check.high) {
    return html_number(*check.low) + " to " + html_number(*check.high);
  }
  if (check.low) return "at least " + html_number(*check.low);
  return check.high ? "at most " + html_number(*check.high) : std::string{};
}

const char* outcome(const CheckRow& check) {
  if (!check.passed) return "<td class=\"unchecked\">not checked</td>";
  return *check.passed ? "<td class=\"passed\">\xE2\x9C\x93 passed</td>"
                       : "<td class=\"failed\">\xE2\x9C\x97 failed</td>";
}

std::string consequence(const CheckRow& check) {
  std::string html = html_text(check.note);
  if (check.passed == false && !check.action.empty()) {
    html += (html.empty() ? "" : "; ") + html_text(check.action);
  }
  if (!check.affects.empty()) {
    html +=
        (html.empty() ? "affects " : "; affects ") + html_text(check.affects);
  }
  return html;
}

}  // namespace

void report_checks_table(std::ostream& out,
                         const std::vector<CheckRow>& checks) {
  out << "<div class=\"wide\" role=\"region\" tabindex=\"0\" "
         "aria-label=\"Checks\"><table>\n<thead><tr><th "
         "scope=\"col\">Check</th><th scope=\"col\">Inj.</th><th "
         "class=\"number\" scope=\"col\">Value</th><th "
         "scope=\"col\">Wanted</th><th "
         "scope=\"col\">Outcome</th><th scope=\"col\">Note</th></tr></thead>\n"
         "<tbody>\n";
  for (const CheckRow& check : checks) {
    out << "<tr><th scope=\"row\">" << html_text(check.check)
        << "</th><td class=\"number\">"
        << (check.injection ? std::to_string(*check.injection) : std::string{})
        << "</td><td class=\"number\">";
    if (check.value) {
      out << html_number(*check.value, 5) << ' ' << html_text(check.unit);
    }
    out << "</td><td class=\"number\">" << range(check) << "</td>"
        << outcome(check) << "<td>" << consequence(check) << "</td></tr>\n";
  }
  out << "</tbody></table></div>\n";
}

}  // namespace loqsmith
