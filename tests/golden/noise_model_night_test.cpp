// Sample runs with the limit procedure noise-model added to their methods.

#include <gtest/gtest.h>

#include <fstream>

#include "golden/processed.hpp"
#include "golden/sheet.hpp"
#include "loqsmith/base/files.hpp"
#include "support/temp_folder.hpp"

namespace loqsmith::test {
namespace {

class NoiseModelNight : public testing::Test {
 protected:
  // Processes the night with the procedure beside blank-deviation, with the
  // same factors, and gives the run's folder.
  std::filesystem::path night(const std::string& name) {
    const auto folder = copy_of_sample_run(name, work_.path());
    std::string method = read_file(folder / "method.xml");
    const std::size_t at = method.find("<signal-to-noise ");
    EXPECT_NE(at, std::string::npos);
    if (at == std::string::npos) return {};
    method.insert(at, "<noise-model detection-factor=\"3.3\"/>");
    std::ofstream(folder / "method.xml", std::ios::binary) << method;
    const ProgramRun done = process(folder, out_.path());
    EXPECT_EQ(done.status, 0) << done.err;
    return out_ / name / "run-0001";
  }

  TempFolder work_;
  TempFolder out_;
};

// The simulated blanks hold nothing but noise, so what is predicted from their
// baselines must lie within the 95 % bounds of what they scatter.
TEST_F(NoiseModelNight, AgreesWithTheScatterOfBlanks) {
  std::map<std::string, SheetRow> scatter;
  int compared = 0;
  for (const SheetRow& row : read_sheet(night(kTabletCoating) / "limits.csv")) {
    const std::string& analyte = row.at("analyte");
    if (row.at("procedure") == "blank-deviation") scatter[analyte] = row;
    if (row.at("procedure") != "noise-model") continue;
    EXPECT_EQ(row.at("governing"), "none");
    EXPECT_EQ(row.at("grade"), "caution");
    EXPECT_EQ(row.at("n"), "8");
    ASSERT_EQ(scatter.count(analyte), 1U);
    const double predicted = number(row, "detection_limit");
    EXPECT_GT(predicted, number(scatter[analyte], "detection_lower"));
    EXPECT_LT(predicted, number(scatter[analyte], "detection_upper"));
    ++compared;
  }
  EXPECT_EQ(compared, 2);  // propan-2-ol has limits of its own
}

// These traces are 7 minutes long and the peaks some 0.09 wide.
TEST_F(NoiseModelNight, SaysWhereTracesAreTooShort) {
  const auto run = night(kWellWater);
  int refused = 0;
  for (const SheetRow& row : read_sheet(run / "limits.csv")) {
    if (row.at("procedure") != "noise-model") continue;
    EXPECT_EQ(row.at("grade"), "not-applicable");
    EXPECT_TRUE(holds(row.at("note"), "noise-trace-short: "));
    ++refused;
  }
  EXPECT_EQ(refused, 3);
  for (const SheetRow& row : read_sheet(run / "peaks.csv")) {
    EXPECT_EQ(row.at("response_noise"), "");
    if (row.at("area").empty()) continue;
    EXPECT_TRUE(holds(row.at("note"), "noise-trace-short"));
  }
}

}  // namespace
}  // namespace loqsmith::test
