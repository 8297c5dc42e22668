// Low spikes and method blanks of several preparations: limits from replicates,
// and the checks of limits.

#include <gtest/gtest.h>

#include <map>
#include <string>

#include "golden/processed.hpp"
#include "golden/sheet.hpp"
#include "golden/small_night.hpp"
#include "loqsmith/base/files.hpp"
#include "support/temp_folder.hpp"

namespace loqsmith::test {
namespace {

std::string method(const std::string& established) {
  return R"(<?xml version="1.0" encoding="UTF-8"?>
<method xmlns="urn:loqsmith:method" id="zinol" revision="1">
  <units concentration="ug/mL" result="ug/mL"/>
  <traces><trace id="uv" name="uv"/></traces>
  <analytes><analyte id="zinol" trace="uv" retention-time="3"/></analytes>
  <limits governing="established">
    <blank-deviation/><spike-replicates/><low-level-precision/>
    <blank-and-low-level blanks="all"/><accuracy-profile/>
    )" + established +
         R"(
  </limits>
  <acceptance>
    <established-limit procedure="spike-replicates"/><confirmation/>
  </acceptance>
</method>
)";
}

// 1 of area per ug/mL; blanks and spikes scatter by the noise alone.
SmallNight night_with(const std::string& established) {
  SmallNight night;
  night.method = method(established);
  night.noise_sd = 0.5;
  const auto add = [&](const std::string& role, double amount,
                       const std::string& prep) {
    std::string level;
    if (role == "standard" || role == "low-spike") {
      level =
          role.substr(0, 1) + std::to_string(static_cast<int>(100 * amount));
      if (night.levels.empty() || night.levels.back().first != level)
        night.levels.emplace_back(level, amount);
    }
    night.injections.push_back({.sample = role + prep,
                                .role = role,
                                .level = level,
                                .area = amount,
                                .prep = prep});
  };
  for (int i = 0; i < 8; ++i) add("solvent-blank", 0.0, "");
  for (int i = 0; i < 12; ++i)
    add("method-blank", 0.0, "P" + std::to_string(i % 4));
  for (const double amount : {0.5, 1.0, 2.0})
    for (int i = 0; i < 12; ++i)
      add("low-spike", amount, "P" + std::to_string(i % 4));
  for (const double amount : {0.5, 1.0, 2.0, 5.0, 10.0, 20.0})
    add("standard", amount, "");
  add("sample", 8.0, "P1");
  return night;
}

class ReplicatesNight : public testing::Test {
 protected:
  std::filesystem::path run_of(const std::string& established, int status = 0) {
    night_with(established).write(work_ / "night");
    const ProgramRun done = process(work_ / "night", work_ / "out");
    EXPECT_EQ(done.status, status) << done.out << done.err;
    return work_ / "out" / "night" / "run-0001";
  }

  std::map<std::string, SheetRow> limits_of(const std::filesystem::path& run) {
    std::map<std::string, SheetRow> rows;
    for (const SheetRow& row : read_sheet(run / "limits.csv"))
      rows[row.at("procedure")] = row;
    return rows;
  }

  TempFolder work_;
};

// Every procedure sees the same noise, so each must agree with what the
// solvent blanks say of it, within their 95 % bounds.
TEST_F(ReplicatesNight, TheProceduresAgreeOnTheNoise) {
  const auto run =
      run_of("<established detection=\"0.2\" quantitation=\"0.6\"/>");
  auto limits = limits_of(run);
  ASSERT_EQ(limits.size(), 6U);
  SheetRow& blanks = limits.at("blank-deviation");
  const double lower = number(blanks, "detection_lower");
  const double upper = number(blanks, "detection_upper");
  const auto expect_within = [&](const SheetRow& row, double factor) {
    const double as_three_sd = number(row, "detection_limit") * 3.0 / factor;
    EXPECT_GT(as_three_sd, lower) << row.at("procedure");
    EXPECT_LT(as_three_sd, upper) << row.at("procedure");
  };
  expect_within(limits.at("low-level-precision"), 3.0);
  expect_within(limits.at("spike-replicates"), 2.718);  // t, 11
  expect_within(limits.at("blank-and-low-level"), 3.29);
  EXPECT_EQ(limits.at("spike-replicates").at("n"), "24");
  EXPECT_EQ(limits.at("blank-and-low-level").at("grade"), "caution");
  EXPECT_TRUE(holds(limits.at("spike-replicates").at("note"), "one-night: "));
  EXPECT_LT(number(limits.at("blank-and-low-level"), "critical_value"),
            number(limits.at("blank-and-low-level"), "detection_limit"));

  const SheetRow& profile = limits.at("accuracy-profile");
  EXPECT_EQ(profile.at("detection_limit"), "");
  EXPECT_EQ(profile.at("n"), "36");
  EXPECT_GE(number(profile, "quantitation_limit"), 0.5);
  EXPECT_LT(number(profile, "quantitation_limit"), 1.0);
}

std::map<std::string, int> outcomes(const std::filesystem::path& run,
                                    const std::string& check) {
  std::map<std::string, int> found;
  for (const SheetRow& row : read_sheet(run / "checks.csv"))
    if (row.at("check") == check) ++found[row.at("passed")];
  return found;
}

std::string reasons_of_the_sample(const std::filesystem::path& run) {
  for (const SheetRow& row : read_sheet(run / "results.csv"))
    if (row.at("role") == "sample") return row.at("reasons");
  return "no sample";
}

// The blanks' share is not checked: 12 are too few.
TEST_F(ReplicatesNight, TheChecksPass) {
  const auto run =
      run_of("<established detection=\"0.2\" quantitation=\"0.6\"/>");
  EXPECT_EQ(outcomes(run, "established-limit"),
            (std::map<std::string, int>{{"", 1}, {"yes", 2}}));
  EXPECT_EQ(outcomes(run, "confirmation"),
            (std::map<std::string, int>{{"yes", 4}}));
  EXPECT_EQ(reasons_of_the_sample(run), "");
  const std::string report = read_file(run / "report.html");
  EXPECT_TRUE(holds(report, "accuracy-profile"));
  EXPECT_TRUE(holds(report, "confirmation"));
  EXPECT_FALSE(holds(report, "nan"));
}

TEST_F(ReplicatesNight, ALimitThatMovedIsFlagged) {
  const auto run =
      run_of("<established detection=\"1\" quantitation=\"5\"/>", 1);
  EXPECT_EQ(outcomes(run, "established-limit")["no"], 2);
  // The spikes lie more than a factor of two below 5.
  EXPECT_EQ(outcomes(run, "confirmation"),
            (std::map<std::string, int>{{"", 1}}));
  EXPECT_EQ(reasons_of_the_sample(run), "established-limit-failed");
}

}  // namespace
}  // namespace loqsmith::test
