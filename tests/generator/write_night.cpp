#include "generator/write_night.hpp"

#include <fstream>
#include <stdexcept>
#include <string>

#include "generator/animl_writer.hpp"
#include "generator/mzml_writer.hpp"
#include "generator/nights.hpp"
#include "generator/write_sheets.hpp"

namespace loqsmith::test {
namespace {

void write(const std::filesystem::path& path, const std::string& text) {
  std::filesystem::create_directories(path.parent_path());
  std::ofstream out(path, std::ios::binary | std::ios::trunc);
  out << text << std::flush;
  if (!out) throw std::runtime_error("cannot write " + path.string());
}

void write_sheets(const std::filesystem::path& runs,
                  const SimulatedNight& night) {
  std::filesystem::remove_all(runs / night.name / "data");
  write(runs / night.name / "sequence.csv", sequence_sheet(night));
  write(runs / night.name / "levels.csv", levels_sheet(night));
  write(runs / "truth" / (night.name + ".csv"), truth_table(night));
}

}  // namespace

void write_well_water(const std::filesystem::path& runs) {
  const SimulatedNight night = well_water_night();
  write_sheets(runs, night);
  for (const Vial& vial : night.vials) {
    write(runs / night.name / vial.file, mzml_document(night, vial));
  }
}

void write_tablet_coating(const std::filesystem::path& runs) {
  const SimulatedNight night = tablet_coating_night();
  write_sheets(runs, night);
  for (const AnimlFile& file : tablet_coating_files(night)) {
    write(runs / night.name / file.path, animl_document(night, file));
  }
}

}  // namespace loqsmith::test
