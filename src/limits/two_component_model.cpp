#include "loqsmith/limits/two_component_model.hpp"

#include <cmath>
#include <cstddef>
#include <optional>
#include <string>
#include <vector>

#include "loqsmith/limits/two_component_likelihood.hpp"
#include "loqsmith/numerics/least_squares.hpp"

namespace loqsmith {
namespace {

constexpr double kRange = 10.0 * (1.0 + 1e-9);
constexpr int kRounds = 5;  // of line and spreads in turn
constexpr double kLeastStart = 0.01;
constexpr int kMostEvaluations = 300;

// Pooled standard deviation within levels; nothing without replicates.
class PooledSpread {
 public:
  void add_level(const std::vector<double>& values) {
    if (values.size() < 2) return;
    double mean = 0.0;
    for (double one : values) mean += one;
    mean /= static_cast<double>(values.size());
    for (double one : values) squares_ += (one - mean) * (one - mean);
    freedom_ += static_cast<double>(values.size()) - 1.0;
  }
  std::optional<double> sd() const {
    if (!(freedom_ > 0.0)) return std::nullopt;
    return std::sqrt(squares_ / freedom_);
  }

 private:
  double squares_ = 0.0;
  double freedom_ = 0.0;
};

// Spread of value(y) within the levels for which `wanted` holds; a value that
// does not exist is left out.
template <class Wanted, class Value>
std::optional<double> pooled(std::span<const double> x,
                             std::span<const double> y, Wanted wanted,
                             Value value) {
  PooledSpread spread;
  for (std::size_t i = 0; i < x.size();) {
    std::vector<double> level;
    const double at = x[i];
    for (; i < x.size() && x[i] == at; ++i)
      if (const std::optional<double> one = value(y[i])) level.push_back(*one);
    if (wanted(at)) spread.add_level(level);
  }
  return spread.sd();
}

double lowest_above_zero(std::span<const double> x) {
  for (double one : x)
    if (one > 0.0) return one;
  return 0.0;
}

bool weigh_line(std::span<const double> x, std::span<const double> y,
                TwoComponentModel& model) {
  std::vector<double> weights;
  for (double one : x) {
    const double proportional = model.slope * one * model.proportional_sd;
    weights.push_back(1.0 / (model.additive_sd * model.additive_sd +
                             proportional * proportional));
  }
  const auto fit =
      fit_polynomial({x.begin(), x.end()}, {y.begin(), y.end()}, 0, 1, weights);
  if (!fit || !(fit->coefficients[1] > 0.0)) return false;
  model.intercept = fit->coefficients[0];
  model.slope = fit->coefficients[1];
  return true;
}

std::vector<double> parameters_of(const TwoComponentModel& model) {
  return {model.intercept, model.slope, std::log(model.additive_sd),
          std::log(model.proportional_sd)};
}

// There may be another hill where the additive error vanishes and the
// proportional one takes all: steps are kept from jumping over to it.
std::vector<double> longest_steps(const std::vector<double>& start) {
  return {std::exp(start[2]), 0.25 * start[1], 0.5, 0.5};
}

TwoComponentModel model_of(const MaximumLikelihood& top) {
  TwoComponentModel model;
  const std::size_t p = top.parameters.size();
  model.intercept = top.parameters[0];
  model.slope = top.parameters[1];
  model.additive_sd = std::exp(top.parameters[2]);
  model.additive_only = p == 3;
  model.proportional_sd =
      p == 3 ? kNoProportionalError : std::exp(top.parameters[3]);
  model.log_likelihood = top.value;
  for (std::size_t i = 0; i < p; ++i)
    for (std::size_t j = 0; j < p; ++j)
      model.covariance[i][j] = top.covariance[i * p + j];
  return model;
}

// The likelihood with the proportional error held at next to nothing.
std::optional<LikelihoodAt> without_proportional(
    std::span<const double> x, std::span<const double> y,
    std::span<const double> parameters) {
  const std::vector<double> all{parameters[0], parameters[1], parameters[2],
                                std::log(kNoProportionalError)};
  const auto full = two_component_likelihood(x, y, all);
  if (!full) return std::nullopt;
  LikelihoodAt part{full->value, {}, {}, {}};
  for (std::size_t i = 0; i < 3; ++i) {
    part.gradient.push_back(full->gradient[i]);
    part.scale.push_back(full->scale[i]);
    for (std::size_t j = 0; j < 3; ++j)
      part.information.push_back(full->information[4 * i + j]);
  }
  return part;
}

}  // namespace

double TwoComponentModel::relative_variance() const {
  const double variance = proportional_sd * proportional_sd;
  return std::exp(variance) * std::expm1(variance);
}

Outcome<TwoComponentModel> two_component_by_moments(std::span<const double> x,
                                                    std::span<const double> y) {
  const double lowest = lowest_above_zero(x);
  const auto same = [](double one) { return std::optional<double>(one); };
  const auto low = pooled(
      x, y, [&](double at) { return at <= kRange * lowest; }, same);
  if (!low)
    return NotApplicable{
        "no-replicates: no level up to 10 times the lowest has two standards"};
  if (!(*low > 0.0))
    return NotApplicable{
        "no-scatter: the replicates of the low levels are all equal"};

  TwoComponentModel model;
  model.by_moments = true;
  model.additive_sd = *low;
  model.proportional_sd = 0.1;
  for (int round = 0; round < kRounds; ++round) {
    if (!weigh_line(x, y, model))
      return NotApplicable{
          "slope-not-positive: no rising line through the standards"};
    const auto high = pooled(
        x, y, [&](double at) { return kRange * at >= x.back(); },
        [&](double one) {
          const double above = one - model.intercept;
          return above > 0.0 ? std::optional(std::log(above)) : std::nullopt;
        });
    if (!high)
      return NotApplicable{
          "no-replicates: no level from a tenth of the highest has two "
          "standards"};
    model.proportional_sd = std::max(*high, kLeastStart);
  }
  return model;
}

Outcome<TwoComponentModel> fit_two_component(std::span<const double> x,
                                             std::span<const double> y) {
  const Outcome<TwoComponentModel> moments = two_component_by_moments(x, y);
  if (!moments) return moments;
  const std::vector<double> start = parameters_of(*moments);
  const auto full = maximise_likelihood(
      [&](std::span<const double> at) {
        return two_component_likelihood(x, y, at);
      },
      start, longest_steps(start), kMostEvaluations);
  if (full && std::exp(full->parameters[3]) > kNoProportionalError)
    return model_of(*full);
  const auto part = maximise_likelihood(
      [&](std::span<const double> at) {
        return without_proportional(x, y, at);
      },
      {start[0], start[1], start[2]}, {}, kMostEvaluations);
  // Where more proportional error would be likelier, this is no maximum.
  if (!part) return NotApplicable{full ? part.reason() : full.reason()};
  const TwoComponentModel model = model_of(*part);
  const auto there = two_component_likelihood(x, y, parameters_of(model));
  if (!full && (!there || there->gradient[3] > 0.0))
    return NotApplicable{full.reason()};
  return model;
}

}  // namespace loqsmith
