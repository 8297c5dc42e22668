// reportable.csv of the sample run with diluted samples holds one row a sample
// and analyte, as results.csv bears out; and the same night where repeats must
// be closer than they are.

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <fstream>
#include <set>

#include "golden/processed.hpp"
#include "golden/sheet.hpp"
#include "loqsmith/base/files.hpp"
#include "support/temp_folder.hpp"

namespace loqsmith::test {
namespace {

namespace fs = std::filesystem;

using SampleKey = std::pair<std::string, std::string>;

SampleKey key_of(const SheetRow& row) {
  return {row.at("sample"), row.at("analyte")};
}

std::map<SampleKey, std::vector<SheetRow>> injections_of_samples(
    const fs::path& run) {
  std::map<SampleKey, std::vector<SheetRow>> samples;
  for (const SheetRow& row : read_sheet(run / "results.csv")) {
    if (row.at("role") == "sample") samples[key_of(row)].push_back(row);
  }
  return samples;
}

// Of this night's dilutions at most one is in range with the least dilution.
std::vector<SheetRow> in_range(const std::vector<SheetRow>& injections) {
  std::vector<SheetRow> found;
  for (const SheetRow& row : injections) {
    if (row.at("status") == "reportable") found.push_back(row);
  }
  std::sort(found.begin(), found.end(),
            [](const SheetRow& a, const SheetRow& b) {
              return number(a, "dilution") < number(b, "dilution");
            });
  return found;
}

class ReportableNight : public testing::Test {
 protected:
  fs::path run_with(const std::string& acceptance, int status) {
    const fs::path folder = copy_of_sample_run(kWellWater, work_.path());
    std::string method = read_file(folder / "method.xml");
    method.insert(method.find("</acceptance>"), acceptance);
    std::ofstream(folder / "method.xml", std::ios::binary) << method;
    const ProgramRun done = process(folder, out_.path());
    EXPECT_EQ(done.status, status) << done.err;
    return out_ / kWellWater / "run-0001";
  }

  TempFolder work_;
  TempFolder out_;
};

TEST_F(ReportableNight, OneRowASampleAndAnalyte) {
  const fs::path run = run_with("<closeness/>", 0);
  auto samples = injections_of_samples(run);
  std::size_t repeated = 0;
  std::size_t diluted = 0;
  for (const SheetRow& row : read_sheet(run / "reportable.csv")) {
    const auto found = samples.find(key_of(row));
    ASSERT_NE(found, samples.end()) << row.at("sample");
    const std::vector<SheetRow> injections = found->second;
    samples.erase(found);
    if (injections.size() > 1) ++repeated;
    const std::vector<SheetRow> usable = in_range(injections);
    const SheetRow& counts = usable.empty() ? injections[0] : usable[0];
    for (const char* column : {"dilution", "result", "unit", "status",
                               "reported", "qualifier", "reasons"}) {
      EXPECT_EQ(row.at(column), counts.at(column)) << row.at("sample");
    }
    EXPECT_EQ(row.at("injections"), counts.at("injection"));
    if (number(row, "dilution") > 1.0) {
      ++diluted;
      EXPECT_TRUE(holds(row.at("rejected"), ":above-range"));
    }
  }
  EXPECT_TRUE(samples.empty());
  EXPECT_GE(repeated, 10U);
  EXPECT_GE(diluted, 4U);
}

TEST_F(ReportableNight, RepeatsThatDifferAreWithheldForThatAnalyteOnly) {
  const fs::path run = run_with("<closeness replicates=\"0.001\"/>", 1);
  std::set<std::string> failed;
  for (const SheetRow& row : read_sheet(run / "checks.csv")) {
    if (row.at("check") != "closeness" || row.at("passed") != "no") continue;
    EXPECT_GT(number(row, "value"), 0.001);
    failed.insert(row.at("affects") + "/" + row.at("analyte"));
  }
  EXPECT_GE(failed.size(), 3U);
  std::size_t withheld = 0;
  for (const SheetRow& row : read_sheet(run / "reportable.csv")) {
    const bool far =
        failed.contains("sample " + row.at("sample") + "/" + row.at("analyte"));
    EXPECT_EQ(row.at("status") == "withheld", far) << row.at("sample");
    if (!far) continue;
    ++withheld;
    EXPECT_EQ(row.at("result"), "");
    EXPECT_EQ(row.at("reasons"), "dilutions-disagree");
  }
  EXPECT_EQ(withheld, failed.size());
  for (const auto& [key, injections] : injections_of_samples(run)) {
    const bool far = failed.contains("sample " + key.first + "/" + key.second);
    for (const SheetRow& row : injections) {
      EXPECT_EQ(holds(row.at("reasons"), "dilutions-disagree"), far);
      EXPECT_EQ(row.at("status") == "withheld", far);
    }
  }
}

}  // namespace
}  // namespace loqsmith::test
