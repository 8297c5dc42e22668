// A published error model out of files: its limits, and one that is not there.

#include <gtest/gtest.h>

#include "golden/processed.hpp"
#include "golden/sheet.hpp"
#include "golden/small_night.hpp"
#include "limits/toluene.hpp"
#include "loqsmith/base/files.hpp"
#include "loqsmith/base/numbers.hpp"
#include "support/temp_folder.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

std::string method(const std::string& limits) {
  return R"(<?xml version="1.0" encoding="UTF-8"?>
<method xmlns="urn:loqsmith:method" id="zinol" revision="1">
  <units concentration="pg" result="pg"/>
  <traces><trace id="uv" name="uv"/></traces>
  <analytes><analyte id="zinol" trace="uv" retention-time="3"/></analytes>
  <calibration weight="1/x2"/>
  <limits governing="two-component" quantitation-floor="none">)" +
         limits + R"(</limits>
  <acceptance><calibration minimum-r2="0.8"
    back-calculation="50" back-calculation-lowest="300"/></acceptance>
</method>
)";
}

// The published responses as peaks without noise, and a sample of 20 pg.
// Windows leave one share of every peak outside, of which concentrations are
// free.
SmallNight toluene_night(const std::string& limits) {
  SmallNight night;
  night.method = method(limits);
  for (const StandardPoint& point : toluene()) {
    const std::string level = "P" + shortest(point.concentration);
    if (night.levels.empty() || night.levels.back().first != level)
      night.levels.emplace_back(level, point.concentration);
    night.injections.push_back({.sample = level,
                                .role = "standard",
                                .level = level,
                                .area = point.response});
  }
  night.injections.push_back(
      {.sample = "air", .role = "sample", .area = 11.5 + 1.53 * 20.0});
  return night;
}

struct Published {
  SheetRow limits;  // of two-component
  SheetRow sample;
  std::string report;
};

Published published(const SmallNight& night, int status) {
  const TempFolder place;
  night.write(place / "night");
  const ProgramRun done = process(place / "night", place / "out");
  EXPECT_EQ(done.status, status) << done.out << done.err;
  const auto run = place / "out" / "night" / "run-0001";
  Published found;
  for (const SheetRow& row : read_sheet(run / "limits.csv"))
    if (row.at("procedure") == "two-component") found.limits = row;
  for (const SheetRow& row : read_sheet(run / "results.csv"))
    if (row.at("role") == "sample") found.sample = row;
  found.report = read_file(run / "report.html");
  return found;
}

// Rocke and Lorenzato, Technometrics 37 (1995) 176, toluene; limits computed
// from the maximum of the likelihood.
TEST(TwoComponentNight, PublishedErrorModel) {
  const Published found = published(
      toluene_night("<two-component relative-deviation=\"0.20\"/>"), 0);
  EXPECT_TRUE(
      agrees_to_digits(number(found.limits, "critical_value"), 6.147748, 6));
  EXPECT_TRUE(
      agrees_to_digits(number(found.limits, "detection_limit"), 12.666471, 6));
  EXPECT_TRUE(agrees_to_digits(number(found.limits, "quantitation_limit"),
                               21.881883, 6));
  EXPECT_EQ(found.limits.at("n"), "24");
  EXPECT_EQ(found.limits.at("governing"), "both");
  EXPECT_TRUE(holds(found.limits.at("note"), "critical-value-optimistic: "));
  EXPECT_EQ(found.sample.at("status"), "estimated");
}

// No relative standard deviation of 10 % anywhere: the quantitation limit is
// empty, the detection limit stands, and the next procedure lends its own.
TEST(TwoComponentNight, NoQuantitationLimitAtTenPercent) {
  const Published found =
      published(toluene_night("<two-component/><established detection=\"10\" "
                              "quantitation=\"30\" source=\"validation\"/>"),
                0);
  EXPECT_TRUE(
      agrees_to_digits(number(found.limits, "detection_limit"), 12.666471, 6));
  EXPECT_EQ(found.limits.at("quantitation_limit"), "");
  EXPECT_EQ(found.limits.at("quantitation_upper"), "");
  EXPECT_EQ(found.limits.at("governing"), "detection");
  EXPECT_TRUE(holds(found.limits.at("note"), "quantitation-absent: "));
  EXPECT_TRUE(holds(found.report, "falls to 10.4 % at high concentrations"));
  EXPECT_TRUE(
      agrees_to_digits(number(found.sample, "detection_limit"), 12.666471, 6));
  EXPECT_EQ(found.sample.at("quantitation_limit"), "30");
  EXPECT_EQ(found.sample.at("status"), "estimated");
}

// With none to lend one, results are withheld and the report says why.
TEST(TwoComponentNight, WithoutAnyQuantitationLimitResultsAreWithheld) {
  const Published found = published(toluene_night("<two-component/>"), 1);
  EXPECT_EQ(found.sample.at("status"), "withheld");
  EXPECT_TRUE(holds(found.report, "two-component gives no such limit"));
}

}  // namespace
}  // namespace loqsmith::test
