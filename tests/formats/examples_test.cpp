// Compares real traces with a table of what they hold. Registered only where
// the files stand beside the checkout.

#include <gtest/gtest.h>

#include <algorithm>
#include <charconv>
#include <filesystem>
#include <fstream>
#include <iterator>
#include <map>
#include <string>
#include <vector>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/formats/chromatogram_file.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::same_bits;
using test::within_condition;

std::string contents_of(const std::filesystem::path& path) {
  std::ifstream in(path, std::ios::binary);
  EXPECT_TRUE(in.good()) << path;
  return {std::istreambuf_iterator<char>(in), {}};
}

using Row = std::map<std::string, std::string>;

std::vector<Row> table() {
  const auto folder = std::filesystem::path(LOQSMITH_EXAMPLES);
  const auto lines = split(contents_of(folder / "chromatograms.tsv"), '\n');
  const auto head = split(lines.at(0), '\t');
  std::vector<Row> rows;
  for (std::size_t i = 1; i < lines.size(); ++i) {
    if (lines[i].empty()) continue;
    const auto cells = split(lines[i], '\t');
    Row row;
    for (std::size_t c = 0; c < head.size(); ++c) row[head[c]] = cells.at(c);
    rows.push_back(row);
  }
  return rows;
}

class Examples : public testing::Test {
 protected:
  const FileContents& read(const std::string& file, const std::string& unit) {
    auto it = read_.find(file);
    if (it == read_.end()) {
      const auto path = std::filesystem::path(LOQSMITH_EXAMPLES) / file;
      it = read_
               .emplace(file, read_chromatogram_file(contents_of(path), file,
                                                     {unit, true}))
               .first;
    }
    return it->second;
  }

 private:
  std::map<std::string, FileContents> read_;
};

double number(const Row& row, const std::string& column) {
  const auto value = parse_number(row.at(column));
  EXPECT_TRUE(value) << column;
  return value.value_or(0.0);
}

void compare(const Row& row, const Trace& trace) {
  SCOPED_TRACE(row.at("file") + " " + row.at("id"));
  const bool seconds = trace.header.time_unit == "second";
  const double scale = seconds ? 60.0 : 1.0;
  const auto in_minutes = [&](const std::string& column) {
    return number(row, column) / scale;
  };
  EXPECT_EQ(std::to_string(trace.minutes.size()), row.at("points"));
  ASSERT_EQ(trace.minutes.size(), trace.signal.size());
  ASSERT_FALSE(trace.minutes.empty());
  // The table has the file's words, the trace the name of the accession.
  const std::string unit = row.at("intensity_unit");
  EXPECT_EQ(trace.header.signal_unit,
            unit == "number of counts" ? "number of detector counts" : unit);
  EXPECT_EQ(trace_kind_name(trace.header.kind), row.at("type"));
  EXPECT_EQ(shortest(trace.header.precursor_mz), row.at("precursor"));
  EXPECT_EQ(shortest(trace.header.product_mz), row.at("product"));
  EXPECT_TRUE(same_bits(trace.minutes.front(), in_minutes("first_time")));
  EXPECT_TRUE(same_bits(trace.minutes.back(), in_minutes("last_time")));
  const auto [least, most] =
      std::minmax_element(trace.signal.begin(), trace.signal.end());
  EXPECT_TRUE(same_bits(*least, number(row, "min_intensity")));
  EXPECT_TRUE(same_bits(*most, number(row, "max_intensity")));
  // Where the largest value stands twice, the table names either place.
  const auto top = std::find(trace.minutes.begin(), trace.minutes.end(),
                             in_minutes("time_of_max"));
  ASSERT_NE(top, trace.minutes.end());
  EXPECT_TRUE(same_bits(
      trace.signal[static_cast<std::size_t>(top - trace.minutes.begin())],
      *most));

  double sum = 0.0;
  double area = 0.0;
  for (std::size_t i = 0; i < trace.signal.size(); ++i) {
    sum += trace.signal[i];
    if (i == 0) continue;
    area += (trace.minutes[i] - trace.minutes[i - 1]) * 0.5 *
            (trace.signal[i] + trace.signal[i - 1]);
  }
  // All intensities are positive: both sums are well conditioned in the signal;
  // the area also rests on differences of times, each of which may be off by
  // one rounding of the time itself.
  const auto n = static_cast<double>(trace.signal.size());
  const double step = number(row, "smallest_step") / scale;
  EXPECT_TRUE(within_condition(sum, number(row, "sum_intensity"), n));
  EXPECT_TRUE(
      within_condition(area, number(row, "trapezoid_area_in_time_unit") / scale,
                       n + 2.0 * trace.minutes.back() / step));
}

TEST_F(Examples, HoldWhatTheTableSays) {
  std::size_t compared = 0;
  for (const Row& row : table()) {
    const bool unitless = row.at("time_unit").empty();
    const FileContents& contents =
        read(row.at("file"), unitless ? "minute" : "");
    const auto it = std::find_if(
        contents.traces.begin(), contents.traces.end(),
        [&](const Trace& trace) { return trace.header.id == row.at("id"); });
    ASSERT_NE(it, contents.traces.end()) << row.at("file") << row.at("id");
    EXPECT_EQ(it->header.time_unit, unitless ? "minute" : row.at("time_unit"));
    compare(row, *it);
    ++compared;
  }
  EXPECT_EQ(compared, table().size());
  EXPECT_GT(compared, 70U);
}

TEST_F(Examples, HoldNothingElse) {
  std::map<std::string, std::size_t> rows;
  for (const Row& row : table()) ++rows[row.at("file")];
  for (const auto& [file, count] : rows) {
    const FileContents& contents = read(file, "minute");
    EXPECT_EQ(contents.traces.size(), count) << file;
    EXPECT_TRUE(contents.refused.empty()) << file;
  }
}

TEST_F(Examples, WithoutTimeUnitAreRefused) {
  const FileContents& contents = read("mzml/no_time_unit.mzML", "");
  EXPECT_TRUE(contents.traces.empty());
  ASSERT_EQ(contents.refused.size(), 2U);
  EXPECT_NE(contents.refused[0].problem.found.find("no unit"),
            std::string::npos);
}

}  // namespace
}  // namespace loqsmith
