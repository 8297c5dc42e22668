#include <algorithm>
#include <ostream>

#include "loqsmith/base/csv.hpp"
#include "loqsmith/record/cells.hpp"
#include "loqsmith/record/tables.hpp"

namespace loqsmith {
namespace {

const std::vector<std::string> kHead = {"injection",
                                        "sample",
                                        "role",
                                        "analyte",
                                        "set",
                                        "found",
                                        "retention_time",
                                        "response",
                                        "signal_to_noise",
                                        "vial_concentration",
                                        "dilution",
                                        "result",
                                        "unit",
                                        "calibration_uncertainty",
                                        "detection_limit",
                                        "quantitation_limit",
                                        "detection_procedure",
                                        "quantitation_procedure",
                                        "status",
                                        "reported",
                                        "qualifier",
                                        "reasons",
                                        "automatic_result",
                                        "automatic_status"};

std::vector<std::string> cells_of(const ResultRow& row) {
  return {injection_cell(row.injection),
          text_cell(row.sample),
          role_name(row.role),
          text_cell(row.analyte),
          text_cell(row.set),
          yes_no_cell(row.found),
          number_cell(row.retention_minutes),
          number_cell(row.response),
          number_cell(row.signal_to_noise),
          number_cell(row.vial_concentration),
          number_cell(row.dilution),
          number_cell(row.result),
          text_cell(row.unit),
          number_cell(row.calibration_uncertainty),
          number_cell(row.detection_limit),
          number_cell(row.quantitation_limit),
          text_cell(row.detection_procedure),
          text_cell(row.quantitation_procedure),
          status_name(row.status),
          text_cell(row.reported),
          text_cell(row.qualifier),
          words_cell(row.reasons),
          row.automatic ? number_cell(row.automatic->result) : std::string{},
          row.automatic ? status_name(row.automatic->status) : std::string{}};
}

}  // namespace

void write_results_table(std::ostream& out, const PublishedRun& run) {
  // In run order, the analytes of one injection in the method's order: the
  // sort is stable and the rows come by analyte.
  std::vector<const ResultRow*> rows;
  for (const AnalyteJudgement& analyte : run.analytes) {
    for (const ResultRow& row : analyte.results) rows.push_back(&row);
  }
  std::stable_sort(rows.begin(), rows.end(),
                   [](const ResultRow* a, const ResultRow* b) {
                     return a->injection < b->injection;
                   });
  write_csv_row(out, kHead);
  for (const ResultRow* row : rows) write_csv_row(out, cells_of(*row));
}

}  // namespace loqsmith
