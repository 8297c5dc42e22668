// A sample run whose samples form a group: summary.csv says of it what
// results.csv bears out. And the same night with a reporting limit and the
// method's own uncertainty.

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <fstream>
#include <set>
#include <sstream>

#include "golden/processed.hpp"
#include "golden/sheet.hpp"
#include "loqsmith/base/files.hpp"
#include "loqsmith/base/numbers.hpp"
#include "support/temp_folder.hpp"

namespace loqsmith::test {
namespace {

namespace fs = std::filesystem;

void put(const fs::path& path, const std::string& text) {
  std::ofstream(path, std::ios::binary) << text;
}

/// Adds the column `group`: every sample is of "wells".
void group_samples(const fs::path& folder) {
  std::istringstream lines(read_file(folder / "sequence.csv"));
  std::string grouped;
  std::string line;
  for (std::size_t i = 0; std::getline(lines, line); ++i) {
    const bool sample = holds(line, ",sample,");
    grouped += line + (i == 0 ? ",group" : sample ? ",wells" : ",") + '\n';
  }
  put(folder / "sequence.csv", grouped);
}

/// The run of a changed sample night.
class SummaryNight : public testing::Test {
 protected:
  fs::path run_with(const std::string& reporting = {}) {
    const fs::path folder = copy_of_sample_run(kWellWater, work_.path());
    group_samples(folder);
    if (!reporting.empty()) {
      std::string method = read_file(folder / "method.xml");
      const std::string start = "<reporting ";
      const std::size_t at = method.find(start);
      method.replace(at, start.size(), start + reporting + ' ');
      put(folder / "method.xml", method);
    }
    const ProgramRun done = process(folder, out_.path());
    EXPECT_EQ(done.status, 0) << done.err;
    return out_ / kWellWater / "run-0001";
  }

  TempFolder work_;
  TempFolder out_;
};

struct Counts {
  std::size_t measured = 0;
  std::size_t below = 0;
  std::size_t above = 0;
  double least = 1e300;  ///< measured
  double most = 0.0;
};

// Counted from results.csv alone.
Counts counted(const std::vector<SheetRow>& results,
               const std::string& analyte) {
  std::map<std::string, std::set<std::string>> statuses;
  Counts counts;
  for (const SheetRow& row : results) {
    if (row.at("role") != "sample" || row.at("analyte") != analyte) continue;
    statuses[row.at("sample")].insert(row.at("status"));
    if (row.at("status") != "reportable" && row.at("status") != "estimated") {
      continue;
    }
    counts.least = std::min(counts.least, number(row, "result"));
    counts.most = std::max(counts.most, number(row, "result"));
  }
  for (const auto& [sample, found] : statuses) {
    if (found.contains("reportable") || found.contains("estimated")) {
      ++counts.measured;
    } else if (found.contains("above-range")) {
      ++counts.above;
    } else if (found.contains("not-detected")) {
      ++counts.below;
    }
  }
  return counts;
}

TEST_F(SummaryNight, TheTableAgreesWithTheResults) {
  const fs::path run = run_with();
  const auto results = read_sheet(run / "results.csv");
  int rows = 0;
  int advised = 0;
  for (const SheetRow& row : read_sheet(run / "summary.csv")) {
    const Counts wanted = counted(results, row.at("analyte"));
    EXPECT_EQ(row.at("group"), "wells");
    EXPECT_EQ(number(row, "measured"), double(wanted.measured));
    EXPECT_EQ(number(row, "below_limit"), double(wanted.below));
    EXPECT_EQ(number(row, "above_range"), double(wanted.above));
    ++rows;
    if (row.at("advised") != "yes") continue;
    ++advised;
    EXPECT_GT(number(row, "mean"), number(row, "median"));  // skew
    EXPECT_GT(number(row, "median"), wanted.least);
    // A step of the distribution: it may be the largest one.
    EXPECT_LE(number(row, "p95"), wanted.most);
  }
  EXPECT_EQ(rows, 9);  // three analytes, three methods
  EXPECT_EQ(advised, 3);
  EXPECT_TRUE(holds(read_file(run / "report.html"), "<section id=\"groups\">"));
}

TEST_F(SummaryNight, WithoutGroupsTheTableHoldsItsHeadAlone) {
  const ProgramRun done = process(sample_run(kWellWater), out_.path());
  ASSERT_EQ(done.status, 0) << done.err;
  const fs::path run = out_ / kWellWater / "run-0001";
  EXPECT_TRUE(read_sheet(run / "summary.csv").empty());
  EXPECT_TRUE(holds(read_file(run / "manifest.json"), "summary.csv"));
}

// Half a unit of the place that the text shows.
double half_place(const std::string& text) {
  const std::size_t point = text.find('.');
  const double decimals =
      point == std::string::npos ? 0.0 : double(text.size() - point - 1);
  return 0.5000001 * std::pow(10.0, -decimals);
}

TEST_F(SummaryNight, ReportingLimitAndUncertaintyReachTheTexts) {
  constexpr double kLimit = 0.25;
  const fs::path run =
      run_with("reporting-limit=\"0.25\" relative-uncertainty=\"20\"");
  int with_uncertainty = 0;
  int below = 0;
  for (const SheetRow& row : read_sheet(run / "results.csv")) {
    const std::string& text = row.at("reported");
    if (text.starts_with("< ")) {
      EXPECT_GE(*parse_number(text.substr(2)), kLimit) << row_key(row);
      if (row.at("status") == "not-detected") continue;
      EXPECT_LT(number(row, "result"), kLimit) << row_key(row);
      ++below;
    }
    const std::size_t at = text.find(" +/- ");
    if (at == std::string::npos) continue;
    ++with_uncertainty;
    EXPECT_EQ(row.at("status"), "reportable");
    const double result = number(row, "result");
    const std::string value = text.substr(0, at);
    const std::string expanded = text.substr(at + 5);
    EXPECT_GE(result, kLimit);
    if (result >= 10.0 / 0.2) continue;  // places before the point
    EXPECT_LE(std::abs(*parse_number(value) - result), half_place(value));
    EXPECT_LE(std::abs(*parse_number(expanded) - 0.2 * result),
              half_place(expanded));
    EXPECT_EQ(half_place(value), half_place(expanded));
  }
  EXPECT_GT(with_uncertainty, 20);
  EXPECT_GT(below, 0);
}

}  // namespace
}  // namespace loqsmith::test
