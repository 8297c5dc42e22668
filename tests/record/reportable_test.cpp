#include "loqsmith/record/reportable.hpp"

#include <gtest/gtest.h>

#include <nlohmann/json.hpp>
#include <sstream>

#include "loqsmith/record/record_json.hpp"
#include "loqsmith/record/report.hpp"
#include "record/example_run.hpp"

namespace loqsmith {
namespace {

const std::string kHead =
    "sample,analyte,group,injections,dilution,result,unit,detection_limit,"
    "quantitation_limit,status,reported,qualifier,reasons,rejected\n";

std::string text_of(void (*write)(std::ostream&, const PublishedRun&),
                    const PublishedRun& run) {
  std::ostringstream out;
  write(out, run);
  return out.str();
}

ResultRow& add(PublishedRun& run, const std::string& sample, Status status,
               double result, double dilution) {
  Injection injection;
  injection.number = static_cast<int>(run.sequence.injections.size()) + 1;
  injection.sample = sample;
  injection.dilution = dilution;
  run.sequence.injections.push_back(injection);
  ResultRow row;
  row.injection = injection.number;
  row.sample = sample;
  row.analyte = "toluene";
  row.set = "1";
  row.dilution = dilution;
  row.result = result;
  row.unit = "mg/kg";
  row.detection_limit = 0.25 * dilution;
  row.quantitation_limit = 2.0 * dilution;
  row.status = status;
  row.reported = "by itself";
  run.analytes[0].results.push_back(row);
  return run.analytes[0].results.back();
}

/// Nothing withheld, no check failed; every sample injected once.
PublishedRun clean_run() {
  PublishedRun run = test::small_run();
  run.analytes[0].results = {run.analytes[0].results[0]};
  run.sequence_checks.clear();
  return run;
}

TEST(ReportableTable, OneRowASample) {
  PublishedRun run = clean_run();
  add(run, "W-1", Status::AboveRange, 70.0, 1.0);
  add(run, "W-1", Status::Reportable, 75.5, 5.0);
  add(run, "W-1", Status::Reportable, 76.0, 5.0);
  run.sequence.injections.back().group = "wells";
  EXPECT_EQ(text_of(write_reportable_table, run),
            kHead +
                "\"'=1+1, \"\"well\"\"\",toluene,,3,10,8.125,mg/kg,1.5,10,"
                "estimated,8.12,J,below-quantitation-limit;overlapped,\n"
                "W-1,toluene,wells,6;7,5,75.75,mg/kg,1.25,10,reportable,75.8,,,"
                "5:above-range\n");
  EXPECT_FALSE(needs_a_person(run));
}

// Each may stand by itself; together they say nothing.
TEST(ReportableTable, AContradictionNeedsAPerson) {
  PublishedRun run = clean_run();
  EXPECT_FALSE(needs_a_person(run));
  add(run, "W-1", Status::AboveRange, 70.0, 1.0);
  add(run, "W-1", Status::NotDetected, 0.5, 5.0);
  EXPECT_TRUE(text_of(write_reportable_table, run)
                  .ends_with("W-1,toluene,,,,,mg/kg,,,withheld,withheld,R,"
                             "dilutions-disagree,5:dilutions-disagree;"
                             "6:dilutions-disagree\n"));
  EXPECT_TRUE(needs_a_person(run));
  const std::string page = text_of(write_report, run);
  EXPECT_NE(page.find("contradict each other: nothing is reported"),
            std::string::npos);
}

TEST(ReportableTable, SurrogatesAreNobodysResult) {
  PublishedRun run = clean_run();
  run.method.analytes[0].surrogate_concentration = 10.0;
  EXPECT_EQ(text_of(write_reportable_table, run), kHead);
}

TEST(ReportableTable, OneRowForEachSampleAndAnalyteInRunOrder) {
  const PublishedRun run = test::example_run();
  const std::string text = text_of(write_reportable_table, run);
  std::size_t samples = 0;
  for (const Injection& one : run.sequence.injections) {
    if (one.role == Role::Sample) ++samples;
  }
  const auto lines =
      static_cast<std::size_t>(std::count(text.begin(), text.end(), '\n'));
  EXPECT_GT(lines, 2U);
  EXPECT_LE(lines - 1, samples * run.analytes.size());
  int last = 0;
  for (const ReportableRow& row : reportable_of(run, run.analytes[0])) {
    EXPECT_GT(row.first_injection, last);
    last = row.first_injection;
  }
}

TEST(ReportableSection, OnlyWhereASampleWasInjectedMoreThanOnce) {
  PublishedRun run = clean_run();
  EXPECT_EQ(text_of(write_report, run).find("repeats\""), std::string::npos);
  add(run, test::kHostileMarkup, Status::Reportable, 7.0, 1.0);
  add(run, test::kHostileMarkup, Status::Reportable, 7.5, 2.0);
  const std::string page = text_of(write_report, run);
  EXPECT_NE(page.find("<a href=\"#repeats\">"), std::string::npos);
  const std::size_t section = page.find("<section id=\"repeats\">");
  ASSERT_NE(section, std::string::npos);
  EXPECT_NE(page.find("</a> more-diluted", section), std::string::npos);
  EXPECT_EQ(page.find("<script>"), std::string::npos);
}

TEST(ReportableRecord, HoldsWhatWasChosenAndWhatWasRejected) {
  PublishedRun run = clean_run();
  add(run, "W-1", Status::Reportable, 7.0, 1.0);
  add(run, "W-1", Status::Reportable, 7.5, 2.0);
  const auto record = nlohmann::json::parse(text_of(write_record, run));
  ASSERT_EQ(record["reportable"].size(), 1U);
  const auto& sample = record["reportable"][0];
  EXPECT_EQ(sample["sample"], "W-1");
  EXPECT_EQ(sample["analyte"], "toluene");
  EXPECT_EQ(sample["injections"][0], 5);
  EXPECT_EQ(sample["status"], "reportable");
  EXPECT_EQ(sample["reported"], "by itself");
  EXPECT_EQ(sample["rejected"][0], "6:more-diluted");
}

}  // namespace
}  // namespace loqsmith
