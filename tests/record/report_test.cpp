#include "loqsmith/record/report.hpp"

#include <gtest/gtest.h>

#include <map>
#include <regex>
#include <sstream>

#include "loqsmith/base/csv.hpp"
#include "loqsmith/record/html.hpp"
#include "loqsmith/record/report_parts.hpp"
#include "loqsmith/record/tables.hpp"
#include "record/example_run.hpp"

namespace loqsmith {
namespace {

std::string page(const PublishedRun& run) {
  std::ostringstream out;
  write_report(out, run);
  return out.str();
}

std::size_t count(const std::string& text, const std::string& part) {
  std::size_t n = 0;
  for (std::size_t at = text.find(part); at != std::string::npos;
       at = text.find(part, at + part.size())) {
    ++n;
  }
  return n;
}

// What stands between `begin` and `end` after the place.
std::string between(const std::string& text, std::size_t from,
                    const std::string& begin, const std::string& end) {
  const std::size_t start = text.find(begin, from);
  if (start == std::string::npos) return "(nothing)";
  const std::size_t first = start + begin.size();
  return text.substr(first, text.find(end, first) - first);
}

TEST(Report, EveryCellOfTheGridSaysWhatTheTableSays) {
  const PublishedRun run = test::example_run();
  const std::string html = page(run);
  std::ostringstream out;
  write_results_table(out, run);
  const auto rows = read_csv(out.str(), "results.csv");
  ASSERT_EQ(rows.front().cells[19].text, "reported");
  for (std::size_t i = 1; i < rows.size(); ++i) {
    const auto& cells = rows[i].cells;
    const std::string id = result_id(std::stoi(cells[0].text), cells[3].text);
    const std::size_t at = html.find("<td id=\"" + id + "\"");
    ASSERT_NE(at, std::string::npos) << id;
    EXPECT_EQ(between(html, at, "class=\"", "\""), cells[18].text) << id;
    EXPECT_EQ(between(html, at, "class=\"value\">", "</span>"),
              html_text(cells[19].text))
        << id;
  }
  EXPECT_EQ(count(html, "<td id=\"r"), rows.size() - 1);
}

TEST(Report, DrawsTheShapeWhereOneWasLearned) {
  PublishedRun run = test::example_run();
  const std::string before = page(run);
  EXPECT_EQ(count(before, "Mean peak shape of"), 0U);
  TemplateShape& shape = run.targets[0].window.value().shape;
  shape = {.left_minutes = 0.1,
           .step_minutes = 0.05,
           .values = {0.0, 5.0, 10.0, 5.0, 0.0},
           .lessons = 3,
           .noise = 0.01,
           .scatter = 0.02};
  const std::string after = page(run);
  EXPECT_EQ(count(after, "Mean peak shape of simazine"), 1U);
  EXPECT_EQ(count(after, "<svg"), count(before, "<svg") + 1);
}

// Elements <data> carry the tables' own text.
std::string data_value(const std::string& csv_number) {
  return "<data value=\"" + csv_number + "\">";
}

TEST(Report, LimitsAndChecksCarryTheNumbersOfTheTables) {
  const PublishedRun run = test::example_run();
  const std::string html = page(run);
  std::ostringstream limits;
  write_limits_table(limits, run);
  for (const CsvRow& row : read_csv(limits.str(), "limits.csv")) {
    if (row.line == 1) continue;
    for (const std::size_t column : {4U, 5U, 7U, 8U, 9U, 10U}) {
      const std::string& number = row.cells[column].text;
      if (number.empty()) continue;
      EXPECT_NE(html.find(data_value(number)), std::string::npos) << number;
    }
  }
  std::ostringstream checks;
  write_checks_table(checks, run);
  for (const CsvRow& row : read_csv(checks.str(), "checks.csv")) {
    if (row.line == 1 || row.cells[3].text.empty()) continue;
    EXPECT_NE(html.find(data_value(row.cells[3].text)), std::string::npos);
  }
}

TEST(Report, HostileNamesStayText) {
  PublishedRun run = test::example_run();
  const std::string hostile = test::kHostileMarkup;
  run.sequence.name = hostile;
  run.method.title = hostile;
  run.method.id = hostile;
  run.method.units.result = hostile;
  run.inputs[0].path = hostile;
  run.problems[0].second.found = hostile;
  run.sequence_checks[0].note = hostile;
  for (AnalyteJudgement& analyte : run.analytes) {
    const std::string plain = analyte.analyte;
    analyte.analyte += hostile;
    analyte.concentration_unit = hostile;
    analyte.checks.push_back({hostile,
                              hostile,
                              {},
                              1,
                              2,
                              3,
                              hostile,
                              false,
                              hostile,
                              hostile,
                              hostile});
    for (ResultRow& row : analyte.results) {
      row.analyte = analyte.analyte;
      row.reasons.push_back(hostile);
      row.qualifier = hostile;
    }
    for (LimitRow& row : analyte.sets[0].limits.rows) {
      row.procedure += hostile;
      if (row.estimate) row.estimate.value().terms[0].name = hostile;
    }
    for (FigureCurve& curve : run.curves) {
      if (curve.analyte == plain) curve.analyte = analyte.analyte;
      curve.caption = hostile;
    }
  }
  const std::string html = page(run);
  EXPECT_EQ(html.find("<script"), std::string::npos);
  EXPECT_EQ(html.find("<img"), std::string::npos);
  EXPECT_EQ(html.find("alert(\"1\")"), std::string::npos);
  EXPECT_GT(count(html, "&lt;script&gt;"), 20U);
}

TEST(Report, NeedsNothingFromElsewhere) {
  const std::string html = page(test::example_run());
  EXPECT_EQ(html.find("src="), html.find("src=x onerror"));
  EXPECT_EQ(html.find("<link"), std::string::npos);
  EXPECT_EQ(html.find("@import"), std::string::npos);
  EXPECT_EQ(html.find("url("), std::string::npos);
  // Every link leads to a place of the same page.
  const std::regex link("href=\"([^\"]*)\"");
  for (std::sregex_iterator at(html.begin(), html.end(), link), end; at != end;
       ++at) {
    const std::string target = (*at)[1];
    ASSERT_EQ(target.front(), '#') << target;
    EXPECT_NE(html.find("id=\"" + target.substr(1) + "\""), std::string::npos)
        << target;
  }
}

TEST(Report, IdsAreUnique) {
  const std::string html = page(test::example_run());
  const std::regex id(" id=\"([^\"]*)\"");
  std::map<std::string, int> seen;
  for (std::sregex_iterator at(html.begin(), html.end(), id), end; at != end;
       ++at) {
    EXPECT_EQ(++seen[(*at)[1]], 1) << (*at)[1];
  }
}

TEST(Report, ListsWhatNeedsAPersonWithItsPlace) {
  const std::string html = page(test::example_run());
  const std::string list =
      between(html, 0, "<section id=\"attention\">", "</section>");
  EXPECT_NE(list.find("Injection 33"), std::string::npos);
  EXPECT_NE(list.find("the file looks cut off"), std::string::npos);
  EXPECT_NE(list.find("no standard contains the analyte"), std::string::npos);
  EXPECT_NE(list.find("118.2"), std::string::npos);
  EXPECT_NE(list.find("href=\"#r25-atrazine\""), std::string::npos);
  EXPECT_NE(list.find("unlisted-file"), std::string::npos);
}

TEST(Report, SaysThatNothingNeedsAPerson) {
  PublishedRun run = test::small_run();
  run.analytes[0].results.pop_back();
  run.sequence_checks.clear();
  ASSERT_FALSE(needs_a_person(run));
  EXPECT_NE(page(run).find("no result was withheld and no check failed"),
            std::string::npos);
}

TEST(Report, ACellSaysTheReasonThatItsMarkDoesNot) {
  PublishedRun run = test::small_run();
  run.analytes[0].results[0].reasons = {"overlapped",
                                        "below-quantitation-limit"};
  EXPECT_NE(page(run).find("<span class=\"why\">overlapped</span>"),
            std::string::npos);
  run.analytes[0].results[0].reasons = {"below-quantitation-limit"};
  EXPECT_EQ(page(run).find("class=\"why\">below"), std::string::npos);
}

TEST(Report, EveryAnalyteHasItsFigures) {
  const std::string html = page(test::example_run());
  // Calibration, deviation, residuals, the limits' ground and two traces of
  // three analytes; the fourth has neither standards nor limits.
  EXPECT_EQ(count(html, "<svg class=\"figure\""), 18U);
  EXPECT_EQ(count(html, "<figure class=\"scale\""), 3U);
  EXPECT_EQ(count(html, "<polyline class=\"trace\""), 6U);
  EXPECT_EQ(count(html, "class=\"curve\""), 3U);
}

TEST(Report, CautionsFollowTheMethod) {
  PublishedRun run = test::example_run();
  EXPECT_NE(page(run).find("about half are called not"), std::string::npos);
  EXPECT_EQ(page(run).find("biased upward"), std::string::npos);
  for (AnalyteSettings& analyte : run.method.analytes) {
    analyte.limits.governing = "largest";
    analyte.limits.decision = LimitSettings::Decision::CriticalValue;
  }
  EXPECT_EQ(page(run).find("about half are called not"), std::string::npos);
  EXPECT_NE(page(run).find("biased upward"), std::string::npos);
  EXPECT_NE(page(run).find("does not replace"), std::string::npos);
}

TEST(Report, NothingIsPrintedThatIsNoNumber) {
  const std::string html = page(test::example_run());
  const std::regex no_number("[^a-z](nan|inf)[^a-z]");
  std::smatch found;
  EXPECT_FALSE(std::regex_search(html, found, no_number)) << found.str();
}

TEST(Report, AnEmptyRunIsStillAPage) {
  PublishedRun run;
  run.sequence.name = "empty";
  const std::string html = page(run);
  EXPECT_TRUE(html.ends_with("</html>\n"));
  EXPECT_NE(html.find("holds no sample"), std::string::npos);
}

}  // namespace
}  // namespace loqsmith
