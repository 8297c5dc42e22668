#include "loqsmith/limits/linear_deviation.hpp"

#include <algorithm>
#include <cstddef>
#include <span>
#include <string>

#include "loqsmith/limits/leverage.hpp"
#include "loqsmith/limits/words.hpp"
#include "loqsmith/numerics/least_squares.hpp"
#include "loqsmith/numerics/mean.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kLeastLevels = 3;

struct Levels {
  std::vector<double> concentrations;
  std::vector<double> deviations;
  std::vector<double> degrees_of_freedom;
};

Levels levels_with_replicates(const std::vector<double>& concentrations,
                              const std::vector<double>& responses) {
  Levels levels;
  for (std::size_t begin = 0, end = 0; begin < responses.size(); begin = end) {
    while (end < responses.size() &&
           concentrations[end] == concentrations[begin])
      ++end;
    if (end - begin < 2) continue;
    levels.concentrations.push_back(concentrations[begin]);
    levels.deviations.push_back(standard_deviation(
        std::span<const double>(responses.data() + begin, end - begin)));
    levels.degrees_of_freedom.push_back(static_cast<double>(end - begin) - 1.0);
  }
  return levels;
}

NotApplicable no_growth(const LinearDeviation& line) {
  if (line.growth < 0.0)
    return {
        "deviation-does-not-grow: the levels' standard deviations fall by " +
        figure(-line.growth) +
        " per unit of concentration; variance=\"constant\" may describe "
        "them"};
  return {
      "deviation-not-above-zero: the line through the levels' standard "
      "deviations meets zero at " +
      figure(line.constant)};
}

std::size_t fewest_replicates(const Levels& levels) {
  return static_cast<std::size_t>(
             *std::min_element(levels.degrees_of_freedom.begin(),
                               levels.degrees_of_freedom.end())) +
         1;
}

Outcome<LinearDeviation> fit_once(const Levels& levels,
                                  const std::vector<double>& deviations) {
  std::vector<double> weights;
  for (std::size_t i = 0; i < deviations.size(); ++i)
    weights.push_back(levels.degrees_of_freedom[i] /
                      (deviations[i] * deviations[i]));
  const auto fit =
      fit_polynomial(levels.concentrations, levels.deviations, 0, 1, weights);
  if (!fit) return NotApplicable{"no-deviation-line: " + fit.reason()};
  const double constant = fit->coefficients[0];
  const Leverage leverage = leverage_of(levels.concentrations, weights, false);
  return LinearDeviation{constant, fit->coefficients[1],
                         constant * constant / leverage.at(0.0),
                         fewest_replicates(levels)};
}

bool all_above_zero(const std::vector<double>& values) {
  return std::all_of(values.begin(), values.end(),
                     [](double value) { return value > 0.0; });
}

}  // namespace

Outcome<LinearDeviation> fit_linear_deviation(
    const std::vector<double>& concentrations,
    const std::vector<double>& responses, int iterations) {
  const Levels levels = levels_with_replicates(concentrations, responses);
  if (levels.deviations.size() < kLeastLevels)
    return NotApplicable{
        "few-replicates: " + counted(levels.deviations.size(), "level") +
        " with more than one response, a line through "
        "standard deviations needs 3"};
  if (!all_above_zero(levels.deviations))
    return NotApplicable{
        "level-without-scatter: the responses of one level are all equal"};
  std::vector<double> deviations = levels.deviations;
  LinearDeviation line;
  for (int i = 0; i < iterations; ++i) {
    const auto next = fit_once(levels, deviations);
    if (!next) return NotApplicable{next.reason()};
    line = *next;
    for (std::size_t level = 0; level < deviations.size(); ++level)
      deviations[level] = line.at(levels.concentrations[level]);
    if (!all_above_zero(deviations)) return no_growth(line);
  }
  if (!(line.constant > 0.0) || !(line.growth >= 0.0)) return no_growth(line);
  return line;
}

}  // namespace loqsmith
