// Standards whose scatter grows with the amount, and limits that rest on one
// scatter for all of them.

#include <gtest/gtest.h>

#include <set>

#include "golden/processed.hpp"
#include "golden/sheet.hpp"
#include "golden/small_night.hpp"
#include "loqsmith/base/files.hpp"
#include "loqsmith/numerics/random.hpp"
#include "support/temp_folder.hpp"

namespace loqsmith::test {
namespace {

const std::set<std::string> kResting = {
    "calibration-residual", "intercept-deviation", "critical-and-detectable",
    "din-32645", "prediction-band"};

std::string method(const std::string& up_to, const std::string& more) {
  std::string limits;
  for (const std::string& one : kResting)
    limits += '<' + one + " up-to=\"" + up_to + "\"/>";
  return R"(<?xml version="1.0" encoding="UTF-8"?>
<method xmlns="urn:loqsmith:method" id="zinol" revision="1">
  <units concentration="ug/mL" result="ug/mL"/>
  <traces><trace id="uv" name="uv"/></traces>
  <analytes><analyte id="zinol" trace="uv" retention-time="3"/></analytes>
  <limits governing="first">)" +
         limits + more + R"(</limits>
  <acceptance><calibration minimum-r2="0.9"
    back-calculation="50" back-calculation-lowest="300"/></acceptance>
</method>
)";
}

// Seven levels over two decades in triplicate, 10 of area per ug/mL with some
// 1 of scatter from the noise, and two
// samples.
SmallNight night_of(double relative_sd, const std::string& method) {
  SmallNight night;
  night.method = method;
  night.noise_sd = 8.0;
  RandomStream random("growing scatter");
  for (int i = 0; i < 8; ++i)
    night.injections.push_back({.sample = "water", .role = "solvent-blank"});
  for (const double x : {1.0, 2.0, 5.0, 10.0, 20.0, 50.0, 100.0}) {
    const std::string level = "L" + std::to_string(static_cast<int>(x));
    night.levels.emplace_back(level, x);
    for (int i = 0; i < 3; ++i)
      night.injections.push_back(
          {.sample = level,
           .role = "standard",
           .level = level,
           .area = 10.0 * x * (1.0 + relative_sd * random.normal())});
  }
  for (const double x : {0.5, 30.0})
    night.injections.push_back(
        {.sample = "river", .role = "sample", .area = 10.0 * x});
  return night;
}

class GrowingScatter : public testing::Test {
 protected:
  std::filesystem::path run_of(const SmallNight& night, int status) {
    night.write(work_ / "night");
    const ProgramRun done = process(work_ / "night", work_ / "out");
    EXPECT_EQ(done.status, status) << done.out << done.err;
    return work_ / "out" / "night" / "run-0001";
  }

  TempFolder work_;
};

class GrowingScatterOf : public GrowingScatter,
                         public testing::WithParamInterface<double> {};

// Over the whole range none of them is valid, none governs, and limits.csv and
// the report say by how much the scatter grows.
TEST_P(GrowingScatterOf, LimitsOverTheWholeRangeAreNotValid) {
  const auto run =
      run_of(night_of(GetParam(),
                      method("all",
                             "<established detection=\"0.5\" "
                             "quantitation=\"1.5\" source=\"validation\"/>")),
             0);
  const std::string report = read_file(run / "report.html");
  std::size_t seen = 0;
  for (const SheetRow& row : read_sheet(run / "limits.csv")) {
    const std::string& procedure = row.at("procedure");
    if (procedure == "established") {
      EXPECT_EQ(row.at("governing"), "both");
      continue;
    }
    SCOPED_TRACE(procedure);
    ASSERT_EQ(kResting.count(procedure), 1U);
    ++seen;
    EXPECT_EQ(row.at("grade"), "not-valid");
    EXPECT_EQ(row.at("governing"), "none");
    const std::string& note = row.at("note");
    const std::size_t from = note.find("the variance of the upper standards");
    ASSERT_NE(from, std::string::npos) << note;
    EXPECT_TRUE(holds(note, "variance-grows"));
    EXPECT_TRUE(holds(note, "up to 100 is "));
    EXPECT_TRUE(holds(note, " times that of the lower ones"));
    const std::string words = note.substr(from, note.find(';', from) - from);
    const std::string said = "<b>not valid</b>, variance-grows: " + words;
    EXPECT_TRUE(holds(report, said)) << said;
  }
  EXPECT_EQ(seen, kResting.size());
  EXPECT_TRUE(holds(report, "see the residuals</a>"));
  for (const SheetRow& row : read_sheet(run / "results.csv")) {
    if (row.at("role") != "sample") continue;
    EXPECT_EQ(row.at("detection_limit"), "0.5");
  }
}

INSTANTIATE_TEST_SUITE_P(TwoAndFivePercent, GrowingScatterOf,
                         testing::Values(0.02, 0.05));

// With nothing else to govern the results are withheld, and the report says
// why at its head.
TEST_F(GrowingScatter, WithNothingElseResultsAreWithheld) {
  const auto run = run_of(night_of(0.05, method("all", "")), 1);
  const std::string report = read_file(run / "report.html");
  EXPECT_TRUE(holds(report, "calibration-residual is not valid: "));
  for (const SheetRow& row : read_sheet(run / "results.csv")) {
    if (row.at("role") != "sample") continue;
    EXPECT_EQ(row.at("status"), "withheld");
    EXPECT_TRUE(holds(row.at("reasons"), "no-valid-limit"))
        << row.at("reasons");
  }
}

// Without growth the whole range serves as well.
TEST_F(GrowingScatter, EvenScatterIsValidOverTheWholeRange) {
  const auto run = run_of(night_of(0.0, method("all", "")), 0);
  for (const SheetRow& row : read_sheet(run / "limits.csv"))
    EXPECT_NE(row.at("grade"), "not-valid") << row.at("note");
}

}  // namespace
}  // namespace loqsmith::test
