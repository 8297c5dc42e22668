#include <ostream>

#include "loqsmith/base/csv.hpp"
#include "loqsmith/record/cells.hpp"
#include "loqsmith/record/tables.hpp"
#include "loqsmith/record/words.hpp"

namespace loqsmith {
namespace {

const std::vector<std::string> kHead = {
    "analyte",           "set",      "injection", "level",
    "concentration",     "response", "weight",    "back_calculated",
    "deviation_percent", "used",     "note"};

}  // namespace

void write_standards_table(std::ostream& out, const PublishedRun& run) {
  write_csv_row(out, kHead);
  for (const AnalyteJudgement& analyte : run.analytes) {
    for (const CalibrationSet& set : analyte.sets) {
      const bool fitted = set.calibration.has_value();
      for (const StandardPoint& point : standards_of(set)) {
        const bool used = fitted && point.used;
        write_csv_row(
            out, {text_cell(analyte.analyte), text_cell(set.set),
                  injection_cell(point.injection), text_cell(point.level),
                  number_cell(point.concentration), number_cell(point.response),
                  used ? number_cell(point.weight) : std::string{},
                  number_cell(point.back_calculated),
                  number_cell(point.deviation_percent), yes_no_cell(used),
                  text_cell(point.note)});
      }
    }
  }
}

}  // namespace loqsmith
