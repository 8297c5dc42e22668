#include <algorithm>
#include <ostream>

#include "loqsmith/base/csv.hpp"
#include "loqsmith/record/cells.hpp"
#include "loqsmith/record/reportable.hpp"

namespace loqsmith {
namespace {

const std::vector<std::string> kHead = {
    "sample",     "analyte",         "group",
    "injections", "dilution",        "result",
    "unit",       "detection_limit", "quantitation_limit",
    "status",     "reported",        "qualifier",
    "reasons",    "rejected"};

std::vector<std::string> numbers_of(const std::vector<int>& injections) {
  std::vector<std::string> words;
  for (const int one : injections) words.push_back(std::to_string(one));
  return words;
}

std::vector<std::string> cells_of(const ReportableRow& row) {
  return {text_cell(row.sample),
          text_cell(row.analyte),
          words_cell(row.groups),
          words_cell(numbers_of(row.injections)),
          number_cell(row.dilution),
          number_cell(row.result),
          text_cell(row.unit),
          number_cell(row.detection_limit),
          number_cell(row.quantitation_limit),
          status_name(row.status),
          text_cell(row.reported),
          text_cell(row.qualifier),
          words_cell(row.reasons),
          words_cell(rejected_words(row))};
}

}  // namespace

void write_reportable_table(std::ostream& out, const PublishedRun& run) {
  std::vector<ReportableRow> rows = reportable_of(run);
  std::stable_sort(rows.begin(), rows.end(),
                   [](const ReportableRow& a, const ReportableRow& b) {
                     return a.first_injection < b.first_injection;
                   });
  write_csv_row(out, kHead);
  for (const ReportableRow& row : rows) write_csv_row(out, cells_of(row));
}

}  // namespace loqsmith
