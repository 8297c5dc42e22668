#include <ostream>

#include "loqsmith/base/csv.hpp"
#include "loqsmith/record/cells.hpp"
#include "loqsmith/record/summaries.hpp"

namespace loqsmith {
namespace {

const std::vector<std::string> kHead = {"group",
                                        "analyte",
                                        "unit",
                                        "n",
                                        "measured",
                                        "below_limit",
                                        "above_range",
                                        "withheld",
                                        "detected_percent",
                                        "method",
                                        "advised",
                                        "mean",
                                        "upper_mean",
                                        "standard_deviation",
                                        "p10",
                                        "p25",
                                        "median",
                                        "p75",
                                        "p90",
                                        "p95",
                                        "note"};

std::string detected_percent(const CensoredCounts& counts) {
  if (counts.all() == 0) return {};
  return number_cell(100.0 *
                     static_cast<double>(counts.measured + counts.above) /
                     static_cast<double>(counts.all()));
}

std::vector<std::string> counts_of(const SummaryRow& row) {
  const CensoredCounts& counts = row.summary.counts;
  return {text_cell(row.group),        text_cell(row.analyte),
          text_cell(row.unit),         count_cell(counts.all()),
          count_cell(counts.measured), count_cell(counts.below),
          count_cell(counts.above),    count_cell(row.withheld),
          detected_percent(counts)};
}

void add_numbers(std::vector<std::string>& cells,
                 const CensoredEstimate& estimate) {
  cells.push_back(number_cell(estimate.mean));
  cells.push_back(number_cell(estimate.upper_mean));
  cells.push_back(number_cell(estimate.standard_deviation));
  for (const std::optional<double>& one : estimate.percentiles) {
    cells.push_back(number_cell(one));
  }
}

void method_row(std::ostream& out, const SummaryRow& row,
                const MethodSummary& method) {
  std::vector<std::string> cells = counts_of(row);
  const bool advised = row.summary.advised == method.method;
  cells.push_back(summary_method_name(method.method));
  cells.push_back(yes_no_cell(advised));
  add_numbers(cells, method.estimate ? *method.estimate : CensoredEstimate{});
  std::vector<std::string> notes;
  if (method.estimate) {
    notes = method.estimate->notes;
  } else {
    notes.push_back(method.estimate.reason());
  }
  if (advised) notes.push_back(row.summary.advice);
  cells.push_back(words_cell(notes));
  write_csv_row(out, cells);
}

void count_row(std::ostream& out, const SummaryRow& row) {
  std::vector<std::string> cells = counts_of(row);
  cells.push_back("");
  cells.push_back(yes_no_cell(false));
  add_numbers(cells, {});
  cells.push_back(text_cell("only the count: " + row.summary.advice));
  write_csv_row(out, cells);
}

}  // namespace

void write_summary_table(std::ostream& out, const PublishedRun& run) {
  write_csv_row(out, kHead);
  for (const SummaryRow& row : summaries_of(run)) {
    for (const MethodSummary& method : row.summary.methods) {
      method_row(out, row, method);
    }
    if (row.summary.methods.empty()) count_row(out, row);
  }
}

}  // namespace loqsmith
