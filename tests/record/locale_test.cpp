#include <gtest/gtest.h>

#include <clocale>
#include <locale>
#include <sstream>

#include "loqsmith/record/record_json.hpp"
#include "loqsmith/record/report.hpp"
#include "loqsmith/record/reportable.hpp"
#include "loqsmith/record/summaries.hpp"
#include "loqsmith/record/tables.hpp"
#include "record/example_run.hpp"

namespace loqsmith {
namespace {

// As in many countries: 1.234,5. Imbued everywhere, for a machine need not
// have such a locale installed.
struct CommaDecimals : std::numpunct<char> {
  char do_decimal_point() const override { return ','; }
  char do_thousands_sep() const override { return '.'; }
  std::string do_grouping() const override { return "\3"; }
  std::string do_truename() const override { return "wahr"; }
};

std::string everything() {
  PublishedRun run = test::example_run();
  for (Injection& one : run.sequence.injections) one.group = "wells";
  std::ostringstream out;
  write_results_table(out, run);
  write_limits_table(out, run);
  write_calibration_table(out, run);
  write_standards_table(out, run);
  write_peaks_table(out, run);
  write_summary_table(out, run);
  write_reportable_table(out, run);
  write_checks_table(out, run);
  write_record(out, run);
  write_report(out, run);
  return out.str();
}

TEST(Locale, ChangesNothingThatIsPublished) {
  const std::string plain = everything();
  const std::locale before = std::locale::global(
      std::locale(std::locale::classic(), new CommaDecimals));
  // Where the machine has it, the C library's own as well.
  std::setlocale(LC_ALL, "de_DE.UTF-8");
  const std::string elsewhere = everything();
  std::locale::global(before);
  std::setlocale(LC_ALL, "C");
  EXPECT_TRUE(elsewhere == plain);
}

}  // namespace
}  // namespace loqsmith
