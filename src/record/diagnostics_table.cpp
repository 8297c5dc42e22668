
#include <ostream>

#include "loqsmith/base/csv.hpp"
#include "loqsmith/base/reading_figures.hpp"
#include "loqsmith/record/cells.hpp"
#include "loqsmith/record/tables.hpp"

namespace loqsmith {
namespace {

const std::vector<std::string> kHead = {
    "analyte",   "set", "test",   "statistic", "critical",      "degrees_1",
    "degrees_2", "p",   "passed", "meaning",   "concentration", "injection"};

// From statistic on; what was not done says why in `meaning` alone.
std::vector<std::string> cells_of(const Outcome<DiagnosticTest>& outcome) {
  std::vector<std::string> cells(9);
  if (!outcome) {
    cells[6] = text_cell("not applicable: " + outcome.reason());
    return cells;
  }
  const DiagnosticTest& test = *outcome;
  return {number_cell(test.statistic),
          number_cell(test.critical),
          number_cell(test.degrees_1),
          number_cell(test.degrees_2),
          number_cell(test.p),
          yes_no_cell(test.passed),
          text_cell(test.meaning),
          number_cell(test.concentration),
          test.injection ? injection_cell(*test.injection) : std::string{}};
}

class Rows {
 public:
  Rows(std::ostream& out, const std::string& analyte, const std::string& set)
      : out_(out), analyte_(text_cell(analyte)), set_(text_cell(set)) {}

  void add(const std::string& test, std::vector<std::string> rest) const {
    std::vector<std::string> cells = {analyte_, set_, test};
    cells.insert(cells.end(), rest.begin(), rest.end());
    write_csv_row(out_, cells);
  }

 private:
  std::ostream& out_;
  std::string analyte_;
  std::string set_;
};

// Statistic: the sum of relative errors with the weight in use; critical: the
// least of the candidates.
void add_weight_advice(const Rows& rows, const WeightAdvice& advice) {
  std::vector<std::string> cells(9);
  for (const WeightCandidate& one : advice.candidates) {
    if (!one.sum_relative_error_percent) continue;
    const std::string sum = number_cell(*one.sum_relative_error_percent);
    if (one.weight == advice.in_use) cells[0] = sum;
    if (one.weight == advice.least) cells[1] = sum;
  }
  cells[5] = yes_no_cell(!advice.advises_change);
  cells[6] = text_cell(advice.advice);
  rows.add("weight-advice", cells);
}

// Both fits side by side, in words; the one without is for comparison alone.
std::string comparison(const Calibration& with,
                       const SuggestedExclusion& suggested) {
  std::string text = suggested.why + "; with it slope " + figure(with.slope) +
                     ", residual deviation " + figure(with.residual_sd) +
                     "; without it ";
  if (!suggested.without) return text + suggested.without.reason();
  return text + "slope " + figure(suggested.without->slope) +
         ", residual deviation " + figure(suggested.without->residual_sd) +
         "; it stays in until the method or an amendment leaves it out";
}

void add_suggestions(const Rows& rows, const CalibrationSet& set) {
  for (const SuggestedExclusion& one : set.diagnostics->suggested_exclusions) {
    std::vector<std::string> cells(9);
    cells[6] = text_cell(comparison(*set.calibration, one));
    cells[7] = number_cell(one.concentration);
    cells[8] = injection_cell(one.injection);
    rows.add("suggested-exclusion", cells);
  }
}

}  // namespace

void write_diagnostics_table(std::ostream& out, const PublishedRun& run) {
  write_csv_row(out, kHead);
  for (const AnalyteJudgement& analyte : run.analytes) {
    for (const CalibrationSet& set : analyte.sets) {
      if (!set.calibration || !set.diagnostics) continue;
      const Rows rows(out, analyte.analyte, set.set);
      for (const NamedDiagnostic& test : set.diagnostics->tests) {
        rows.add(test.name, cells_of(test.outcome));
      }
      add_weight_advice(rows, set.diagnostics->weights);
      add_suggestions(rows, set);
    }
  }
}

}  // namespace loqsmith
