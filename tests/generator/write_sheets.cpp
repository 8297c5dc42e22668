#include "generator/write_sheets.hpp"

#include <cstddef>
#include <stdexcept>
#include <vector>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"

namespace loqsmith::test {
namespace {

// What is left out of the sheet when it says nothing: most vials are neither
// diluted nor weighed.
std::string unless_one(double factor) {
  return factor == 1.0 ? "" : shortest(factor);
}

std::string cell(const SimulatedNight& night, const Vial& vial,
                 const std::string& column) {
  if (column == "injection") return std::to_string(vial.number);
  if (column == "file") return vial.file;
  if (column == "run") return vial.run;
  if (column == "sample") return vial.sample;
  if (column == "role") return vial.role;
  if (column == "level") return vial.level;
  if (column == "dilution") return unless_one(vial.dilution);
  if (column == "internal_standard_dilution") {
    return unless_one(vial.internal_standard_dilution);
  }
  if (column == "sample_amount") return shortest(vial.sample_amount);
  if (column == "final_volume") return shortest(vial.final_volume);
  if (column == "prep") return vial.prep;
  if (column == "acquired") return start_time(night, vial);
  throw std::logic_error("no such column: " + column);
}

double true_result(const SimulatedNight& night, const Vial& vial,
                   double in_vial) {
  if (!vial.sample_amount) return in_vial * vial.dilution;
  return in_vial * vial.dilution * *vial.final_volume / *vial.sample_amount *
         night.result_factor;
}

}  // namespace

std::string sequence_sheet(const SimulatedNight& night) {
  std::string sheet = join(night.columns, ",") + "\n";
  for (const Vial& vial : night.vials) {
    std::vector<std::string> cells;
    for (const std::string& column : night.columns) {
      cells.push_back(cell(night, vial, column));
    }
    sheet += join(cells, ",") + "\n";
  }
  return sheet;
}

std::string levels_sheet(const SimulatedNight& night) {
  std::string sheet = "level,analyte,concentration,lot,expires\n";
  for (const NamedLevel& level : night.levels) {
    for (std::size_t a = 0; a < night.analytes.size(); ++a) {
      sheet +=
          join({level.name, night.analytes[a].id,
                shortest(level.concentrations[a]), level.lot, level.expires},
               ",") +
          "\n";
    }
  }
  return sheet;
}

std::string truth_table(const SimulatedNight& night) {
  std::string table = "injection,analyte,vial_concentration,result\n";
  for (const Vial& vial : night.vials) {
    if (vial.role == "conditioning") continue;
    for (std::size_t a = 0; a < night.analytes.size(); ++a) {
      const double in_vial = vial.concentrations[a];
      table +=
          join({std::to_string(vial.number), night.analytes[a].id,
                shortest(in_vial), shortest(true_result(night, vial, in_vial))},
               ",") +
          "\n";
    }
  }
  return table;
}

}  // namespace loqsmith::test
