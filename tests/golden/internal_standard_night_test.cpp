// Vials diluted before and after the internal standard was added, each injected
// with a volume of its own.

#include <gtest/gtest.h>

#include <cmath>
#include <map>

#include "golden/processed.hpp"
#include "golden/sheet.hpp"
#include "golden/small_night.hpp"
#include "loqsmith/numerics/random.hpp"
#include "support/temp_folder.hpp"

namespace loqsmith::test {
namespace {

constexpr char kMethod[] = R"(<?xml version="1.0" encoding="UTF-8"?>
<method xmlns="urn:loqsmith:method" id="zinol" revision="1">
  <units concentration="ug/mL" result="ug/mL"/>
  <traces><trace id="uv" name="uv"/></traces>
  <internal-standards>
    <internal-standard id="is1" trace="uv" retention-time="4.5" concentration="50"/>
  </internal-standards>
  <analytes>
    <analyte id="zinol" trace="uv" retention-time="3" internal-standard="is1"/>
  </analytes>
  <limits quantitation-floor="none"><blank-deviation/></limits>
</method>
)";

class Night {
 public:
  Night() {
    night_.method = kMethod;
    night_.noise_sd = 0.05;
    for (int i = 0; i < 8; ++i) {
      night_.injections.push_back({.sample = "water", .role = "solvent-blank"});
    }
    for (const double x : {1.0, 2.0, 5.0, 10.0, 20.0, 50.0}) {
      const std::string level = "L" + std::to_string(static_cast<int>(x));
      night_.levels.emplace_back(level, x);
      add(level, "standard", x, 1.0);
      night_.injections.back().level = level;
    }
  }

  // The detector gives 10 of area a ug/mL, and 500 for the internal standard
  // where nobody diluted it; the injected volume varies by a tenth.
  SmallInjection& add(const std::string& sample, const std::string& role,
                      double in_vial, double internal_standard_dilution,
                      double dilution = 1.0) {
    const double volume = 1.0 + 0.1 * volumes_.normal();
    night_.injections.push_back(
        {.sample = sample,
         .role = role,
         .dilution = dilution,
         .area = volume * 10.0 * in_vial,
         .internal_standard_area = volume * 500.0 / internal_standard_dilution,
         .internal_standard_dilution = internal_standard_dilution});
    return night_.injections.back();
  }

  void add_level(const std::string& level, double amount) {
    night_.levels.emplace_back(level, amount);
  }

  std::map<std::string, SheetRow> results(const TempFolder& place) const {
    night_.write(place / "night");
    const ProgramRun done = process(place / "night", place / "out");
    EXPECT_EQ(done.status, 0) << done.out << done.err;
    std::map<std::string, SheetRow> results;
    for (const SheetRow& row :
         read_sheet(place / "out" / "night" / "run-0001" / "results.csv")) {
      results[row.at("sample")] = row;
    }
    return results;
  }

 private:
  SmallNight night_;
  RandomStream volumes_{"injected volumes of vials"};
};

TEST(InternalStandardNight, DilutionBeforeAndAfterItsAddition) {
  Night night;
  night.add("as it is", "sample", 40.0, 1.0);
  night.add("then added", "sample", 4.0, 1.0, 10.0);
  night.add("added then diluted", "sample", 4.0, 10.0, 10.0);
  night.add("diluted both times", "sample", 2.0, 5.0, 20.0);
  const TempFolder place;
  const auto results = night.results(place);
  for (const char* sample :
       {"as it is", "then added", "added then diluted", "diluted both times"}) {
    const SheetRow& row = results.at(sample);
    EXPECT_LE(std::abs(number(row, "result") / 40.0 - 1.0), 0.01) << sample;
    EXPECT_EQ(row.at("status"), "reportable") << sample;
  }
  // Each sample's own limits follow its dilution alone.
  EXPECT_EQ(number(results.at("added then diluted"), "detection_limit"),
            number(results.at("then added"), "detection_limit"));
  EXPECT_TRUE(
      holds(results.at("water").at("reasons"), "mean-internal-standard"));
}

// What the sheet does not say cannot be known: the result is off by the factor.
TEST(InternalStandardNight, AForgottenDilutionShowsInFull) {
  Night night;
  night.add("forgotten", "sample", 4.0, 10.0, 10.0).internal_standard_dilution =
      1.0;
  const TempFolder place;
  const SheetRow row = night.results(place).at("forgotten");
  EXPECT_LE(std::abs(number(row, "result") / 400.0 - 1.0), 0.01);
}

TEST(InternalStandardNight, StandardAdditionByRatios) {
  Night night;
  night.add("river", "sample", 6.0, 1.0);
  for (const double amount : {3.0, 6.0, 12.0}) {
    const std::string level = "A" + std::to_string(static_cast<int>(amount));
    night.add_level(level, amount);
    SmallInjection& row =
        night.add("river plus " + level, "added-standard", 6.0 + amount, 1.0);
    row.level = level;
    row.parent = "river";
  }
  const TempFolder place;
  const SheetRow row = night.results(place).at("river");
  EXPECT_EQ(row.at("set"), "addition:river");
  EXPECT_LE(std::abs(number(row, "result") / 6.0 - 1.0), 0.02);
}

}  // namespace
}  // namespace loqsmith::test
