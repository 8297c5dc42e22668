#include <gtest/gtest.h>

#include <cmath>
#include <map>
#include <regex>
#include <sstream>

#include "loqsmith/base/csv.hpp"
#include "loqsmith/base/numbers.hpp"
#include "loqsmith/record/figures.hpp"
#include "loqsmith/record/limit_text.hpp"
#include "loqsmith/record/limits_scale.hpp"
#include "loqsmith/record/report.hpp"
#include "loqsmith/record/report_parts.hpp"
#include "loqsmith/record/tables.hpp"
#include "record/example_run.hpp"

// Every figure is there when its data are, and shows the tables' numbers.

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

std::string scale_of(const PublishedRun& run, std::size_t analyte,
                     std::size_t set = 0) {
  std::ostringstream out;
  figure_limits(out, run.analytes[analyte], run.analytes[analyte].sets[set],
                {});
  return out.str();
}

std::vector<double> places(const std::string& html, const std::string& begin) {
  const std::regex mark(begin + "[^>]* x1?=\"([0-9.]+)%\"");
  std::vector<double> found;
  for (std::sregex_iterator at(html.begin(), html.end(), mark), end; at != end;
       ++at) {
    found.push_back(*parse_number(std::string((*at)[1])));
  }
  return found;
}

TEST(LimitText, IsRoundedUpToTheMethodsDigits) {
  ReportingSettings reporting;
  EXPECT_EQ(limit_text(0.16301, reporting), "0.164");
  EXPECT_EQ(limit_text(0.163, reporting), "0.163");
  EXPECT_EQ(limit_text(12340.0, reporting), "12400");
  reporting.significant_digits = 2;
  EXPECT_EQ(limit_text(0.1601, reporting), "0.17");
  reporting.decimals = 0;
  EXPECT_EQ(limit_text(0.16301, reporting), "0.164");
  EXPECT_EQ(limit_text(0.0000123401, reporting), "1.24e-5");
  EXPECT_EQ(html_limit(0.16301, ReportingSettings{}),
            "<data value=\"0.16301\">0.164</data>");
  EXPECT_EQ(html_limit(std::nullopt, ReportingSettings{}).find("data"),
            std::string::npos);
}

TEST(LimitsScale, CarriesTheNumbersOfTheTable) {
  const PublishedRun run = test::example_run();
  std::ostringstream table;
  write_limits_table(table, run);
  std::string html;
  for (std::size_t i = 0; i < 3; ++i) html += scale_of(run, i);
  for (const CsvRow& row : read_csv(table.str(), "limits.csv")) {
    if (row.line == 1) continue;
    for (const std::size_t column : {4U, 5U}) {
      const std::string& number = row.cells[column].text;
      if (number.empty()) continue;
      const std::string cell = "<data value=\"" + number + "\">" +
                               limit_text(*parse_number(number), {}) +
                               "</data>";
      EXPECT_NE(html.find(cell), std::string::npos) << cell;
    }
  }
}

TEST(LimitsScale, EqualAmountsStandAtEqualPlaces) {
  PublishedRun run = test::example_run();
  CalibrationSet& set = run.analytes[0].sets[0];
  LimitEstimate& first = set.limits.rows[0].estimate.value();
  first.critical_value = 0.5;
  first.detection = 1.0;
  first.quantitation = 5.0;
  const std::string html = scale_of(run, 0);
  const std::vector<double> levels = places(html, "class=\"level");
  ASSERT_EQ(levels.size(), 7U);  // 0.5, 1, 2, 5, ...
  EXPECT_EQ(places(html, "class=\"critical\"").front(), levels[0]);
  EXPECT_EQ(places(html, "class=\"detection\"").front(), levels[1]);
  EXPECT_EQ(places(html, "class=\"quantitation\"").front(), levels[3]);
  // Logarithmic: from 0.5 to 1 as far as from 1 to 2 and from 10 to 20, to the
  // one decimal that is written.
  EXPECT_LT(std::abs(levels[1] - levels[0] - levels[2] + levels[1]), 0.21);
  EXPECT_LT(std::abs(levels[1] - levels[0] - levels[5] + levels[4]), 0.21);
}

TEST(LimitsScale, IsLinearWhereTheSpanIsSmall) {
  PublishedRun run = test::example_run();
  AnalyteJudgement& analyte = run.analytes[0];
  for (ResultRow& row : analyte.results) row.vial_concentration = 30.0;
  CalibrationSet& set = analyte.sets[0];
  for (StandardPoint& point : set.calibration.value().points) {
    point.concentration += 20.0;
  }
  EXPECT_TRUE(limits_scale(analyte, set)->axis.logarithmic);
  set.limits = {};
  EXPECT_FALSE(limits_scale(analyte, set)->axis.logarithmic);
}

TEST(LimitsScale, EverySampleIsDrawnOrCounted) {
  const PublishedRun run = test::example_run();
  for (std::size_t i = 0; i < 3; ++i) {
    const AnalyteJudgement& analyte = run.analytes[i];
    std::size_t samples = 0;
    for (const ResultRow& row : analyte.results) {
      if (is_sample_like(row.role) && row.vial_concentration) ++samples;
    }
    const auto scale = limits_scale(analyte, analyte.sets[0]);
    ASSERT_TRUE(scale);
    EXPECT_EQ(scale->samples.size() + scale->samples_below, samples);
    EXPECT_EQ(count(scale_of(run, i), "class=\"sample "),
              scale->samples.size());
  }
}

TEST(LimitsScale, APileOfSamplesIsCountedWhereItIsTooHigh) {
  PublishedRun run = test::example_run();
  std::size_t samples = 0;
  for (ResultRow& row : run.analytes[0].results) {
    if (!is_sample_like(row.role) || !row.vial_concentration) continue;
    row.vial_concentration = 3.0;
    ++samples;
  }
  const std::string html = scale_of(run, 0);
  const std::size_t drawn = count(html, "class=\"sample ");
  ASSERT_LT(drawn, samples);
  EXPECT_NE(html.find(">+" + std::to_string(samples - drawn) + "</text>"),
            std::string::npos);
}

TEST(LimitsScale, GradesShowByShapeAndWord) {
  const std::string html = scale_of(test::example_run(), 0);
  // calibration-residual is not valid: both its limits are struck out.
  EXPECT_EQ(count(html, "#grade-not-valid"), 1U);
  EXPECT_EQ(count(html, "class=\"detection invalid\""), 1U);
  EXPECT_EQ(count(html, "class=\"quantitation invalid\""), 1U);
  // One standard is left out, and struck out as well.
  EXPECT_EQ(count(html, "href=\"#limit-struck\""), 3U);
  EXPECT_EQ(count(html, "#grade-note"), 1U);
  EXPECT_EQ(count(html, "#grade-not-applicable"), 1U);
  EXPECT_NE(html.find("no low spikes in the sequence"), std::string::npos);
  EXPECT_EQ(count(html, "class=\"rule-detection\""), 1U);
}

TEST(Report, SaysBesideTheProcedureWhyItIsNotValid) {
  const std::string html = page(test::example_run());
  const std::size_t row = html.find("<th scope=\"row\">calibration-residual");
  ASSERT_NE(row, std::string::npos);
  const std::string cell = html.substr(row, html.find("</th>", row) - row);
  EXPECT_NE(cell.find("<b>not valid</b>, variance-grows: the scatter"),
            std::string::npos)
      << cell;
  const std::regex link("href=\"#([^\"]*)\">see the residuals");
  std::smatch target;
  ASSERT_TRUE(std::regex_search(cell, target, link));
  EXPECT_NE(html.find("<figure id=\"" + target[1].str() + "\">"),
            std::string::npos);
}

TEST(Report, EverySetHasItsFiguresAndLimits) {
  PublishedRun run = test::example_run();
  CalibrationSet second = run.analytes[0].sets[0];
  second.set = "2";
  second.limits.rows[0].estimate.value().detection = 0.271828;
  const std::string before = page(run);
  run.analytes[0].sets.push_back(second);
  const std::string after = page(run);
  for (const char* part :
       {"aria-label=\"Calibration of simazine",
        "Residual of each standard of "
        "simazine",
        "Deviation of each standard of simazine",
        "<figure class=\"scale\" aria-label=\"Limits of simazine",
        "<div class=\"wide\" role=\"region\" tabindex=\"0\" "
        "aria-label=\"Limits of simazine\""}) {
    EXPECT_EQ(count(before, part), 1U) << part;
    EXPECT_EQ(count(after, part), 2U) << part;
  }
  EXPECT_NE(after.find("<data value=\"0.271828\">0.272</data>"),
            std::string::npos);
  const std::regex id(" id=\"([^\"]*)\"");
  std::map<std::string, int> seen;
  for (std::sregex_iterator at(after.begin(), after.end(), id), end; at != end;
       ++at) {
    EXPECT_EQ(++seen[(*at)[1]], 1) << (*at)[1];
  }
}

FigureCurve fitted_curve() {
  FigureCurve figure = test::example_run().curves[0];
  PeakCurve& curve = figure.curve;
  curve.fit = PeakCurve::Fit::Model;
  curve.fit_stands = true;
  curve.smoothed = curve.signal;
  curve.fitted_minutes = curve.minutes;
  for (const double y : curve.signal) {
    curve.fitted.push_back(y - 0.25);
    curve.residual.push_back(0.25);
  }
  curve.parts = {curve.fitted, curve.fitted};
  curve.feet = {{3.2, 3.25, 13.9}, {3.6, 3.65, 14.1}};
  curve.noise.source = "blank 9";
  curve.noise.peak_to_peak = 0.871;
  curve.noise.standard_deviation = 0.21;
  return figure;
}

std::string drawn(const FigureCurve& figure) {
  std::ostringstream out;
  figure_trace(out, figure, 0.0);
  return out.str();
}

TEST(TraceFigure, DrawsWhatThereIs) {
  FigureCurve figure = fitted_curve();
  const std::string html = drawn(figure);
  for (const char* css :
       {"trace", "smoothed", "baseline", "fitted", "residual", "zero"}) {
    EXPECT_EQ(count(html, "class=\"" + std::string(css) + "\""), 1U) << css;
  }
  EXPECT_EQ(count(html, "class=\"part\""), 2U);
  EXPECT_EQ(count(html, "class=\"foot\""), 2U);
  EXPECT_NE(html.find("h 0.871, blank 9"), std::string::npos);
  figure.curve.fit_stands = false;
  EXPECT_EQ(count(drawn(figure), "class=\"fitted fails\""), 1U);
}

TEST(TraceFigure, DrawsNothingThatThereIsNot) {
  const std::string html = drawn(test::example_run().curves[0]);
  for (const char* css :
       {"smoothed", "fitted", "residual", "part", "foot", "noise"}) {
    EXPECT_EQ(count(html, "class=\"" + std::string(css) + "\""), 0U) << css;
  }
}

TEST(TraceFigure, NoiseOfTheSameTraceIsABandAsHighAsItsFigure) {
  FigureCurve figure = fitted_curve();
  CurveNoise& noise = figure.curve.noise;
  noise.stretches = {{3.0, 3.2}, {3.65, 3.8}};
  noise.low = 13.6;
  noise.high = 13.6 + noise.peak_to_peak;
  const std::string html = drawn(figure);
  EXPECT_EQ(count(html, ">h 0.871</text>"), 1U);
  // Two stretches, and the noise's spread behind the residual.
  EXPECT_EQ(count(html, "class=\"noise\""), 3U);
  noise.measure = NoiseSettings::Measure::StandardDeviation;
  EXPECT_EQ(count(drawn(figure), ">sd 0.21</text>"), 1U);
}

CalibrationDiagnostics diagnostics_of(const Calibration& line) {
  CalibrationDiagnostics all;
  DiagnosticTest levene;
  levene.name = "levene";
  levene.statistic = 7.4321;
  levene.critical = 3.11;
  levene.p = 0.0021;
  levene.passed = false;
  levene.meaning = "the scatter differs between levels";
  all.tests = {{"lack-of-fit", NotApplicable{"no-replicates: one each"}},
               {"levene", levene}};
  all.weights.candidates = {{CalibrationSettings::Weight::None, 61.25},
                            {CalibrationSettings::Weight::InverseX, 23.5}};
  all.weights.least = CalibrationSettings::Weight::InverseX;
  all.weights.advises_change = true;
  all.weights.advice = "1/x leaves 23.5 % instead of 61.2 %";
  Calibration without = line;
  without.slope = 1.77777;
  all.suggested_exclusions = {
      {14, "L5", 10.0, "deleted residual 6.1 above 4.0", without}};
  return all;
}

TEST(Diagnostics, PanelSaysEverything) {
  PublishedRun run = test::example_run();
  for (AnalyteJudgement& analyte : run.analytes) {
    for (CalibrationSet& one : analyte.sets) {
      one.diagnostics = NotApplicable{"none"};
    }
  }
  CalibrationSet& set = run.analytes[0].sets[0];
  const std::string before = page(run);
  EXPECT_EQ(before.find("class=\"panel\""), std::string::npos);
  set.diagnostics = diagnostics_of(*set.calibration);
  const std::string html = page(run);
  for (const char* part :
       {"<details class=\"panel\" open>", "<b>levene speaks against the curve",
        "<data value=\"7.4321\">", "<data value=\"3.11\">",
        "<data value=\"0.0021\">", "the scatter differs between levels",
        "no-replicates: one each", "<data value=\"61.25\">",
        "1/x leaves 23.5 % instead of 61.2 %", "deleted residual 6.1 above",
        "<data value=\"1.77777\">"}) {
    EXPECT_NE(html.find(part), std::string::npos) << part;
  }
  // The curve without the standard is drawn, the standard ringed.
  EXPECT_EQ(count(html, "class=\"curve without\""), 1U);
  EXPECT_EQ(count(html, "class=\"ring\""), 1U);
  EXPECT_EQ(count(html, "\xE2\x9C\x97 does not"), 1U);
}

TEST(Report, AnAdditionLineIsDrawnToWhereItMeetsZero) {
  PublishedRun run = test::example_run();
  CalibrationSet line = run.analytes[0].sets[0];
  line.set = "Old mill";
  line.alone = false;
  line.over_additions = true;
  line.addition = StandardAddition{};
  line.addition->amount = 3.14159;
  line.addition->interval = ConcentrationInterval{2.71828, 3.6};
  run.analytes[0].sets.push_back(line);
  const std::string html = page(run);
  EXPECT_EQ(count(html, "<h3>Standard addition, Old mill</h3>"), 1U);
  EXPECT_NE(html.find("<data value=\"3.14159\">"), std::string::npos);
  EXPECT_NE(html.find("<data value=\"2.71828\">"), std::string::npos);
  EXPECT_EQ(count(html, "class=\"found\""), 1U);
}

TEST(Report, StaysSmallForALongNight) {
  PublishedRun run = test::example_run();
  const AnalyteJudgement pattern = run.analytes[0];
  const FigureCurve curve = fitted_curve();
  run.analytes.clear();
  run.curves.clear();
  for (int i = 0; i < 10; ++i) {
    AnalyteJudgement analyte = pattern;
    analyte.analyte = "analyte " + std::to_string(i);
    analyte.results.clear();
    for (int k = 1; k <= 200; ++k) {
      ResultRow row =
          pattern.results[static_cast<std::size_t>(k) % pattern.results.size()];
      row.injection = k;
      row.analyte = analyte.analyte;
      analyte.results.push_back(row);
    }
    run.analytes.push_back(analyte);
    for (int k = 0; k < 2; ++k) {
      run.curves.push_back(curve);
      run.curves.back().analyte = analyte.analyte;
    }
  }
  run.sequence.injections.resize(200, run.sequence.injections.back());
  for (std::size_t k = 0; k < 200; ++k) {
    run.sequence.injections[k].number = static_cast<int>(k) + 1;
  }
  const std::size_t bytes = page(run).size();
  RecordProperty("bytes", std::to_string(bytes));
  EXPECT_LT(bytes, 10'000'000U);
}

}  // namespace
}  // namespace loqsmith
