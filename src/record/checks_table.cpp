#include <ostream>

#include "loqsmith/base/csv.hpp"
#include "loqsmith/record/cells.hpp"
#include "loqsmith/record/tables.hpp"

namespace loqsmith {
namespace {

const std::vector<std::string> kHead = {
    "check", "analyte", "injection", "value",   "low", "high",
    "unit",  "passed",  "action",    "affects", "note"};

void write_check(std::ostream& out, const CheckRow& check) {
  write_csv_row(
      out, {text_cell(check.check), text_cell(check.analyte),
            check.injection ? injection_cell(*check.injection) : std::string{},
            number_cell(check.value), number_cell(check.low),
            number_cell(check.high), text_cell(check.unit),
            check.passed ? yes_no_cell(*check.passed) : std::string{},
            text_cell(check.action), text_cell(check.affects),
            text_cell(check.note)});
}

}  // namespace

void write_checks_table(std::ostream& out, const PublishedRun& run) {
  write_csv_row(out, kHead);
  for (const CheckRow& check : run.sequence_checks) write_check(out, check);
  for (const AnalyteJudgement& analyte : run.analytes) {
    for (const CheckRow& check : analyte.checks) write_check(out, check);
  }
}

}  // namespace loqsmith
