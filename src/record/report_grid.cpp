#include <algorithm>
#include <array>
#include <map>
#include <ostream>
#include <string_view>

#include "loqsmith/record/html.hpp"
#include "loqsmith/record/limit_text.hpp"
#include "loqsmith/record/report_parts.hpp"

namespace loqsmith {
namespace {

constexpr std::array kStatuses = {Status::Reportable, Status::Estimated,
                                  Status::NotDetected, Status::AboveRange,
                                  Status::Withheld};

using ResultIndex = std::map<std::pair<int, std::string>, const ResultRow*>;

ResultIndex index_of(const PublishedRun& run) {
  ResultIndex index;
  for (const AnalyteJudgement& analyte : run.analytes) {
    for (const ResultRow& row : analyte.results) {
      index.emplace(std::pair(row.injection, analyte.analyte), &row);
    }
  }
  return index;
}

// The legend counts the samples' results, so it is a summary as well.
void legend(std::ostream& out, const ResultIndex& index) {
  out << "<ul class=\"legend\">\n";
  for (const Status status : kStatuses) {
    const auto count = std::count_if(
        index.begin(), index.end(), [&](const ResultIndex::value_type& entry) {
          return is_sample_like(entry.second->role) &&
                 entry.second->status == status;
        });
    out << "<li class=\"" << status_name(status) << "\">" << status_mark(status)
        << "<b>" << std::to_string(count) << "</b> " << status_words(status)
        << "</li>\n";
  }
  out << "</ul>\n";
}

void head_limits(std::ostream& out, const PublishedRun& run,
                 const AnalyteJudgement& analyte) {
  const ReportingSettings reporting = reporting_of(run.method, analyte.analyte);
  for (const CalibrationSet& set : analyte.sets) {
    // Those of a single sample stand with its line, below.
    if (set.over_additions) continue;
    out << "<span class=\"under\">";
    if (analyte.sets.size() > 1) out << "set " << html_text(set.set) << ": ";
    if (set.limits.governing) {
      out << "detection "
          << html_limit(set.limits.governing->detection, reporting)
          << "</span><span class=\"under\">quantitation "
          << html_limit(set.limits.governing->quantitation, reporting);
    } else {
      out << "no limits";
    }
    out << "</span>";
  }
}

void grid_head(std::ostream& out, const PublishedRun& run,
               const std::string& third) {
  out << "<thead><tr><th scope=\"col\">Inj.</th><th scope=\"col\" "
         "class=\"sample\">Sample</th><th scope=\"col\">"
      << third << "</th>";
  for (const AnalyteJudgement& analyte : run.analytes) {
    out << "<th scope=\"col\" class=\"analyte\"><a href=\"#"
        << analyte_id(analyte.analyte) << "\">" << html_name(analyte.analyte)
        << "</a>";
    head_limits(out, run, analyte);
    out << "</th>";
  }
  out << "</tr></thead>\n";
}

// The most serious reason that the mark does not say already.
std::string news(const ResultRow& row) {
  constexpr std::array<std::string_view, 4> kSaidByMark = {
      "above-range", "below-detection-limit", "below-critical-value",
      "below-quantitation-limit"};
  for (const std::string& reason : row.reasons) {
    const bool said = row.status != Status::Withheld &&
                      std::find(kSaidByMark.begin(), kSaidByMark.end(),
                                reason) != kSaidByMark.end();
    if (!said) return reason;
  }
  return {};
}

void cell(std::ostream& out, const ResultRow& row) {
  out << "<td id=\"" << result_id(row.injection, row.analyte) << "\" class=\""
      << status_name(row.status) << "\">" << status_mark(row.status)
      << "<span class=\"value\">" << html_text(row.reported) << "</span>";
  if (!row.qualifier.empty()) {
    out << "<span class=\"letter\">" << html_text(row.qualifier) << "</span>";
  }
  out << "<span class=\"unseen\">" << status_words(row.status) << "</span>";
  if (const std::string word = news(row); !word.empty()) {
    out << "<span class=\"why\">" << html_text(word) << "</span>";
  }
  out << "</td>";
}

std::string third_cell(const Injection& injection, bool samples) {
  if (!samples) {
    const std::string level =
        injection.level.empty() ? "" : ", " + html_name(injection.level);
    return role_name(injection.role) + level;
  }
  return injection.dilution == 1.0
             ? std::string{}
             : "\xC3\x97" + html_number(injection.dilution);
}

bool has_results(const PublishedRun& run, const ResultIndex& index,
                 int injection) {
  return std::any_of(run.analytes.begin(), run.analytes.end(),
                     [&](const AnalyteJudgement& analyte) {
                       return index.contains({injection, analyte.analyte});
                     });
}

void grid(std::ostream& out, const PublishedRun& run, const ResultIndex& index,
          bool samples) {
  out << "<div class=\"wide\" role=\"region\" tabindex=\"0\" aria-label=\""
      << (samples ? "Results of samples" : "Blanks, standards and controls")
      << "\"><table class=\"grid\">\n";
  grid_head(out, run, samples ? "Dilution" : "Role");
  out << "<tbody>\n";
  for (const Injection& injection : run.sequence.injections) {
    if (is_sample_like(injection.role) != samples) continue;
    if (!has_results(run, index, injection.number)) continue;
    out << "<tr><td class=\"number\">" << std::to_string(injection.number)
        << "</td><th scope=\"row\" class=\"sample\">"
        << html_name(injection.sample) << "</th><td class=\"third\">"
        << third_cell(injection, samples) << "</td>";
    for (const AnalyteJudgement& analyte : run.analytes) {
      const auto row = index.find({injection.number, analyte.analyte});
      if (row == index.end()) {
        out << "<td class=\"none\">\xE2\x80\x93</td>";
      } else {
        cell(out, *row->second);
      }
    }
    out << "</tr>\n";
  }
  out << "</tbody></table></div>\n";
}

bool any_result(const PublishedRun& run, const ResultIndex& index,
                bool samples) {
  return std::any_of(run.sequence.injections.begin(),
                     run.sequence.injections.end(),
                     [&](const Injection& injection) {
                       return is_sample_like(injection.role) == samples &&
                              has_results(run, index, injection.number);
                     });
}

}  // namespace

void report_grid(std::ostream& out, const PublishedRun& run) {
  const ResultIndex index = index_of(run);
  out << "<section id=\"results\">\n<h2>Results</h2>\n<p>Reported texts in "
      << html_name(run.method.units.result)
      << ". Limits under the analytes are those that govern, in the undiluted "
         "vial, in "
      << html_name(run.method.units.concentration) << ".</p>\n";
  legend(out, index);
  if (any_result(run, index, true)) {
    grid(out, run, index, true);
  } else {
    out << "<p class=\"calm\">The sequence holds no sample.</p>\n";
  }
  if (any_result(run, index, false)) {
    out << "<h3>Blanks, standards and controls</h3>\n";
    grid(out, run, index, false);
  }
  out << "</section>\n";
}

}  // namespace loqsmith
