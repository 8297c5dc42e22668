// A sample run with baselines that are estimated below the peaks: what they do
// to blanks is said in limits.csv, and is what the blanks show.

#include <gtest/gtest.h>

#include <cmath>
#include <fstream>

#include "golden/processed.hpp"
#include "golden/sheet.hpp"
#include "loqsmith/base/files.hpp"
#include "loqsmith/base/numbers.hpp"
#include "support/temp_folder.hpp"

namespace loqsmith::test {
namespace {

void replace_all(std::string& text, const std::string& from,
                 const std::string& to) {
  std::size_t count = 0;
  for (std::size_t at = text.find(from); at != std::string::npos;
       at = text.find(from, at + to.size()), ++count) {
    text.replace(at, from.size(), to);
  }
  ASSERT_GT(count, 0U) << from;
}

// The figure after some words of a note: "mean of the blanks 0.12 response".
double figure_after(const std::string& note, const std::string& words) {
  const std::size_t at = note.rfind(words);
  EXPECT_NE(at, std::string::npos) << words;
  if (at == std::string::npos) return 0.0;
  const std::size_t begin = at + words.size() + 1;
  const std::size_t end = note.find(' ', begin);
  const auto value = parse_number(note.substr(begin, end - begin));
  EXPECT_TRUE(value) << note.substr(begin, end - begin);
  return value.value_or(0.0);
}

class EstimatedBaselineNight : public testing::TestWithParam<const char*> {
 protected:
  // The published run of the tablets' night with this baseline.
  std::filesystem::path processed_with(const std::string& offset) {
    const auto folder = copy_of_sample_run(kTabletCoating, work_ / offset);
    std::string method = read_file(folder / "method.xml");
    replace_all(method, "<analytes>",
                "<integration baseline=\"" + std::string(GetParam()) +
                    "\"/><analytes>");
    replace_all(method, "<blank-deviation ",
                "<blank-deviation offset=\"" + offset + "\" ");
    std::ofstream(folder / "method.xml", std::ios::binary) << method;
    const ProgramRun done = process(folder, out_ / offset);
    EXPECT_LE(done.status, 1) << done.err;
    return out_ / offset / kTabletCoating / "run-0001";
  }

  TempFolder work_;
  TempFolder out_;
};

TEST_P(EstimatedBaselineNight, SaysByHowMuchBlanksAreLifted) {
  const auto run = processed_with("blank-mean");
  int seen = 0;
  for (const SheetRow& row : read_sheet(run / "limits.csv")) {
    if (row.at("procedure") != "blank-deviation") continue;
    ++seen;
    const std::string& note = row.at("note");
    EXPECT_TRUE(holds(note, "baseline-shifts-blanks")) << note;
    EXPECT_TRUE(holds(note, "baseline-favours-blanks")) << note;
    EXPECT_NE(row.at("grade"), "not-valid");
    const double mean = figure_after(note, "mean of the blanks");
    const double sd = figure_after(note, "standard deviation of the blanks");
    const double predicted =
        figure_after(note, "mean response of blanks predicted of the baseline");
    EXPECT_GT(predicted, 0.0);
    // Three standard errors of the mean of so many blanks.
    EXPECT_LT(std::abs(mean - predicted),
              3.0 * sd / std::sqrt(number(row, "n")))
        << row.at("analyte");
  }
  EXPECT_EQ(seen, 3);
  for (const SheetRow& row : read_sheet(run / "peaks.csv")) {
    if (row.at("area").empty()) continue;
    EXPECT_EQ(row.at("baseline"), GetParam());
  }
}

TEST_P(EstimatedBaselineNight, LimitsFromBlanksNeedTheBlanksMean) {
  const auto run = processed_with("none");
  for (const SheetRow& row : read_sheet(run / "limits.csv")) {
    if (row.at("procedure") != "blank-deviation") continue;
    EXPECT_EQ(row.at("grade"), "not-valid") << row.at("analyte");
    EXPECT_TRUE(holds(row.at("note"), "baseline-biases-blanks"));
    EXPECT_TRUE(row.at("governing") == "none");
  }
}

INSTANTIATE_TEST_SUITE_P(Baselines, EstimatedBaselineNight,
                         testing::Values("asymmetric-least-squares", "snip"));

}  // namespace
}  // namespace loqsmith::test
