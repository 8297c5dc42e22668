// A night in which each check of blanks, carry-over and peaks fails once:
// exactly the expected failures in checks.csv and reasons in results.csv.

#include <gtest/gtest.h>

#include <array>
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

constexpr char kMethod[] = R"(<?xml version="1.0" encoding="UTF-8"?>
<method xmlns="urn:loqsmith:method" id="zinol" revision="1">
  <units concentration="ug/L" result="ug/L"/>
  <traces><trace id="uv" name="uv"/></traces>
  <internal-standards>
    <internal-standard id="is1" trace="uv" retention-time="4.5" window="0.2"
                       concentration="10"/>
  </internal-standards>
  <analytes>
    <analyte id="zinol" trace="uv" retention-time="3" internal-standard="is1"/>
  </analytes>
  <limits><established detection="0.25" quantitation="1"/></limits>
  <acceptance>
    <solvent-blank/>
    <method-blank/>
    <internal-standard/>
    <retention-time shift="0.05"/>
    <suitability tailing="1.5" plates="5000"/>
    <carry-over/>
  </acceptance>
</method>
)";

constexpr double kAreaPerUnit = 2.0;
constexpr double kInternalStandard = 50.0;

class RunChecksNight : public testing::Test {
 protected:
  int inject(const std::string& sample, const std::string& role, double amount,
             const std::string& prep = {}) {
    const bool with_standard = role != "solvent-blank";
    night_.injections.push_back(
        {.sample = sample,
         .role = role,
         .area = kAreaPerUnit * amount,
         .internal_standard_area = with_standard ? kInternalStandard : 0.0,
         .prep = prep});
    return static_cast<int>(night_.injections.size());
  }

  void inject_standards() {
    for (const double x : {1.0, 2.0, 5.0, 10.0, 20.0, 50.0}) {
      const std::string level = "L" + std::to_string(static_cast<int>(x));
      night_.levels.emplace_back(level, x);
      inject(level, "standard", x);
      night_.injections.back().level = level;
    }
  }

  std::vector<SheetRow> table(const std::string& name) const {
    return read_sheet(place_ / "out" / "night" / "run-0001" / name);
  }

  SmallNight night_{kMethod, 0.02, {}, {}};
  TempFolder place_;
};

TEST_F(RunChecksNight, EachCheckFailsOnceAndAffectsWhatItShall) {
  inject("water", "solvent-blank", 0.0);
  inject_standards();
  const int carried = inject("water", "solvent-blank", 0.22);
  inject("water", "solvent-blank", 0.0);
  const int unclean = inject("blank A", "method-blank", 0.4, "A");
  const int low_a = inject("W1", "sample", 2.0, "A");
  const int high_a = inject("W2", "sample", 8.0, "A");
  inject("blank B", "method-blank", 0.05, "B");
  const int weak = inject("W3", "sample", 8.0, "B");
  night_.injections.back().area *= 0.2;
  night_.injections.back().internal_standard_area *= 0.2;
  const int late = inject("W4", "sample", 4.0, "B");
  night_.injections.back().shift_minutes = 0.1;
  inject("W5", "sample", 45.0, "B");
  const int after_high = inject("W6", "sample", 0.6, "B");
  inject("water", "solvent-blank", 0.0);
  const int before_blank = inject("W7", "sample", 4.0, "B");
  const int dirty = inject("water", "solvent-blank", 0.5);
  inject("water", "solvent-blank", 0.0);
  const int good = inject("W8", "sample", 4.0, "B");
  night_.write(place_ / "night");
  const ProgramRun done = process(place_ / "night", place_ / "out");
  EXPECT_EQ(done.status, 1) << done.out << done.err;

  const auto key = [](const std::string& check, int injection) {
    return check + '/' + std::to_string(injection);
  };
  const std::map<std::string, double> wanted{
      {key("solvent-blank", dirty), 0.5},
      {key("method-blank", unclean), 0.4},
      {key("internal-standard", weak), 20.0},
      {key("retention-time", late), 0.1},
      {key("carry-over", carried), 22.0},
  };
  std::size_t failures = 0;
  for (const SheetRow& row : table("checks.csv")) {
    if (row.at("passed") != "no") continue;
    ++failures;
    const std::string name = row.at("check") + '/' + row.at("injection");
    if (row.at("check") == "suitability") {
      EXPECT_EQ(row.at("note").substr(0, 7), "plates:");
      continue;
    }
    ASSERT_TRUE(wanted.contains(name)) << name;
    EXPECT_TRUE(agrees_to_digits(number(row, "value"), wanted.at(name), 2));
  }
  EXPECT_EQ(failures, wanted.size() + 1);

  struct Expected {
    int injection;
    const char* status;
    const char* qualifier;
    const char* reasons;
  };
  const std::array<Expected, 7> expected{{
      {low_a, "reportable", "B", "method-blank-failed;suitability-failed"},
      {high_a, "reportable", "", "suitability-failed"},
      {weak, "withheld", "R", "internal-standard-failed;suitability-failed"},
      {late, "reportable", "", "retention-time-failed;suitability-failed"},
      {after_high, "estimated", "J",
       "carry-over-failed;suitability-failed;below-quantitation-limit"},
      {before_blank, "reportable", "",
       "solvent-blank-failed;suitability-failed"},
      {good, "reportable", "", "suitability-failed"},
  }};
  std::map<std::string, SheetRow> results;
  for (const SheetRow& row : table("results.csv")) {
    results[row.at("injection")] = row;
  }
  for (const Expected& one : expected) {
    const SheetRow& row = results.at(std::to_string(one.injection));
    EXPECT_EQ(row.at("status"), one.status) << one.injection;
    EXPECT_EQ(row.at("qualifier"), one.qualifier) << one.injection;
    EXPECT_EQ(row.at("reasons"), one.reasons) << one.injection;
  }
}

}  // namespace
}  // namespace loqsmith::test
