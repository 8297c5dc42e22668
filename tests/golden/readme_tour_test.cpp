// The README's tour from the files to a reported text says what the program
// says: each figure is taken from the published tables and looked up there.

#include <array>
#include <cstdio>
#include <fstream>
#include <sstream>

#include "golden/processed.hpp"
#include "golden/sheet.hpp"
#include "support/temp_folder.hpp"

namespace loqsmith::test {
namespace {

std::string readme_tour() {
  std::ifstream in(std::string(LOQSMITH_SOURCE_DIR) + "/README.md");
  std::ostringstream text;
  text << in.rdbuf();
  const std::string all = text.str();
  const std::size_t begin = all.find("## From the files to one reported text");
  return all.substr(begin, all.find("\n## ", begin + 1) - begin);
}

// As the tour prints it: so many significant digits, no padding.
std::string rounded(double value, int digits) {
  std::array<char, 64> text{};
  std::snprintf(text.data(), text.size(), "%.*g", digits, value);
  return text.data();
}

SheetRow row_with(const std::vector<SheetRow>& rows,
                  const std::map<std::string, std::string>& wanted) {
  for (const SheetRow& row : rows) {
    bool fits = true;
    for (const auto& [column, text] : wanted) fits &= row.at(column) == text;
    if (fits) return row;
  }
  throw std::runtime_error("no such row");
}

TEST(ReadmeTour, SaysWhatTheTablesSay) {
  const TempFolder place;
  ASSERT_EQ(process(sample_run(kWellWater), place / "out").status, 0);
  const auto run = place / "out" / kWellWater / "run-0001";
  const auto table = [&](const char* name) { return read_sheet(run / name); };
  const SheetRow peak = row_with(
      table("peaks.csv"), {{"injection", "56"}, {"analyte", "simazine"}});
  const SheetRow result = row_with(
      table("results.csv"), {{"injection", "56"}, {"analyte", "simazine"}});
  const SheetRow line =
      row_with(table("calibration.csv"), {{"analyte", "simazine"}});
  const SheetRow limit =
      row_with(table("limits.csv"),
               {{"analyte", "simazine"}, {"procedure", "blank-deviation"}});
  const std::string tour = readme_tour();
  const std::vector<std::string> said{
      rounded(number(peak, "retention_time"), 5) + " min",
      rounded(number(peak, "start"), 5) + " to " +
          rounded(number(peak, "end"), 5) + " min",
      rounded(number(peak, "area"), 5),
      rounded(number(line, "slope"), 5),
      rounded(number(line, "intercept"), 5),
      rounded(number(result, "vial_concentration"), 5) + " ug/L",
      rounded(number(result, "result"), 5) + " ug/L",
      "= " + rounded(number(limit, "detection_limit"), 3) + " ug/L",
      rounded(number(limit, "quantitation_limit"), 3) + " ug/L",
      rounded(number(result, "detection_limit"), 3),
      rounded(number(result, "quantitation_limit"), 3) + " ug/L",
      "`" + result.at("status") + "`",
      "**`" + result.at("reported") + "`**",
  };
  const auto spelled = [](std::string text) {
    // The tour writes small numbers as 1.2345e-6, printf as 1.2345e-06.
    for (std::size_t at; (at = text.find("e-0")) != std::string::npos;) {
      text.erase(at + 2, 1);
    }
    return text;
  };
  for (const std::string& figure : said) {
    EXPECT_TRUE(holds(tour, spelled(figure)))
        << spelled(figure) << " does not stand in the README's tour";
  }
  EXPECT_TRUE(limit.at("note").find("number of blanks 10") !=
              std::string::npos);
}

}  // namespace
}  // namespace loqsmith::test
