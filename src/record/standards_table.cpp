#include <limits>
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

void write_point(std::ostream& out, const std::string& analyte,
                 const CalibrationSet& set, const StandardPoint& point) {
  const bool used = set.calibration.has_value() && point.used;
  write_csv_row(
      out,
      {text_cell(analyte), text_cell(set.set), injection_cell(point.injection),
       text_cell(point.level), number_cell(point.concentration),
       number_cell(point.response),
       used ? number_cell(point.weight) : std::string{},
       number_cell(point.back_calculated), number_cell(point.deviation_percent),
       yes_no_cell(used), text_cell(point.note)});
}

void write_unmeasured(std::ostream& out, const std::string& analyte,
                      const CalibrationSet& set,
                      const UnmeasuredStandard& standard) {
  write_csv_row(out,
                {text_cell(analyte), text_cell(set.set),
                 injection_cell(standard.injection), text_cell(standard.level),
                 number_cell(standard.concentration), "", "", "", "",
                 yes_no_cell(false), text_cell(standard.note)});
}

// Both kinds of standards in run order.
void write_set(std::ostream& out, const std::string& analyte,
               const CalibrationSet& set) {
  auto lost = set.unmeasured.begin();
  const auto write_lost_before = [&](int injection) {
    for (; lost != set.unmeasured.end() && lost->injection < injection;
         ++lost) {
      write_unmeasured(out, analyte, set, *lost);
    }
  };
  for (const StandardPoint& point : standards_of(set)) {
    write_lost_before(point.injection);
    write_point(out, analyte, set, point);
  }
  write_lost_before(std::numeric_limits<int>::max());
}

}  // namespace

void write_standards_table(std::ostream& out, const PublishedRun& run) {
  write_csv_row(out, kHead);
  for (const AnalyteJudgement& analyte : run.analytes) {
    for (const CalibrationSet& set : analyte.sets) {
      write_set(out, analyte.analyte, set);
    }
  }
}

}  // namespace loqsmith
