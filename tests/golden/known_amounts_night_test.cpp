// A night in which each check of a known amount fails once: exactly the
// expected rows of checks.csv, and exactly the expected reasons in results.csv.

#include <gtest/gtest.h>

#include <array>
#include <fstream>
#include <map>
#include <string>
#include <vector>

#include "golden/processed.hpp"
#include "golden/sheet.hpp"
#include "golden/small_night.hpp"
#include "support/temp_folder.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

namespace fs = std::filesystem;

constexpr char kMethod[] = R"(<?xml version="1.0" encoding="UTF-8"?>
<method xmlns="urn:loqsmith:method" id="zinol" revision="1">
  <units concentration="ug/L" result="ug/L"/>
  <traces><trace id="uv" name="uv"/></traces>
  <analytes>
    <analyte id="zinol" trace="uv" retention-time="3"/>
    <analyte id="marker" trace="uv" retention-time="4.5"
             surrogate-concentration="10"/>
  </analytes>
  <limits quantitation-floor="lowest-standard">
    <blank-deviation offset="blank-mean"/>
  </limits>
  <acceptance>
    <second-source recovery="80 120" action="flag"/>
    <control recovery="70 130"/>
    <fortified recovery="70 130" relative-difference="20"/>
    <duplicate relative-difference="20"/>
    <surrogate recovery="70 130"/>
  </acceptance>
</method>
)";

constexpr std::array<double, 6> kLevels{1.0, 2.0, 5.0, 10.0, 20.0, 50.0};
constexpr double kAreaPerUnit = 2.0;

class KnownAmountsNight : public testing::Test {
 protected:
  KnownAmountsNight() {
    night_.method = kMethod;
    night_.noise_sd = 0.02;
    for (int i = 0; i < 8; ++i) inject("water", "solvent-blank", "", 0.0, 0.0);
    for (const double x : kLevels) {
      const std::string level = "L" + std::to_string(static_cast<int>(x));
      night_.levels.emplace_back(level, x);
      inject(level, "standard", level, x, x);
    }
    night_.levels.emplace_back("other", 10.0);
    night_.levels.emplace_back("added", 10.0);
  }

  // Found concentrations of the analyte and of the surrogate; a number.
  int inject(const std::string& sample, const std::string& role,
             const std::string& level, double zinol, double marker,
             const std::string& prep = {}, const std::string& parent = {}) {
    night_.injections.push_back(
        {.sample = sample,
         .role = role,
         .level = level,
         .parent = parent,
         .area = kAreaPerUnit * zinol,
         .internal_standard_area = kAreaPerUnit * marker,
         .prep = prep});
    return static_cast<int>(night_.injections.size());
  }

  void process_night() {
    night_.write(place_ / "night");
    std::ofstream levels(place_ / "night" / "levels.csv", std::ios::app);
    for (const double x : kLevels) {
      levels << 'L' << static_cast<int>(x) << ",marker," << static_cast<int>(x)
             << '\n';
    }
    levels.close();
    const ProgramRun done = process(place_ / "night", place_ / "out");
    EXPECT_EQ(done.status, 1) << done.out << done.err;
  }

  std::vector<SheetRow> table(const std::string& name) const {
    return read_sheet(place_ / "out" / "night" / "run-0001" / name);
  }

  SmallNight night_;
  TempFolder place_;
};

// "control/20": check and injection.
std::map<std::string, double> failed_checks(const std::vector<SheetRow>& rows) {
  std::map<std::string, double> failed;
  for (const SheetRow& row : rows) {
    if (row.at("passed") != "no") continue;
    failed[row.at("check") + '/' + row.at("analyte") + '/' +
           row.at("injection")] = number(row, "value");
  }
  return failed;
}

TEST_F(KnownAmountsNight, EachCheckFailsOnceAndAffectsWhatItShall) {
  const int other = inject("other", "second-source", "other", 7.0, 0.0);
  const int low = inject("control 1", "control", "added", 6.0, 10.0, "A");
  const int in_a = inject("W1", "sample", "", 4.0, 10.0, "A");
  inject("control 2", "control", "added", 10.0, 10.0, "B");
  const int w2 = inject("W2", "sample", "", 8.0, 10.0, "B");
  const int again = inject("W2 again", "duplicate", "", 12.0, 10.0, "B", "W2");
  const int w3 = inject("W3", "sample", "", 4.0, 10.0, "B");
  const int spiked =
      inject("W3 spiked", "fortified", "added", 8.0, 10.0, "B", "W3");
  const int twice = inject("W3 spiked twice", "fortified-duplicate", "added",
                           14.0, 10.0, "B", "W3 spiked");
  const int lost = inject("W4", "sample", "", 4.0, 5.0, "B");
  const int good = inject("W5", "sample", "", 4.0, 10.0, "B");
  process_night();

  const auto key = [](const std::string& check, int injection) {
    return check + '/' + std::to_string(injection);
  };
  const std::map<std::string, double> wanted{
      {key("second-source/zinol", other), 70.0},
      {key("control/zinol", low), 60.0},
      {key("duplicate/zinol", again), 40.0},
      {key("fortified/zinol", spiked), 40.0},
      {key("fortified/zinol", twice), 200.0 * 6.0 / 22.0},
      {key("surrogate/marker", lost), 50.0},
  };
  const std::map<std::string, double> failed =
      failed_checks(table("checks.csv"));
  for (const auto& [name, value] : wanted) {
    ASSERT_TRUE(failed.contains(name)) << name;
    EXPECT_TRUE(agrees_to_digits(failed.at(name), value, 2)) << name;
  }
  EXPECT_EQ(failed.size(), wanted.size());

  std::map<std::string, std::string> reasons;
  std::map<std::string, std::string> statuses;
  for (const SheetRow& row : table("results.csv")) {
    reasons[row_key(row)] = row.at("reasons");
    statuses[row_key(row)] = row.at("status");
  }
  const auto zinol = [](int number) {
    return std::to_string(number) + "/zinol";
  };
  const std::string flag = "second-source-failed";
  EXPECT_EQ(reasons[zinol(low)], "control-failed;" + flag);
  EXPECT_EQ(reasons[zinol(in_a)], "control-failed;" + flag);
  EXPECT_EQ(statuses[zinol(in_a)], "withheld");
  EXPECT_EQ(reasons[zinol(w2)], flag + ";duplicate-failed");
  EXPECT_EQ(statuses[zinol(w2)], "reportable");
  EXPECT_EQ(reasons[zinol(again)], flag);
  EXPECT_EQ(reasons[zinol(w3)], flag + ";fortified-failed");
  EXPECT_EQ(statuses[zinol(w3)], "reportable");
  EXPECT_EQ(reasons[zinol(lost)], "surrogate-failed;" + flag);
  EXPECT_EQ(statuses[zinol(lost)], "withheld");
  EXPECT_EQ(reasons[zinol(good)], flag);
  EXPECT_EQ(statuses[zinol(good)], "reportable");
  const std::string marker = std::to_string(lost) + "/marker";
  EXPECT_EQ(reasons[marker], "surrogate-failed");
  EXPECT_EQ(statuses[std::to_string(good) + "/marker"], "reportable");
}

}  // namespace
}  // namespace loqsmith::test
