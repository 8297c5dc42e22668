#include <gtest/gtest.h>

#include <sstream>

#include "loqsmith/base/csv.hpp"
#include "loqsmith/base/numbers.hpp"
#include "loqsmith/record/html.hpp"
#include "loqsmith/record/report.hpp"
#include "loqsmith/record/summaries.hpp"
#include "record/example_run.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

const std::string kHead =
    "group,analyte,unit,n,measured,below_limit,above_range,withheld,"
    "detected_percent,method,advised,mean,upper_mean,standard_deviation,p10,"
    "p25,median,p75,p90,p95,note\n";

std::string table(const PublishedRun& run) {
  std::ostringstream out;
  write_summary_table(out, run);
  return out.str();
}

std::string page(const PublishedRun& run) {
  std::ostringstream out;
  write_report(out, run);
  return out.str();
}

/// Samples of one analyte "toluene" with given results, all in a group.
PublishedRun group_of(const std::vector<std::pair<Status, double>>& results,
                      const std::string& group) {
  PublishedRun run = test::small_run();
  run.sequence.injections.clear();
  run.analytes.front().results.clear();
  for (const auto& [status, value] : results) {
    Injection injection;
    injection.number = static_cast<int>(run.sequence.injections.size()) + 1;
    injection.sample = "S" + std::to_string(injection.number);
    injection.group = group;
    run.sequence.injections.push_back(injection);
    ResultRow row;
    row.injection = injection.number;
    row.sample = injection.sample;
    row.analyte = "toluene";
    row.set = "1";
    row.unit = "mg/kg";
    row.status = status;
    row.result = value;
    row.detection_limit = 1.0;
    row.quantitation_limit = 3.0;
    run.analytes.front().results.push_back(row);
  }
  return run;
}

TEST(Summary, WithoutGroupsOnlyTheHeadAndNoSection) {
  EXPECT_EQ(table(test::small_run()), kHead);
  EXPECT_EQ(page(test::small_run()).find("groups\""), std::string::npos);
}

TEST(Summary, OneRowAMethodWithTheCounts) {
  const PublishedRun run = group_of({{Status::Reportable, 4.0},
                                     {Status::Reportable, 8.0},
                                     {Status::Estimated, 2.0},
                                     {Status::Reportable, 16.0},
                                     {Status::Reportable, 5.0},
                                     {Status::NotDetected, 0.2},
                                     {Status::Withheld, 70.0}},
                                    "wells");
  const std::string text = table(run);
  ASSERT_TRUE(text.starts_with(kHead));
  const auto rows = read_csv(text, "summary.csv");
  ASSERT_EQ(rows.size(), 4U);
  for (std::size_t i = 1; i < 4; ++i) {
    const auto& cells = rows[i].cells;
    ASSERT_EQ(cells.size(), 21U);
    EXPECT_EQ(cells[3].text, "6");
    EXPECT_EQ(cells[4].text, "5");
    EXPECT_EQ(cells[5].text, "1");
    EXPECT_EQ(cells[6].text, "0");
    EXPECT_EQ(cells[7].text, "1");
    EXPECT_EQ(cells[8].text.substr(0, 6), "83.333");
    EXPECT_EQ(cells[10].text, i == 1 ? "yes" : "no");
  }
  // The lowest is a "<": its mass stands at its limit, 36/6.
  EXPECT_EQ(rows[1].cells[9].text, "kaplan-meier");
  EXPECT_TRUE(
      test::agrees_to_digits(*parse_number(rows[1].cells[11].text), 6.0, 12));
  EXPECT_EQ(rows[1].cells[20].text, "mean-at-most;half-or-more-measured");
  EXPECT_EQ(rows[2].cells[9].text, "order-statistics");
  EXPECT_EQ(rows[3].cells[9].text, "lognormal");
}

TEST(Summary, OnlyTheCountWhereMoreWouldBeGuessing) {
  std::vector<std::pair<Status, double>> results(9, {Status::NotDetected, 0.1});
  results.emplace_back(Status::Reportable, 7.0);
  EXPECT_EQ(table(group_of(results, "wells")),
            kHead +
                "wells,toluene,mg/kg,10,1,9,0,0,10,,no,,,,,,,,,,"
                "only the count: too-many-censored\n");
}

TEST(Summary, TheReportSaysWhatTheTableSays) {
  const PublishedRun run = group_of({{Status::Reportable, 4.0},
                                     {Status::Reportable, 8.0},
                                     {Status::Reportable, 16.5},
                                     {Status::NotDetected, 0.2},
                                     {Status::Reportable, 5.0},
                                     {Status::Reportable, 150.0}},
                                    test::kHostileMarkup);
  const std::string html = page(run);
  const std::size_t section = html.find("id=\"groups\"");
  ASSERT_NE(section, std::string::npos);
  EXPECT_EQ(html.find("<script>"), std::string::npos);
  EXPECT_NE(html.find("<a href=\"#groups\">"), std::string::npos);
  const auto rows = read_csv(table(run), "summary.csv");
  ASSERT_EQ(rows.size(), 4U);
  for (std::size_t i = 1; i < rows.size(); ++i) {
    for (std::size_t column = 11; column < 20; ++column) {
      const std::string& text = rows[i].cells[column].text;
      if (text.empty()) continue;
      EXPECT_NE(html.find("<data value=\"" + text + "\">", section),
                std::string::npos)
          << text;
    }
  }
  EXPECT_NE(html.find("<svg class=\"figure\"", section), std::string::npos);
}

TEST(Summary, TheFigureMarksEachMeasuredValueAndEachLimitOnce) {
  SummaryRow row;
  row.group = "wells";
  row.analyte = "zinol";
  row.unit = "ug/L";
  for (const double x : {1.0, 2.0, 3.0}) {
    row.values.push_back({x, Censoring::Measured});
  }
  row.values.push_back({1.5, Censoring::Below});
  row.values.push_back({1.5, Censoring::Below});
  row.values.push_back({9.0, Censoring::Above});
  row.summary = summarise_censored(row.values);
  std::ostringstream out;
  figure_summary(out, row);
  const std::string svg = out.str();
  const auto count = [&](const std::string& part) {
    std::size_t n = 0;
    for (auto at = svg.find(part); at != std::string::npos;
         at = svg.find(part, at + 1)) {
      ++n;
    }
    return n;
  };
  EXPECT_EQ(count("<circle class=\"point\""), 3U);
  EXPECT_EQ(count("class=\"bounds\""), 4U);  // two strokes a hook
  row.values = {{1.0, Censoring::Measured}};
  row.summary = summarise_censored(row.values);
  EXPECT_FALSE(has_summary_figure(row));
}

}  // namespace
}  // namespace loqsmith
