#include <ostream>

#include "loqsmith/base/csv.hpp"
#include "loqsmith/record/cells.hpp"
#include "loqsmith/record/tables.hpp"
#include "loqsmith/record/words.hpp"

namespace loqsmith {
namespace {

const std::vector<std::string> kHead = {
    "analyte", "set",       "model",       "weight",  "intercept",
    "slope",   "curvature", "residual_sd", "r2",      "relative_standard_error",
    "levels",  "points",    "lowest",      "highest", "accepted",
    "note"};

// The fitted numbers, from intercept to highest.
std::vector<std::string> fitted_cells(const Outcome<Calibration>& fitted) {
  if (!fitted) return std::vector<std::string>(10);
  const Calibration& line = *fitted;
  const bool quadratic =
      line.settings.model == CalibrationSettings::Model::Quadratic;
  return {number_cell(line.intercept),
          number_cell(line.slope),
          quadratic ? number_cell(line.curvature) : std::string{},
          number_cell(line.residual_sd),
          number_cell(line.r2),
          number_cell(line.relative_standard_error),
          count_cell(line.used_levels()),
          count_cell(line.used_points()),
          number_cell(line.lowest),
          number_cell(line.highest)};
}

}  // namespace

void write_calibration_table(std::ostream& out, const PublishedRun& run) {
  write_csv_row(out, kHead);
  for (const AnalyteJudgement& analyte : run.analytes) {
    for (const CalibrationSet& set : analyte.sets) {
      const CalibrationSettings settings =
          calibration_settings(run.method, analyte.analyte, set);
      std::vector<std::string> cells = {
          text_cell(analyte.analyte), text_cell(set.set),
          model_word(settings.model), weight_word(settings.weight)};
      for (std::string& cell : fitted_cells(set.calibration)) {
        cells.push_back(std::move(cell));
      }
      cells.push_back(yes_no_cell(calibration_accepted(analyte, set)));
      cells.push_back(text_cell(calibration_note(set.calibration)));
      write_csv_row(out, cells);
    }
  }
}

}  // namespace loqsmith
