#include "loqsmith/calibration/variance_function.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

namespace loqsmith {
namespace {

constexpr double kRoundingShare = 1e-12;
constexpr int kGrid = 120;
// Beyond this logarithm of the ratio of the terms one of them is nothing.
constexpr double kReach = 9.0;

struct LevelSquares {
  double x2 = 0.0;
  double squares = 0.0;
  double degrees = 0.0;
};

std::vector<LevelSquares> with_replicates(
    const std::vector<ReplicateGroup>& groups) {
  std::vector<LevelSquares> levels;
  for (const ReplicateGroup& group : groups) {
    if (group.responses.size() < 2) continue;
    const double squares = squares_within(group);
    // At zero, replicates that agree would want an infinite weight.
    if (group.concentration == 0.0 && squares == 0.0) continue;
    levels.push_back({group.concentration * group.concentration, squares,
                      static_cast<double>(group.responses.size() - 1)});
  }
  return levels;
}

// A shape additive : proportional with the scale that suits it best.
struct Trial {
  double additive = 0.0;
  double proportional = 0.0;
  double deviance = std::numeric_limits<double>::infinity();
};

Trial scaled(const std::vector<LevelSquares>& levels, double additive,
             double proportional) {
  double degrees = 0.0, sum = 0.0, logs = 0.0;
  for (const LevelSquares& level : levels) {
    const double shape = additive + proportional * level.x2;
    if (!(shape > 0.0)) return {};
    degrees += level.degrees;
    sum += level.squares / shape;
    logs += level.degrees * std::log(shape);
  }
  const double scale = sum / degrees;
  return {scale * additive, scale * proportional,
          degrees * std::log(scale) + logs};
}

// u is the logarithm of proportional over additive; neither overflows.
Trial at_ratio(const std::vector<LevelSquares>& levels, double u) {
  return u < 0.0 ? scaled(levels, 1.0, std::exp(u))
                 : scaled(levels, std::exp(-u), 1.0);
}

void keep_better(Trial& best, const Trial& trial) {
  if (trial.deviance < best.deviance) best = trial;
}

// Golden section between the neighbours of the best point of the grid.
Trial refined(const std::vector<LevelSquares>& levels, double low,
              double high) {
  const double golden = 0.5 * (std::sqrt(5.0) - 1.0);
  double left = high - golden * (high - low);
  double right = low + golden * (high - low);
  Trial at_left = at_ratio(levels, left), at_right = at_ratio(levels, right);
  for (int i = 0; i < 60; ++i) {
    if (at_left.deviance <= at_right.deviance) {
      high = right;
      right = left;
      at_right = at_left;
      left = high - golden * (high - low);
      at_left = at_ratio(levels, left);
    } else {
      low = left;
      left = right;
      at_left = at_right;
      right = low + golden * (high - low);
      at_right = at_ratio(levels, right);
    }
  }
  return at_left.deviance <= at_right.deviance ? at_left : at_right;
}

Trial likeliest(const std::vector<LevelSquares>& levels) {
  double least = std::numeric_limits<double>::infinity(), most = 0.0;
  for (const LevelSquares& level : levels) {
    if (!(level.x2 > 0.0)) continue;
    least = std::min(least, level.x2);
    most = std::max(most, level.x2);
  }
  const double from = -std::log(most) - kReach;
  const double step = (-std::log(least) + kReach - from) / kGrid;
  int best = 0;
  Trial on_grid;
  for (int i = 0; i <= kGrid; ++i) {
    const Trial trial = at_ratio(levels, from + step * i);
    if (!(trial.deviance < on_grid.deviance)) continue;
    on_grid = trial;
    best = i;
  }
  const double centre = from + step * best;
  keep_better(on_grid, refined(levels, centre - step, centre + step));
  // The ends last, and not to be beaten by rounding.
  const double slack = 1e-9 * std::max(1.0, std::abs(on_grid.deviance));
  on_grid.deviance += slack;
  Trial found = on_grid;
  keep_better(found, scaled(levels, 1.0, 0.0));
  keep_better(found, scaled(levels, 0.0, 1.0));
  return found;
}

bool all_agree(const std::vector<ReplicateGroup>& groups, double squares) {
  double largest = 0.0;
  for (const ReplicateGroup& group : groups)
    for (double response : group.responses)
      largest = std::max(largest, std::abs(response));
  return !(std::sqrt(squares) > kRoundingShare * largest);
}

}  // namespace

Outcome<VarianceFunction> pooled_variance_function(
    const std::vector<ReplicateGroup>& groups) {
  const std::vector<LevelSquares> levels = with_replicates(groups);
  VarianceFunction found;
  std::size_t above_zero = 0;
  double squares = 0.0;
  for (const LevelSquares& level : levels) {
    if (level.x2 > 0.0) ++above_zero;
    squares += level.squares;
    found.degrees_of_freedom += level.degrees;
  }
  if (above_zero < 2)
    return NotApplicable{
        "no-replicates: weight 1/s2 needs replicate standards at two levels "
        "above zero or more: inject standards repeatedly or choose another "
        "weight"};
  if (all_agree(groups, squares))
    return NotApplicable{
        "no-scatter: all replicate standards agree, weight 1/s2 is not "
        "determined"};
  const Trial trial = likeliest(levels);
  found.levels = levels.size();
  found.additive = trial.additive;
  found.proportional = trial.proportional;
  return found;
}

}  // namespace loqsmith
