#include "loqsmith/record/reportable.hpp"

#include <algorithm>
#include <cstdint>
#include <iterator>
#include <utility>

#include "loqsmith/record/limit_text.hpp"
#include "loqsmith/record/record_sections.hpp"

namespace loqsmith {

namespace {

bool is_surrogate(const Method& method, const std::string& analyte) {
  return std::any_of(method.analytes.begin(), method.analytes.end(),
                     [&](const AnalyteSettings& settings) {
                       return settings.target.id == analyte &&
                              settings.surrogate_concentration.has_value();
                     });
}

}  // namespace

std::vector<ReportableRow> reportable_of(const PublishedRun& run,
                                         const AnalyteJudgement& analyte) {
  if (is_surrogate(run.method, analyte.analyte)) return {};
  return reportable_results(analyte, run.sequence, run.method.units,
                            reporting_of(run.method, analyte.analyte));
}

std::vector<ReportableRow> reportable_of(const PublishedRun& run) {
  std::vector<ReportableRow> rows;
  for (const AnalyteJudgement& analyte : run.analytes) {
    std::vector<ReportableRow> own = reportable_of(run, analyte);
    std::move(own.begin(), own.end(), std::back_inserter(rows));
  }
  return rows;
}

std::vector<ReportableRow> repeated_only(std::vector<ReportableRow> rows) {
  std::erase_if(rows, [](const ReportableRow& row) {
    return row.injections.size() + row.rejected.size() < 2;
  });
  return rows;
}

bool has_repeats(const PublishedRun& run) {
  return !repeated_only(reportable_of(run)).empty();
}

std::vector<std::string> rejected_words(const ReportableRow& row) {
  std::vector<std::string> words;
  for (const RejectedRepeat& one : row.rejected) {
    words.push_back(std::to_string(one.injection) + ":" + one.why);
  }
  return words;
}

void record_reportable(JsonWriter& json, const PublishedRun& run) {
  json.begin_array("reportable");
  for (const ReportableRow& row : repeated_only(reportable_of(run))) {
    json.begin_object();
    json.member("sample", row.sample);
    json.member("analyte", row.analyte);
    json.begin_array("injections");
    for (const int injection : row.injections) {
      json.value(static_cast<std::int64_t>(injection));
    }
    json.end_array();
    json.member("result", row.result);
    json.member("unit", row.unit);
    json.member("status", status_name(row.status));
    json.member("reported", row.reported);
    json.member("qualifier", row.qualifier);
    member_words(json, "reasons", row.reasons);
    member_words(json, "rejected", rejected_words(row));
    json.end_object();
  }
  json.end_array();
}

}  // namespace loqsmith
