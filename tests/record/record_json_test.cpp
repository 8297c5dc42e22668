#include "loqsmith/record/record_json.hpp"

#include <gtest/gtest.h>

#include <nlohmann/json.hpp>
#include <sstream>

#include "record/example_run.hpp"

namespace loqsmith {
namespace {

nlohmann::json record_of(const PublishedRun& run) {
  std::ostringstream out;
  write_record(out, run);
  return nlohmann::json::parse(out.str());
}

TEST(RecordJson, SaysWhereEverythingCameFrom) {
  const auto record = record_of(test::example_run());
  EXPECT_EQ(record["program"]["version"], "0.1.0");
  EXPECT_EQ(record["program"]["processor_class"], "x86-64 avx2 fma");
  EXPECT_EQ(record["sequence"]["name"], "well-water-0412");
  EXPECT_EQ(record["run"], 2);
  EXPECT_EQ(record["ledger_head"], "12:" + std::string(64, 'e'));
  EXPECT_EQ(record["method"]["revision"], "3");
  EXPECT_EQ(record["method"]["defaults_used"][1]["value"], "5");
  EXPECT_EQ(record["inputs"][2]["path"], "method.xml");
  EXPECT_EQ(record["inputs"][2]["sha256"], std::string(64, 'c'));
  EXPECT_EQ(record["problems"][0]["injection"], 33);
  EXPECT_EQ(record["problems"][0]["line"], 91204);
  EXPECT_EQ(record["needs_a_person"], true);
}

TEST(RecordJson, AFileThatCouldNotBeReadHasNoHash) {
  PublishedRun run = test::small_run();
  run.inputs = {{"data/lost.mzML", "", 0, "", {}}};
  EXPECT_TRUE(record_of(run)["inputs"][0]["sha256"].is_null());
}

TEST(RecordJson, KeepsTemplatesAndWhyThereIsNone) {
  const auto templates = record_of(test::example_run())["templates"];
  EXPECT_EQ(templates[0]["teachers"], nlohmann::json({14, 15, 16}));
  EXPECT_EQ(templates[0]["drift"][1]["minutes"], 3.421);
  EXPECT_EQ(templates[0]["weak"], false);
  EXPECT_EQ(templates[1]["not_applicable"], "no peak fit to teach");
}

TEST(RecordJson, KeepsTheShapeWhereOneWasLearned) {
  PublishedRun run = test::example_run();
  EXPECT_FALSE(record_of(run)["templates"][0].contains("shape"));
  WindowTemplate& window = run.targets[0].window.value();
  window.shape = {.left_minutes = 0.1,
                  .step_minutes = 0.05,
                  .values = {0.0, 5.0, 10.0, 5.0, 0.0},
                  .lessons = 3,
                  .noise = 0.01,
                  .scatter = 0.02};
  window.weights_noise = {0.25, 0.75, 0.8};
  const auto shape = record_of(run)["templates"][0]["shape"];
  EXPECT_EQ(shape["first_offset_minutes"], -0.1);
  EXPECT_EQ(shape["step_minutes"], 0.05);
  EXPECT_EQ(shape["values"], nlohmann::json({0.0, 5.0, 10.0, 5.0, 0.0}));
  EXPECT_EQ(shape["lessons"], 3);
  EXPECT_EQ(shape["scatter"], 0.02);
  EXPECT_EQ(shape["weights_noise"]["correlation"], 0.8);
}

TEST(RecordJson, KeepsTheNoiseOfTheBlanks) {
  PublishedRun run = test::example_run();
  NoiseEstimate noise;
  noise.points = 50;
  noise.standard_deviation = 0.25;
  noise.segments = SegmentNoise{0.75, 0.5, 12, -3.0};
  noise.whole = NoiseModel{0.25, 0.5, 0.75};
  run.targets[0].blank_noise = {{9, noise}};
  noise.whole = NotApplicable{"noise-trace-short: 41 widths"};
  run.targets[0].blank_noise.emplace_back(20, noise);
  const auto record = record_of(run)["noise"];
  EXPECT_EQ(record[0]["target"], "simazine");
  const auto blank = record[0]["blanks"][0];
  EXPECT_EQ(blank["injection"], 9);
  EXPECT_EQ(blank["points"], 50);
  EXPECT_EQ(blank["standard_deviation"], 0.25);
  EXPECT_EQ(blank["segments"]["count"], 12);
  EXPECT_EQ(blank["segments"]["peak_to_peak"], 0.75);
  EXPECT_EQ(blank["segments"]["drift_per_hour"], -3.0);
  EXPECT_EQ(blank["whole_trace"]["creeping_variance"], 0.5);
  EXPECT_EQ(record[0]["blanks"][1]["whole_trace"]["not_applicable"],
            "noise-trace-short: 41 widths");
  EXPECT_TRUE(record[1]["blanks"].empty());
}

TEST(RecordJson, NumbersReadBackAsTheSameBits) {
  const PublishedRun run = test::example_run();
  const auto analytes = record_of(run)["analytes"];
  for (std::size_t i = 0; i < run.analytes.size(); ++i) {
    const auto& decisions = analytes[i]["decisions"];
    ASSERT_EQ(decisions.size(), run.analytes[i].results.size());
    for (std::size_t j = 0; j < decisions.size(); ++j) {
      const ResultRow& row = run.analytes[i].results[j];
      EXPECT_EQ(decisions[j]["sample"], row.sample);
      const auto& derivation = decisions[j]["derivation"];
      EXPECT_EQ(derivation["dilution"].get<double>(), row.dilution);
      EXPECT_EQ(derivation["rule"], row.rule);
      if (row.result) {
        EXPECT_EQ(decisions[j]["result"].get<double>(), *row.result);
      } else {
        EXPECT_TRUE(decisions[j]["result"].is_null());
      }
    }
  }
}

TEST(RecordJson, LimitsCarryTheirTermsAndFindings) {
  const PublishedRun run = test::example_run();
  const auto set = record_of(run)["analytes"][0]["sets"][0];
  EXPECT_EQ(set["calibration"]["model"], "linear");
  EXPECT_EQ(set["calibration"]["weight"], "1/x");
  EXPECT_EQ(set["limits"]["governing"]["detection_procedure"],
            "blank-deviation");
  const auto& procedures = set["limits"]["procedures"];
  const LimitEstimate& blank = *run.analytes[0].sets[0].limits.rows[0].estimate;
  EXPECT_EQ(procedures[0]["terms"][0]["value"].get<double>(),
            blank.terms[0].value);
  EXPECT_EQ(procedures[1]["findings"][0]["grade"], "not-valid");
  EXPECT_EQ(procedures[3]["not_applicable"], "no low spikes in the sequence");
  EXPECT_EQ(procedures[3]["grade"], "not-applicable");
}

TEST(RecordJson, SaysWhyAnAnalyteHasNoCalibration) {
  const auto set = record_of(test::example_run())["analytes"][3]["sets"][0];
  EXPECT_EQ(set["calibration"]["not_applicable"],
            "no standard contains the analyte");
  EXPECT_EQ(set["limits"]["governing"]["not_applicable"],
            "no valid procedure is left");
}

TEST(RecordJson, CountsChecksAndListsThoseThatFailed) {
  const auto checks = record_of(test::example_run())["checks"];
  for (const auto& entry : checks["summary"]) {
    if (entry["check"] == "check-standard") {
      EXPECT_EQ(entry["passed"], 5);
      EXPECT_EQ(entry["failed"], 1);
    }
  }
  ASSERT_EQ(checks["failed"].size(), 2U);
  EXPECT_EQ(checks["failed"][0]["check"], "unlisted-file");
  EXPECT_TRUE(checks["failed"][0]["injection"].is_null());
  EXPECT_EQ(checks["failed"][1]["injection"], 32);
}

TEST(RecordJson, PeaksStandInTheirTableAlone) {
  EXPECT_FALSE(record_of(test::example_run()).contains("peaks"));
}

}  // namespace
}  // namespace loqsmith
