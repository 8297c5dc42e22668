#include <ostream>

#include "loqsmith/base/csv.hpp"
#include "loqsmith/record/cells.hpp"
#include "loqsmith/record/tables.hpp"
#include "loqsmith/record/words.hpp"

namespace loqsmith {
namespace {

const std::vector<std::string> kHead = {"analyte",
                                        "set",
                                        "procedure",
                                        "critical_value",
                                        "detection_limit",
                                        "quantitation_limit",
                                        "unit",
                                        "detection_lower",
                                        "detection_upper",
                                        "quantitation_lower",
                                        "quantitation_upper",
                                        "degrees_of_freedom",
                                        "n",
                                        "governing",
                                        "grade",
                                        "note"};

// A procedure that does not apply has a row without numbers that says why.
std::vector<std::string> cells_of(const AnalyteJudgement& analyte,
                                  const CalibrationSet& set,
                                  const LimitRow& row) {
  const LimitEstimate none;
  const LimitEstimate& estimate = row.estimate ? *row.estimate : none;
  return {text_cell(analyte.analyte),
          text_cell(set.set),
          text_cell(row.procedure),
          number_cell(estimate.critical_value),
          number_cell(estimate.detection),
          number_cell(estimate.quantitation),
          text_cell(analyte.concentration_unit),
          number_cell(estimate.detection_lower),
          number_cell(estimate.detection_upper),
          number_cell(estimate.quantitation_lower),
          number_cell(estimate.quantitation_upper),
          number_cell(estimate.degrees_of_freedom),
          row.estimate ? count_cell(estimate.n) : std::string{},
          governing_word(row),
          grade_name(row.estimate ? estimate.grade() : Grade::NotApplicable),
          text_cell(limit_note(row))};
}

}  // namespace

void write_limits_table(std::ostream& out, const PublishedRun& run) {
  write_csv_row(out, kHead);
  for (const AnalyteJudgement& analyte : run.analytes) {
    for (const CalibrationSet& set : analyte.sets) {
      for (const LimitRow& row : set.limits.rows) {
        write_csv_row(out, cells_of(analyte, set, row));
      }
    }
  }
}

}  // namespace loqsmith
