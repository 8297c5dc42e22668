#include "loqsmith/calibration/cochran_test.hpp"

#include <algorithm>

#include "loqsmith/base/reading_figures.hpp"
#include "loqsmith/numerics/distributions.hpp"

namespace loqsmith {
namespace {

constexpr double kSignificance = 0.05;
constexpr double kRoundingShare = 1e-12;

struct LevelSquares {
  double concentration = 0.0;
  double squares = 0.0;
  double degrees = 0.0;
};

std::vector<LevelSquares> with_replicates(
    const std::vector<ReplicateGroup>& groups) {
  std::vector<LevelSquares> levels;
  for (const ReplicateGroup& group : groups)
    if (group.responses.size() > 1)
      levels.push_back({group.concentration, squares_within(group),
                        static_cast<double>(group.responses.size() - 1)});
  return levels;
}

bool all_agree(const std::vector<ReplicateGroup>& groups, double squares) {
  double largest = 0.0;
  for (const ReplicateGroup& group : groups)
    for (double response : group.responses)
      largest = std::max(largest, response * response);
  return !(squares > kRoundingShare * kRoundingShare * largest);
}

// The tail of F for this level against the rest; zero where the rest agrees.
double tail_of(const LevelSquares& level, double squares, double degrees) {
  const double rest = squares - level.squares;
  const double rest_degrees = degrees - level.degrees;
  if (!(rest > 0.0)) return 0.0;
  return f_upper_tail((level.squares / level.degrees) / (rest / rest_degrees),
                      level.degrees, rest_degrees);
}

}  // namespace

Outcome<DiagnosticTest> cochran_test(
    const std::vector<ReplicateGroup>& groups) {
  const std::vector<LevelSquares> levels = with_replicates(groups);
  if (levels.size() < 2)
    return NotApplicable{
        "no-replicates: fewer than two levels were injected twice"};
  double squares = 0.0, degrees = 0.0;
  for (const LevelSquares& level : levels) {
    squares += level.squares;
    degrees += level.degrees;
  }
  if (all_agree(groups, squares))
    return NotApplicable{"not-defined: all replicates agree"};

  const auto count = static_cast<double>(levels.size());
  const LevelSquares* worst = &levels.front();
  double least = tail_of(*worst, squares, degrees);
  for (const LevelSquares& level : levels) {
    const double tail = tail_of(level, squares, degrees);
    if (!(tail < least)) continue;
    least = tail;
    worst = &level;
  }
  DiagnosticTest test;
  test.name = "cochran";
  test.degrees_1 = worst->degrees;
  test.degrees_2 = degrees - worst->degrees;
  test.statistic = worst->squares / squares;
  const double f =
      f_quantile(1.0 - kSignificance / count, *test.degrees_1, *test.degrees_2);
  test.critical = 1.0 / (1.0 + *test.degrees_2 / *test.degrees_1 / f);
  test.p = std::min(1.0, count * least);
  test.passed = test.statistic <= test.critical;
  test.concentration = worst->concentration;
  test.meaning =
      "the replicates at " + figure(worst->concentration) +
      (test.passed ? " scatter no more than those of other levels"
                   : " scatter more than those of the other levels") +
      " (C " + figure(test.statistic) + ", critical value " +
      figure(test.critical) + ")";
  return test;
}

}  // namespace loqsmith
