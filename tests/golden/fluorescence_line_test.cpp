// A published calibration line, end to end: noise-free peaks of the published
// responses as files, the program as a user runs it, and its own limits.csv.
//
// Seven fluorescein standards: Miller and Miller, Statistics and Chemometrics
// for Analytical Chemistry, regression chapter (data and printed values from
// memory: slope 1.93, intercept 1.52, s_y/x 0.4329, limit of detection 0.67).

#include <array>
#include <cmath>
#include <fstream>

#include "golden/processed.hpp"
#include "golden/sheet.hpp"
#include "support/mzml_builder.hpp"
#include "support/temp_folder.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

constexpr std::array<double, 7> kConcentration{0, 2, 4, 6, 8, 10, 12};
constexpr std::array<double, 7> kResponse{2.1,  5.0,  9.0, 12.6,
                                          17.3, 21.0, 24.7};

constexpr char kMethod[] = R"(<?xml version="1.0" encoding="UTF-8"?>
<method xmlns="urn:loqsmith:method" id="fluorescein" revision="1">
  <units concentration="pg/mL" result="pg/mL"/>
  <traces><trace id="emission" kind="emission"/></traces>
  <analytes>
    <analyte id="fluorescein" trace="emission" retention-time="3"/>
  </analytes>
  <limits>
    <calibration-residual detection-factor="3" quantitation-factor="10"/>
  </limits>
</method>
)";

// A Gaussian of that area, sigma 0.05 min, without noise.
std::string peak_document(double area) {
  constexpr double kSigma = 0.05;
  const double height = area / (kSigma * std::sqrt(2.0 * std::acos(-1.0)));
  MzmlTrace trace;
  trace.id = "emission";
  trace.type = "MS:1000813";
  trace.times.clear();
  trace.signal.clear();
  for (int i = 0; i <= 1200; ++i) {
    const double minutes = 0.005 * i;
    const double z = (minutes - 3.0) / kSigma;
    trace.times.push_back(minutes);
    trace.signal.push_back(height * std::exp(-0.5 * z * z));
  }
  return mzml_document(std::vector<MzmlTrace>{trace});
}

void write(const std::filesystem::path& path, const std::string& text) {
  std::ofstream(path, std::ios::binary) << text;
}

void write_sequence(const std::filesystem::path& folder) {
  std::string sequence = "injection,file,sample,role,level\n";
  std::string levels = "level,analyte,concentration\n";
  for (std::size_t i = 0; i < kConcentration.size(); ++i) {
    const std::string name = "L" + std::to_string(i);
    sequence += std::to_string(i + 1) + "," + name + ".mzML," + name +
                ",standard," + name + "\n";
    levels += name + ",fluorescein," +
              std::to_string(static_cast<int>(kConcentration[i])) + "\n";
    write(folder / (name + ".mzML"), peak_document(kResponse[i]));
  }
  write(folder / "sequence.csv", sequence);
  write(folder / "levels.csv", levels);
  write(folder / "method.xml", kMethod);
}

TEST(FluorescenceLine, ComesOutOfTheFilesAsPublished) {
  const TempFolder place;
  const auto folder = place / "fluorescein";
  std::filesystem::create_directory(folder);
  write_sequence(folder);
  const ProgramRun run = process(folder, place / "out");
  ASSERT_EQ(run.status, 0) << run.out << run.err;
  const auto published = place / "out" / "fluorescein" / "run-0001";

  // The window leaves the same share of every peak outside, so response and
  // slope carry one common factor, which the limits are free of.
  const SheetRow line = read_sheet(published / "calibration.csv").at(0);
  const double slope = number(line, "slope");
  EXPECT_TRUE(agrees_to_digits(slope, 1.93, 3));
  EXPECT_TRUE(agrees_to_digits(number(line, "intercept") / slope,
                               1.517857143 / 1.930357143, 9));
  EXPECT_TRUE(agrees_to_digits(number(line, "residual_sd") / slope,
                               0.4328477132 / 1.930357143, 9));
  const SheetRow limit = read_sheet(published / "limits.csv").at(0);
  EXPECT_EQ(limit.at("procedure"), "calibration-residual");
  // 3 and 10 s_y/x / b, computed with an independent library from the data.
  EXPECT_TRUE(
      agrees_to_digits(number(limit, "detection_limit"), 0.6726957986, 9));
  EXPECT_TRUE(
      agrees_to_digits(number(limit, "quantitation_limit"), 2.2423193285, 9));
}

}  // namespace
}  // namespace loqsmith::test
