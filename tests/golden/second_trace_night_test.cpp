#include <gtest/gtest.h>

#include <map>
#include <string>

#include "loqsmith/base/files.hpp"
#include "processed.hpp"
#include "sheet.hpp"
#include "small_night.hpp"
#include "support/temp_folder.hpp"

// Two traces of one analyte, from the files to the result.

namespace loqsmith::test {
namespace {

const std::string kMethod =
    R"(<method xmlns="urn:loqsmith:method" id="zinol" revision="1">
  <title>Zinol</title>
  <units concentration="ug/L" result="ug/L"/>
  <traces>
    <trace id="uv" kind="any" name="uv"/>
    <trace id="fl" kind="any" name="fl"/>
  </traces>
  <analytes>
    <analyte id="zinol" trace="uv" retention-time="3.0" window="0.2">
      <second-trace trace="fl" ratio="0.4" tolerance="25"/>
    </analyte>
  </analytes>
  <limits><signal-to-noise/></limits>
  <acceptance><second-trace/></acceptance>
</method>
)";

SmallInjection injection(const std::string& sample, const std::string& role,
                         double area, double ratio) {
  SmallInjection one{.sample = sample, .role = role, .area = area};
  if (role == "standard") one.level = sample;
  one.second_area = ratio * area;
  return one;
}

TEST(SecondTraceNight, WithholdsWhatHasAnotherRatio) {
  const TempFolder place;
  SmallNight night;
  night.method = kMethod;
  night.has_second_trace = true;
  night.noise_sd = 0.05;
  night.levels = {{"S1", 1.0}, {"S2", 2.0}, {"S3", 5.0}, {"S4", 10.0}};
  night.injections = {{"water", "solvent-blank"}};
  for (const auto& [level, amount] : night.levels) {
    night.injections.push_back(injection(level, "standard", amount, 0.4));
  }
  night.injections.push_back(injection("river", "sample", 3.0, 0.4));
  night.injections.push_back(injection("canal", "sample", 3.0, 0.7));
  night.injections.push_back(injection("lake", "sample", 3.0, 0.0));
  night.write(place / "night");
  const ProgramRun run = process(place / "night", place / "out");
  EXPECT_EQ(run.status, 1) << run.err;
  std::map<std::string, std::string> said;
  for (const SheetRow& row :
       read_sheet(place / "out/night/run-0001/results.csv")) {
    said[row.at("sample")] = row.at("status") + ' ' + row.at("reasons");
  }
  EXPECT_EQ(said["river"], "reportable ");
  EXPECT_EQ(said["canal"], "withheld second-trace-failed");
  EXPECT_EQ(said["lake"], "withheld second-trace-failed");
  const std::string peaks = read_file(place / "out/night/run-0001/peaks.csv");
  EXPECT_TRUE(holds(peaks, "7,zinol (second trace),yes,"));
}

}  // namespace
}  // namespace loqsmith::test
