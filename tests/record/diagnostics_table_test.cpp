#include <gtest/gtest.h>

#include <sstream>

#include "loqsmith/base/csv.hpp"
#include "loqsmith/calibration/fit_calibration.hpp"
#include "loqsmith/record/tables.hpp"

namespace loqsmith::test {
namespace {

// Eight standards, the fourth far off the line.
PublishedRun run_with_one_off() {
  std::vector<StandardPoint> points;
  for (int i = 1; i <= 8; ++i) {
    StandardPoint point;
    point.injection = i;
    point.level = "L" + std::to_string(i);
    point.concentration = i;
    point.response = 10.0 * i + (i % 2 == 0 ? 0.1 : -0.1) + (i == 4 ? 8.0 : 0);
    points.push_back(point);
  }
  CalibrationSet set;
  set.set = "1";
  set.calibration = fit_calibration(points, {});
  set.diagnostics = diagnose_calibration(*set.calibration);
  PublishedRun run;
  run.analytes.emplace_back();
  run.analytes[0].analyte = "=toluene";  // a formula to a spreadsheet
  run.analytes[0].sets.push_back(set);
  run.analytes[0].sets.emplace_back();
  run.analytes[0].sets[1].set = "2";  // without a calibration
  return run;
}

std::vector<CsvRow> rows_of(const PublishedRun& run) {
  std::ostringstream out;
  write_diagnostics_table(out, run);
  return read_csv(out.str(), "diagnostics.csv");
}

TEST(DiagnosticsTable, HasARowForEveryTestDoneOrNot) {
  const auto rows = rows_of(run_with_one_off());
  std::vector<std::string> tests;
  for (const CsvRow& row : rows) tests.push_back(row.cells[2].text);
  EXPECT_EQ(tests, (std::vector<std::string>{
                       "test", "lack-of-fit", "mandel", "cochran", "levene",
                       "residual-normality", "leverage", "cooks-distance",
                       "outlying-residual", "slope-drift", "grubbs",
                       "weight-advice", "suggested-exclusion"}));
  for (const CsvRow& row : rows) {
    ASSERT_EQ(row.cells.size(), 12U);
    EXPECT_FALSE(row.cells[9].text.empty());
  }
  // Not done: the reason and no numbers.
  EXPECT_EQ(rows[1].cells[3].text, "");
  EXPECT_EQ(rows[1].cells[8].text, "");
  EXPECT_EQ(rows[1].cells[9].text,
            "not applicable: no-replicates: no level was injected twice");
}

TEST(DiagnosticsTable, ShowsBothFitsOfASuggestedExclusion) {
  const PublishedRun run = run_with_one_off();
  const auto rows = rows_of(run);
  const CsvRow& outlying = rows[8];
  EXPECT_EQ(outlying.cells[8].text, "no");
  EXPECT_EQ(outlying.cells[10].text, "4");
  EXPECT_EQ(outlying.cells[11].text, "4");
  const CsvRow& last = rows.back();
  EXPECT_EQ(last.cells[11].text, "4");
  EXPECT_NE(last.cells[9].text.find("with it slope"), std::string::npos);
  EXPECT_NE(last.cells[9].text.find("without it slope"), std::string::npos);
  EXPECT_EQ(run.analytes[0].sets[0].calibration->used_points(), 8U);
}

}  // namespace
}  // namespace loqsmith::test
