// The C library chooses exp, log and pow by processor, so the last bits of a
// result may differ on another class of machine: texts, statuses and words may
// not, and numbers agree to 12 digits.

#include "golden/processed.hpp"
#include "loqsmith/base/csv.hpp"
#include "loqsmith/base/numbers.hpp"
#include "support/temp_folder.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

void expect_same_cell(const std::string& here, const std::string& there,
                      const std::string& place) {
  const auto a = parse_number(here);
  const auto b = parse_number(there);
  if (a && b) {
    EXPECT_TRUE(*a == *b || agrees_to_digits(*a, *b, 12)) << place;
  } else {
    EXPECT_EQ(here, there) << place;
  }
}

void expect_same_table(const std::string& here, const std::string& there,
                       const std::string& name) {
  const std::vector<CsvRow> a = read_csv(here, name);
  const std::vector<CsvRow> b = read_csv(there, name);
  ASSERT_EQ(a.size(), b.size()) << name;
  for (std::size_t row = 0; row < a.size(); ++row) {
    ASSERT_EQ(a[row].cells.size(), b[row].cells.size()) << name;
    for (std::size_t i = 0; i < a[row].cells.size(); ++i) {
      // Notes write numbers out among words, in full.
      if (i + 1 == a[row].cells.size() && name != "results.csv") continue;
      expect_same_cell(a[row].cells[i].text, b[row].cells[i].text,
                       name + ":" + std::to_string(a[row].line));
    }
  }
}

class ProcessorClass : public testing::TestWithParam<std::string> {};

TEST_P(ProcessorClass, ChangesNothingButLastDigits) {
  const TempFolder place;
  ASSERT_LE(process(sample_run(GetParam()), place / "here").status, 1);
  ASSERT_LE(process(sample_run(GetParam()), place / "there", {},
                    {"GLIBC_TUNABLES=glibc.cpu.hwcaps=-AVX2,-FMA"})
                .status,
            1);
  const auto here = tables_of(place / "here" / GetParam() / "run-0001");
  const auto there = tables_of(place / "there" / GetParam() / "run-0001");
  ASSERT_EQ(names_of(here), table_names());
  for (const auto& [name, text] : here) {
    expect_same_table(text, there.at(name), name);
  }
}

INSTANTIATE_TEST_SUITE_P(Nights, ProcessorClass,
                         testing::Values(kWellWater, kTabletCoating));

}  // namespace
}  // namespace loqsmith::test
