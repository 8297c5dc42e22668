#include <map>
#include <ostream>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/record/html.hpp"
#include "loqsmith/record/report_parts.hpp"
#include "loqsmith/record/reportable.hpp"

namespace loqsmith {
namespace {

// Collects items first: an empty list is said in words.
class Items {
 public:
  void add(const std::string& target, const std::string& title,
           const std::string& html) {
    html_ +=
        "<li><a href=\"#" + target + "\">" + title + "</a> " + html + "</li>\n";
  }
  bool empty() const { return html_.empty(); }
  const std::string& html() const { return html_; }

 private:
  std::string html_;
};

void add_problems(Items& items, const PublishedRun& run) {
  for (const auto& [injection, problem] : run.problems) {
    items.add("problems", "Injection " + std::to_string(injection),
              html_text(describe(problem)));
  }
}

void add_bases(Items& items, const AnalyteJudgement& analyte) {
  const std::string target = analyte_id(analyte.analyte);
  for (const CalibrationSet& set : analyte.sets) {
    const std::string which =
        set.alone ? std::string{} : ", set " + html_text(set.set);
    if (!set.calibration) {
      items.add(target, html_name(analyte.analyte) + which,
                "no calibration: " + html_text(set.calibration.reason()));
    } else if (!set.limits.governing) {
      items.add(target, html_name(analyte.analyte) + which,
                "no limits: " + html_text(set.limits.governing.reason()));
    }
  }
}

std::string check_words(const CheckRow& check) {
  std::string html;
  if (check.injection) {
    html += ", injection " + std::to_string(*check.injection);
  }
  if (check.value) {
    html += ": " + html_number(*check.value) + ' ' + html_text(check.unit);
  }
  if (check.low && check.high) {
    html += " (" + html_number(*check.low) + " to " + html_number(*check.high) +
            ')';
  } else if (check.low) {
    html += " (at least " + html_number(*check.low) + ')';
  } else if (check.high) {
    html += " (at most " + html_number(*check.high) + ')';
  }
  if (!check.affects.empty()) html += ", affects " + html_text(check.affects);
  if (!check.note.empty()) html += "; " + html_text(check.note);
  return html;
}

void add_checks(Items& items, const std::vector<CheckRow>& checks,
                const std::string& target) {
  for (const CheckRow& check : checks) {
    if (check.passed != false) continue;
    const std::string where =
        check.analyte.empty() ? std::string{} : html_name(check.analyte) + ' ';
    items.add(target, where + html_text(check.check),
              "failed" + check_words(check));
  }
}

// One item for each first reason, with links to the first few results.
void add_withheld(Items& items, const AnalyteJudgement& analyte) {
  constexpr std::size_t kMostLinks = 12;
  std::map<std::string, std::vector<int>> by_reason;
  for (const ResultRow& row : analyte.results) {
    if (row.status != Status::Withheld) continue;
    by_reason[row.reasons.empty() ? "no reason given" : row.reasons.front()]
        .push_back(row.injection);
  }
  for (const auto& [reason, injections] : by_reason) {
    const std::size_t n = injections.size();
    std::string html = std::to_string(n) +
                       (n == 1 ? " result withheld" : " results withheld") +
                       " (" + html_text(reason) + "): injection";
    html += n == 1 ? "" : "s";
    for (std::size_t i = 0; i < n && i < kMostLinks; ++i) {
      html += " <a href=\"#" + result_id(injections[i], analyte.analyte) +
              "\">" + std::to_string(injections[i]) + "</a>";
    }
    if (n > kMostLinks) {
      html += " and " + std::to_string(n - kMostLinks) + " more";
    }
    items.add(analyte_id(analyte.analyte), html_name(analyte.analyte), html);
  }
}

// Samples whose injections contradict each other although each may stand.
void add_disagreements(Items& items, const PublishedRun& run,
                       const AnalyteJudgement& analyte) {
  for (const ReportableRow& row : reportable_of(run, analyte)) {
    if (row.status != Status::Withheld || !row.injections.empty()) continue;
    items.add("repeats", html_name(analyte.analyte),
              "injections of sample " + html_name(row.sample) +
                  " contradict each other: nothing is reported");
  }
}

}  // namespace

void report_attention(std::ostream& out, const PublishedRun& run) {
  Items items;
  add_problems(items, run);
  add_checks(items, run.sequence_checks, "files");
  for (const AnalyteJudgement& analyte : run.analytes) {
    add_bases(items, analyte);
    add_checks(items, analyte.checks, analyte_id(analyte.analyte));
    add_withheld(items, analyte);
    add_disagreements(items, run, analyte);
  }
  out << "<section id=\"attention\">\n<h2>What needs a person</h2>\n";
  if (items.empty()) {
    out << "<p class=\"calm\">Nothing: no result was withheld and no check "
           "failed.</p>\n";
  } else {
    out << "<ul class=\"attention\">\n" << items.html() << "</ul>\n";
  }
  out << "</section>\n";
}

}  // namespace loqsmith
