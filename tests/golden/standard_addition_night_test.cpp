// Samples whose matrix takes some of the signal away, by standard addition.

#include <gtest/gtest.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <nlohmann/json.hpp>

#include "golden/processed.hpp"
#include "golden/sheet.hpp"
#include "golden/small_night.hpp"
#include "loqsmith/base/files.hpp"
#include "support/temp_folder.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

constexpr char kMethod[] = R"(<?xml version="1.0" encoding="UTF-8"?>
<method xmlns="urn:loqsmith:method" id="zinol" revision="1">
  <units concentration="ug/mL" result="ug/mL"/>
  <traces><trace id="uv" name="uv"/></traces>
  <analytes><analyte id="zinol" trace="uv" retention-time="3"/></analytes>
  <limits quantitation-floor="none"><blank-deviation/></limits>
  <acceptance><calibration minimum-r2="0.98"/></acceptance>
</method>
)";

// Five standards at 10 of area per ug/mL, and eight blanks.
SmallNight ordinary_night(double noise_sd) {
  SmallNight night;
  night.method = kMethod;
  night.noise_sd = noise_sd;
  for (const double x : {0.0, 0.0, 0.0, 0.0, 0.0, 0.0, 0.0, 0.0}) {
    night.injections.push_back(
        {.sample = "water", .role = "solvent-blank", .area = x});
  }
  for (const double x : {1.0, 2.0, 5.0, 10.0, 20.0}) {
    const std::string level = "L" + std::to_string(static_cast<int>(x));
    night.levels.emplace_back(level, x);
    night.injections.push_back({.sample = level,
                                .role = "standard",
                                .level = level,
                                .area = 10.0 * x});
  }
  return night;
}

void add(SmallNight& night, const std::string& parent, double amount,
         double area, double dilution) {
  const std::string level = "A" + std::to_string(static_cast<int>(amount));
  const std::pair<std::string, double> entry{level, amount};
  if (std::find(night.levels.begin(), night.levels.end(), entry) ==
      night.levels.end()) {
    night.levels.push_back(entry);
  }
  night.injections.push_back({.sample = parent + " plus " + level,
                              .role = "added-standard",
                              .level = level,
                              .parent = parent,
                              .dilution = dilution,
                              .area = area});
}

struct Published {
  std::filesystem::path run;
  std::map<std::string, SheetRow> results;  // of samples, by name
  SheetRow line;                            // the last of calibration.csv
};

Published processed(const SmallNight& night, const TempFolder& place,
                    int status) {
  night.write(place / "night");
  const ProgramRun done = process(place / "night", place / "out");
  EXPECT_EQ(done.status, status) << done.out << done.err;
  Published published;
  published.run = place / "out" / "night" / "run-0001";
  for (const SheetRow& row : read_sheet(published.run / "results.csv")) {
    if (row.at("role") == "sample") published.results[row.at("sample")] = row;
    EXPECT_NE(row.at("role"), "added-standard");
  }
  published.line = read_sheet(published.run / "calibration.csv").back();
  return published;
}

// Silver by atomic absorption: Miller and Miller, Statistics and Chemometrics
// for Analytical Chemistry, regression chapter (data from memory); amount and
// interval computed with an independent library. Here as noise-free peaks, of
// which the window leaves one common share outside, so that the amount is free
// of it; diluted twentyfold.
TEST(StandardAddition, PublishedLineComesOutOfTheFiles) {
  SmallNight night = ordinary_night(0.0);
  const std::array<double, 7> responses{0.32, 0.41, 0.52, 0.60,
                                        0.70, 0.77, 0.89};
  night.injections.push_back({.sample = "waste",
                              .role = "sample",
                              .dilution = 20.0,
                              .area = responses[0]});
  for (std::size_t i = 1; i < responses.size(); ++i) {
    add(night, "waste", 5.0 * static_cast<double>(i), responses[i], 20.0);
  }
  const TempFolder place;
  // Blanks without noise give no limit: withheld, the number stands.
  const Published found = processed(night, place, 1);
  const SheetRow& row = found.results.at("waste");
  EXPECT_EQ(row.at("set"), "addition:waste");
  EXPECT_TRUE(
      agrees_to_digits(number(row, "vial_concentration"), 17.26053640, 9));
  EXPECT_TRUE(agrees_to_digits(number(row, "result"), 345.2107280, 9));
  EXPECT_TRUE(
      agrees_to_digits(number(row, "calibration_uncertainty"), 40.665948, 7));
  EXPECT_EQ(found.line.at("set"), "addition:waste");
  EXPECT_TRUE(agrees_to_digits(
      number(found.line, "intercept") / number(found.line, "slope"),
      17.26053640, 9));
  EXPECT_TRUE(holds(found.line.at("note"), "95 % interval 15.44 to 19.29"));
}

// The matrix takes 40 % away: by the standards a sample comes out at 0.6 of
// its truth, by additions at its truth, with a detection limit as much higher.
TEST(StandardAddition, TheMatrixDoesNotMatter) {
  SmallNight night = ordinary_night(0.5);
  const double sensitivity = 6.0;
  for (const char* name : {"river", "river"}) {
    night.injections.push_back(
        {.sample = name, .role = "sample", .area = sensitivity * 4.0});
  }
  for (const double amount : {2.0, 4.0, 8.0}) {
    add(night, "river", amount, sensitivity * (4.0 + amount), 1.0);
  }
  night.injections.push_back(
      {.sample = "brook", .role = "sample", .area = sensitivity * 4.0});
  const TempFolder place;
  const Published found = processed(night, place, 0);
  const SheetRow& river = found.results.at("river");
  const SheetRow& brook = found.results.at("brook");
  EXPECT_LE(std::abs(number(river, "result") - 4.0),
            number(river, "calibration_uncertainty"));
  EXPECT_LE(std::abs(number(river, "result") / 4.0 - 1.0), 0.02);
  EXPECT_EQ(river.at("status"), "reportable");
  EXPECT_EQ(river.at("set"), "addition:river");
  EXPECT_EQ(brook.at("set"), "1");
  EXPECT_LE(number(brook, "result"), 0.65 * 4.0);
  const double ratio =
      number(river, "detection_limit") / number(brook, "detection_limit");
  EXPECT_GE(ratio, 1.0 / 0.62);
  EXPECT_LE(ratio, 1.0 / 0.58);

  std::size_t points = 0;
  for (const SheetRow& row : read_sheet(found.run / "standards.csv")) {
    points += row.at("set") == "addition:river" ? 1U : 0U;
  }
  EXPECT_EQ(points, 5U);
  const std::string report = read_file(found.run / "report.html");
  EXPECT_TRUE(holds(report, "Standard addition, addition:river"));
  EXPECT_TRUE(holds(report, "standard addition: a/b = "));
  const auto record =
      nlohmann::json::parse(read_file(found.run / "record.json"));
  const auto& set = record["analytes"][0]["sets"][1];
  EXPECT_EQ(set["set"], "addition:river");
  EXPECT_LT(set["standard_addition"]["lower"].get<double>(), 4.0);
  EXPECT_GT(set["standard_addition"]["upper"].get<double>(), 4.0);
}

TEST(StandardAddition, OneAdditionIsTooFew) {
  SmallNight night = ordinary_night(0.5);
  night.injections.push_back(
      {.sample = "river", .role = "sample", .area = 24.0});
  add(night, "river", 4.0, 48.0, 1.0);
  const TempFolder place;
  const Published found = processed(night, place, 1);
  const SheetRow& river = found.results.at("river");
  EXPECT_EQ(river.at("status"), "withheld");
  EXPECT_EQ(river.at("reasons"), "no-calibration;few-additions");
  EXPECT_EQ(found.line.at("accepted"), "no");
  EXPECT_TRUE(holds(found.line.at("note"), "few-additions: 1 different"));
}

TEST(StandardAddition, AParentThatIsNowhereRefusesTheNight) {
  SmallNight night = ordinary_night(0.5);
  add(night, "river", 4.0, 48.0, 1.0);
  const TempFolder place;
  night.write(place / "night");
  const ProgramRun done = process(place / "night", place / "out");
  EXPECT_EQ(done.status, 65);
  EXPECT_TRUE(holds(done.err, "parent \"river\"")) << done.err;
}

}  // namespace
}  // namespace loqsmith::test
