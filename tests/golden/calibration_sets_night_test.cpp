// A night in which the detector loses a fifth of its sensitivity between two
// blocks of standards, processed with each way of dividing standards into sets.

#include <gtest/gtest.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <nlohmann/json.hpp>

#include "golden/processed.hpp"
#include "golden/sheet.hpp"
#include "golden/small_night.hpp"
#include "loqsmith/base/files.hpp"
#include "support/simulator.hpp"
#include "support/temp_folder.hpp"

namespace loqsmith::test {
namespace {

constexpr std::array<double, 5> kLevels{1, 2, 5, 10, 20};

std::string method_with(const std::string& sets) {
  return R"(<?xml version="1.0" encoding="UTF-8"?>
<method xmlns="urn:loqsmith:method" id="zinol" revision="1">
  <units concentration="ug/L" result="ug/L"/>
  <traces><trace id="uv" name="uv"/></traces>
  <analytes><analyte id="zinol" trace="uv" retention-time="3"/></analytes>
  <calibration weight="1/x2" sets=")" +
         sets + R"("/>
  <limits quantitation-floor="none"><blank-deviation/></limits>
  <acceptance><calibration minimum-r2="0.99"/></acceptance>
</method>
)";
}

class Maker {
 public:
  explicit Maker(const std::string& sets) {
    night_.method = method_with(sets);
    night_.noise_sd = 0.5;
    for (std::size_t i = 0; i < kLevels.size(); ++i) {
      night_.levels.emplace_back("L" + std::to_string(i + 1), kLevels[i]);
    }
  }

  // Every injection scatters by half a percent beside its noise.
  void inject(const std::string& sample, const std::string& role,
              const std::string& level, double concentration) {
    const double area = sensitivity_ * concentration;
    night_.injections.push_back(
        {.sample = sample,
         .role = role,
         .level = level,
         .area = area * (1.0 + 0.005 * volumes_.normal())});
  }

  void standards() {
    for (int twice = 0; twice < 2; ++twice) {
      for (std::size_t i = 0; i < kLevels.size(); ++i) {
        const std::string level = "L" + std::to_string(i + 1);
        inject(level, "standard", level, kLevels[i]);
      }
    }
  }

  void sample(const std::string& name, double concentration) {
    inject(name, "sample", "", concentration);
  }

  void blanks() {
    for (int i = 0; i < 8; ++i) inject("water", "solvent-blank", "", 0.0);
  }

  void lose_sensitivity() { sensitivity_ *= 0.8; }

  const SmallNight& night() const { return night_; }

 private:
  SmallNight night_;
  double sensitivity_ = 10.0;
  RandomStream volumes_{"injected volumes"};
};

// Samples A between standards at full sensitivity, X between the standards
// before and after the loss (still before it), C at what was left.
SmallNight changing_night(const std::string& sets) {
  Maker maker(sets);
  maker.blanks();
  maker.standards();
  maker.sample("A-1", 8.0);
  maker.sample("A-2", 3.0);
  maker.standards();
  maker.sample("X", 4.0);
  maker.lose_sensitivity();
  maker.standards();
  maker.sample("C-1", 8.0);
  maker.sample("C-2", 3.0);
  maker.standards();
  return maker.night();
}

const std::map<std::string, double> kTruth{
    {"A-1", 8.0}, {"A-2", 3.0}, {"X", 4.0}, {"C-1", 8.0}, {"C-2", 3.0}};

class CalibrationSetsNight : public testing::Test {
 protected:
  void run(const std::string& sets, int status) {
    changing_night(sets).write(work_ / "night");
    const ProgramRun done = process(work_ / "night", out_.path());
    ASSERT_EQ(done.status, status) << done.out << done.err;
    run_ = out_ / "night" / "run-0001";
    for (const SheetRow& row : read_sheet(run_ / "results.csv")) {
      if (row.at("role") == "sample") samples_[row.at("sample")] = row;
    }
    ASSERT_EQ(samples_.size(), kTruth.size());
  }

  // Relative to what the sample truly holds.
  double error_of(const std::string& sample) const {
    return number(samples_.at(sample), "result") / kTruth.at(sample) - 1.0;
  }

  std::string set_of(const std::string& sample) const {
    return samples_.at(sample).at("set");
  }

  std::vector<std::string> column(const std::string& table,
                                  const std::string& name) const {
    std::vector<std::string> cells;
    for (const SheetRow& row : read_sheet(run_ / table)) {
      cells.push_back(row.at(name));
    }
    return cells;
  }

  TempFolder work_;
  TempFolder out_;
  std::filesystem::path run_;
  std::map<std::string, SheetRow> samples_;
};

TEST_F(CalibrationSetsNight, LatestGivesTheTruth) {
  run("latest", 0);
  for (const auto& [sample, truth] : kTruth) {
    EXPECT_LE(std::abs(error_of(sample)), 0.02) << sample;
    EXPECT_EQ(samples_.at(sample).at("status"), "reportable") << sample;
  }
  EXPECT_EQ(set_of("A-1"), "1");
  EXPECT_EQ(set_of("X"), "2");
  EXPECT_EQ(set_of("C-2"), "3");
}

TEST_F(CalibrationSetsNight, BracketingGivesTheTruthBetweenEqualStandards) {
  run("bracketing", 1);
  for (const char* sample : {"A-1", "A-2", "C-1", "C-2"}) {
    EXPECT_LE(std::abs(error_of(sample)), 0.02) << sample;
    EXPECT_FALSE(holds(samples_.at(sample).at("reasons"), "brackets"));
  }
  EXPECT_EQ(set_of("A-1"), "1+2");
  EXPECT_EQ(set_of("X"), "2+3");
  EXPECT_EQ(set_of("C-1"), "3+4");
  // Nobody can know where between the standards the loss happened.
  EXPECT_GE(std::abs(error_of("X")), 0.05);
  EXPECT_TRUE(holds(samples_.at("X").at("reasons"), "brackets-differ"));
  std::vector<std::string> passed;
  for (const SheetRow& row : read_sheet(run_ / "checks.csv")) {
    if (row.at("check") != "bracketing") continue;
    passed.push_back(row.at("passed"));
    EXPECT_EQ(row.at("unit"), "F");
  }
  EXPECT_EQ(passed, (std::vector<std::string>{"yes", "no", "yes"}));
}

TEST_F(CalibrationSetsNight, OneCurveDoesNot) {
  run("one", 1);  // The curve through both fails its r2.
  EXPECT_GE(error_of("A-1"), 0.05);
  EXPECT_LE(error_of("C-1"), -0.05);
  EXPECT_EQ(set_of("C-1"), "1");
}

TEST_F(CalibrationSetsNight, EveryTableHasEverySet) {
  run("latest", 0);
  const std::vector<std::string> four{"1", "2", "3", "4"};
  EXPECT_EQ(column("calibration.csv", "set"), four);
  EXPECT_EQ(column("limits.csv", "set"), four);
  const auto standards = column("standards.csv", "set");
  EXPECT_EQ(std::count(standards.begin(), standards.end(), "3"), 10);
  // k s / b: the same eight blanks over a slope that lost a fifth.
  const auto limits = read_sheet(run_ / "limits.csv");
  const double ratio = number(limits[3], "detection_limit") /
                       number(limits[0], "detection_limit");
  EXPECT_GE(ratio, 1.23);
  EXPECT_LE(ratio, 1.27);
}

TEST_F(CalibrationSetsNight, ReportAndRecordShowEverySet) {
  run("bracketing", 1);
  const std::string report = read_file(run_ / "report.html");
  for (const char* set : {"1+2", "2+3", "3+4"}) {
    EXPECT_TRUE(holds(report, std::string("Calibration set ") + set)) << set;
  }
  EXPECT_TRUE(holds(report, "set 2+3: F test of a curve for each side"));
  const auto record = nlohmann::json::parse(read_file(run_ / "record.json"));
  const auto& sets = record["analytes"][0]["sets"];
  ASSERT_EQ(sets.size(), 3U);
  EXPECT_EQ(sets[1]["set"], "2+3");
  EXPECT_TRUE(sets[2]["calibration"].contains("slope"));
  EXPECT_TRUE(sets[2]["limits"]["governing"].contains("detection_limit"));
}

}  // namespace
}  // namespace loqsmith::test
