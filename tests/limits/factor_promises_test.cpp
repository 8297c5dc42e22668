// The guide's tables of what limits with fixed factors really promise: each
// figure is read there and held to a simulation.

#include <algorithm>
#include <cmath>
#include <fstream>
#include <sstream>

#include "limits/line_examples.hpp"
#include "limits/line_nights.hpp"
#include "loqsmith/limits/procedures.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

std::string promises() {
  std::ifstream in(LOQSMITH_SOURCE_DIR "/DEVELOPERS.md");
  std::ostringstream text;
  text << in.rdbuf();
  const std::string all = text.str();
  const std::size_t begin = all.find("## What the factors really promise");
  if (begin == std::string::npos) return "";
  return all.substr(begin, all.find("\n## ", begin + 1) - begin);
}

/// The cells of the table's rows that begin like that.
std::vector<std::vector<std::string>> rows_of(const std::string& text,
                                              const std::string& first) {
  std::vector<std::vector<std::string>> rows;
  std::istringstream lines(text);
  for (std::string line; std::getline(lines, line);) {
    if (line.rfind(first, 0) != 0) continue;
    std::vector<std::string> cells;
    std::istringstream parts(line);
    std::string before;
    std::getline(parts, before, '|');
    for (std::string cell; std::getline(parts, cell, '|');)
      cells.push_back(cell);
    rows.push_back(cells);
  }
  return rows;
}

/// "4.8 %" as a fraction.
double percent(const std::string& cell) { return std::stod(cell) / 100.0; }

// Equal within three standard errors and half a unit of the printed digit,
// which is the first decimal of a percent.
void expect_printed(const OverNights& nights, const std::string& cell) {
  const double error =
      3.0 * nights.sd() / std::sqrt(static_cast<double>(nights.values.size()));
  EXPECT_LE(std::abs(nights.mean_value() - percent(cell)), error + 0.0005)
      << "found " << nights.mean_value() << ", printed " << cell;
  EXPECT_LT(error, 0.015);
}

struct BlankPromise {
  OverNights known_intercept, own_mean;
  std::vector<double> relative_sd;  // at the quantitation limit
};

// Blanks scatter by 1 about 20, the line has slope 4 and meets zero at 20, or
// at the blanks' own mean.
BlankPromise simulate_blanks(double factor, int n) {
  const LimitProcedure& row = *find_limit_procedure("blank-deviation");
  const ProcedureSettings settings =
      with_factors(procedure("blank-deviation"), factor, 10.0);
  const TrueLine truth;
  const Calibration line = known_line(truth.intercept, truth.slope);
  RandomStream random("promises of blanks");
  BlankPromise promise;
  for (int night = 0; night < 4000; ++night) {
    std::vector<double> blanks;
    for (int i = 0; i < n; ++i) blanks.push_back(truth.response(0.0, random));
    const auto found = row.compute(evidence_of(blanks, line), {}, settings);
    if (!found) continue;
    Calibration own = line;
    own.intercept = *term(*found, "mean of the blanks");
    promise.known_intercept.add(
        chance_above(truth, line, *found->detection, 0.0));
    promise.own_mean.add(chance_above(truth, own, *found->detection, 0.0));
    promise.relative_sd.push_back(1.0 / truth.slope / *found->quantitation);
  }
  return promise;
}

double share_below(const std::vector<double>& values, double limit) {
  const auto below = std::count_if(values.begin(), values.end(),
                                   [&](double one) { return one < limit; });
  return static_cast<double>(below) / static_cast<double>(values.size());
}

TEST(FactorPromises, OfBlanks) {
  int rows = 0;
  for (const auto& row : rows_of(promises(), "| 3")) {
    ASSERT_GE(row.size(), 5U);
    const double factor = std::stod(row[0]);
    const BlankPromise found = simulate_blanks(factor, std::stoi(row[1]));
    expect_printed(found.known_intercept, row[2]);
    expect_printed(found.own_mean, row[3]);
    const std::size_t to = row[4].find("to");
    ASSERT_NE(to, std::string::npos);
    const double low = percent(row[4].substr(0, to));
    const double high = percent(row[4].substr(to + 2));
    // In 9 nights of 10: 5 % below, 5 % above, the printed digits being two.
    EXPECT_LT(std::abs(share_below(found.relative_sd, low) - 0.05), 0.015);
    EXPECT_LT(std::abs(share_below(found.relative_sd, high) - 0.95), 0.015);
    ++rows;
  }
  EXPECT_EQ(rows, 8);
}

struct LinePromise {
  OverNights false_positives, misses;
};

// Decisions at the critical value where there is one, otherwise at the
// detection limit; misses of an amount at each night's detection limit.
LinePromise simulate_line(const std::string& name) {
  TrueLine truth;
  truth.levels = {0, 1, 2, 4, 6, 8, 10};
  truth.blanks = 7;
  ProcedureSettings settings = procedure(name);
  if (name == "intercept-deviation") settings.detection_factor = 3.3;
  if (name == "din-32645") settings.alpha = settings.beta = 0.01;
  RandomStream random("promises on a line");
  LinePromise promise;
  for (int night = 0; night < 2000; ++night) {
    const LimitEvidence evidence = drawn_night(truth, random);
    const auto found =
        find_limit_procedure(name)->compute(evidence, {}, settings);
    if (!found) continue;
    const Calibration& line = *evidence.calibration;
    const double threshold = found->critical_value.value_or(*found->detection);
    promise.false_positives.add(chance_above(truth, line, threshold, 0.0));
    promise.misses.add(1.0 -
                       chance_above(truth, line, threshold, *found->detection));
  }
  return promise;
}

TEST(FactorPromises, OfLines) {
  int rows = 0;
  for (const auto& row : rows_of(promises(), "| `")) {
    ASSERT_GE(row.size(), 4U);
    const std::size_t from = row[0].find('`') + 1;
    const std::string name = row[0].substr(from, row[0].rfind('`') - from);
    ASSERT_NE(find_limit_procedure(name), nullptr) << name;
    const LinePromise found = simulate_line(name);
    expect_printed(found.false_positives, row[2]);
    expect_printed(found.misses, row[3]);
    ++rows;
  }
  EXPECT_EQ(rows, 6);
}

}  // namespace
}  // namespace loqsmith::test
