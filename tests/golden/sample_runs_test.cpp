// Both sample runs, processed as a user does it, held against their truth.

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

#include "generator/nights.hpp"
#include "golden/judged_truth.hpp"
#include "golden/processed.hpp"
#include "golden/sheet.hpp"
#include "loqsmith/base/files.hpp"
#include "support/temp_folder.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

class SampleRun : public testing::TestWithParam<SimulatedNight (*)()> {
 protected:
  void SetUp() override {
    night_ = GetParam()();
    const ProgramRun done = process(sample_run(night_.name), out_.path());
    ASSERT_EQ(done.status, 0) << done.err;
    run_ = out_ / night_.name / "run-0001";
  }

  std::vector<JudgedResult> judged() const {
    return judged_results(run_, sample_run("truth") / (night_.name + ".csv"),
                          night_);
  }

  TempFolder out_;
  SimulatedNight night_;
  std::filesystem::path run_;
};

TEST_P(SampleRun, EverySampleHasTheStatusOfItsTruth) {
  std::map<std::string, int> clear;
  for (const JudgedResult& row : judged()) {
    if (!row.clear_of_limits()) continue;
    ++clear[row.status];
    EXPECT_EQ(row.status, row.expected_status())
        << row.key << ": truth " << row.truth << ", result " << row.result
        << ", limits " << row.detection_limit << " and "
        << row.quantitation_limit << ", sd " << row.response_sd;
  }
  for (const char* status :
       {"not-detected", "estimated", "reportable", "above-range"}) {
    EXPECT_GE(clear[status], 3) << status;
  }
}

TEST_P(SampleRun, ResultsWellAboveTheQuantitationLimitAreNearTruth) {
  std::vector<double> errors;
  for (const JudgedResult& row : judged()) {
    if (row.truth > 3.0 * row.quantitation_limit && row.truth <= row.highest) {
      errors.push_back(std::abs(row.result / row.truth - 1.0));
      EXPECT_LE(errors.back(), 0.10) << row.key;
    }
  }
  ASSERT_GE(errors.size(), 10U);
  const auto middle =
      errors.begin() + static_cast<std::ptrdiff_t>(errors.size() / 2);
  std::nth_element(errors.begin(), middle, errors.end());
  EXPECT_LE(*middle, 0.03);
}

TEST_P(SampleRun, ResultsAtTheQuantitationLimitLieWithinTheirScatter) {
  int seen = 0;
  for (const JudgedResult& row : judged()) {
    if (row.truth < row.quantitation_limit ||
        row.truth > 3.0 * row.quantitation_limit) {
      continue;
    }
    ++seen;
    EXPECT_LE(std::abs(row.result - row.truth), 4.0 * row.response_sd)
        << row.key << ": truth " << row.truth << ", result " << row.result;
  }
  EXPECT_GE(seen, 3);
}

TEST_P(SampleRun, CleanBlanksScatterAroundZero) {
  std::map<std::string, std::vector<double>> responses;
  for (const SheetRow& row : read_sheet(run_ / "results.csv")) {
    if (row.at("role") == "solvent-blank") {
      responses[row.at("analyte")].push_back(number(row, "response"));
    }
  }
  EXPECT_EQ(responses.size(), night_.analytes.size());
  for (const auto& [analyte, values] : responses) {
    const auto n = static_cast<double>(values.size());
    double mean = 0.0;
    for (const double value : values) mean += value / n;
    double squares = 0.0;
    for (const double value : values)
      squares += (value - mean) * (value - mean);
    EXPECT_TRUE(within_sampling_error(mean, std::sqrt(squares / (n - 1.0)),
                                      values.size(), 0.0))
        << analyte;
  }
}

TEST_P(SampleRun, TheSheetsArePublishedVerbatimAndTheLedgerHolds) {
  const ProgramRun verified =
      run_program(LOQSMITH_PROGRAM, {"verify", out_.path().string()});
  EXPECT_EQ(verified.status, 0) << verified.out << verified.err;
  for (const char* name : {"sequence.csv", "levels.csv", "method.xml"}) {
    EXPECT_EQ(read_file(run_ / "inputs" / name),
              read_file(sample_run(night_.name) / name));
  }
}

INSTANTIATE_TEST_SUITE_P(WellWater, SampleRun,
                         testing::Values(&well_water_night));
INSTANTIATE_TEST_SUITE_P(TabletCoating, SampleRun,
                         testing::Values(&tablet_coating_night));

}  // namespace
}  // namespace loqsmith::test
