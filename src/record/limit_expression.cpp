#include <cmath>
#include <optional>
#include <string_view>
#include <vector>

#include "loqsmith/record/explanation.hpp"

namespace loqsmith {
namespace {

struct Candidate {
  std::string expression;
  double value = 0.0;
};

std::optional<double> term(const LimitEstimate& estimate,
                           std::string_view name) {
  for (const LimitTerm& one : estimate.terms) {
    if (one.name == name) return one.value;
  }
  return std::nullopt;
}

// Procedures whose limit is a multiple of a spread, in concentration where
// there is no slope to divide by.
struct SpreadTerms {
  std::string_view factor;  // empty: the detection or quantitation factor
  std::string_view spread;
  std::string_view slope;
};

constexpr SpreadTerms kSpreads[] = {
    {"", "standard deviation of the blanks", "slope at zero"},
    {"", "residual standard deviation of the low line",
     "slope of the low line"},
    {"", "standard deviation used (the larger)", "slope"},
    {"", "standard deviation of the intercept", "slope of the low line"},
    {"", "predicted response noise (root mean square)", "slope at zero"},
    {"", "standard deviation of what is reported", ""},
    {"Student's t of the spikes", "standard deviation of the spikes", ""},
};

std::optional<double> factor_of(const LimitEstimate& estimate,
                                bool quantitation) {
  return term(estimate,
              quantitation ? "quantitation factor" : "detection factor");
}

std::vector<Candidate> multiples_of_spread(const LimitEstimate& estimate,
                                           bool quantitation) {
  std::vector<Candidate> found;
  for (const SpreadTerms& names : kSpreads) {
    const auto factor = names.factor.empty() ? factor_of(estimate, quantitation)
                                             : term(estimate, names.factor);
    const auto spread = term(estimate, names.spread);
    if (!factor || !spread) continue;
    Candidate one{in_expression(*factor) + " x " + in_expression(*spread),
                  *factor * *spread};
    if (!names.slope.empty()) {
      const auto slope = term(estimate, names.slope);
      if (!slope) continue;
      one.expression += " / " + in_expression(*slope);
      one.value /= *slope;
    }
    found.push_back(std::move(one));
  }
  return found;
}

// With the blanks' mean: what the blanks show above the intercept is added.
void add_blank_mean(std::vector<Candidate>& found,
                    const LimitEstimate& estimate, bool quantitation) {
  const auto factor = factor_of(estimate, quantitation);
  const auto mean = term(estimate, "mean of the blanks");
  const auto sd = term(estimate, "standard deviation of the blanks");
  const auto intercept = term(estimate, "intercept");
  const auto slope = term(estimate, "slope at zero");
  if (!factor || !mean || !sd || !intercept || !slope) return;
  found.push_back({"(" + in_expression(*mean) + " - " +
                       in_expression(*intercept) + " + " +
                       in_expression(*factor) + " x " + in_expression(*sd) +
                       ") / " + in_expression(*slope),
                   (*mean - *intercept + *factor * *sd) / *slope});
}

// The height at which the line of heights has the wanted ratio; S/N is 2 H / h
// or H / h, as the method's measure says.
void add_noise_ratio(std::vector<Candidate>& found,
                     const LimitEstimate& estimate, bool quantitation) {
  auto noise = term(estimate, "noise h, peak to peak");
  if (!noise) noise = term(estimate, "noise, standard deviation");
  const auto ratio =
      term(estimate, quantitation ? "quantitation ratio" : "detection ratio");
  const auto intercept = term(estimate, "intercept of the heights");
  const auto slope = term(estimate, "slope of the heights");
  if (!noise || !ratio || !intercept || !slope) return;
  const std::string height =
      in_expression(*noise) + " x " + in_expression(*ratio);
  const std::string rest =
      " - " + in_expression(*intercept) + ") / " + in_expression(*slope);
  found.push_back(
      {"(" + height + rest, (*noise * *ratio - *intercept) / *slope});
  found.push_back({"(" + height + " / 2" + rest,
                   (*noise * *ratio / 2.0 - *intercept) / *slope});
}

}  // namespace

std::string limit_expression(const LimitEstimate& estimate, bool quantitation) {
  const std::optional<double>& limit =
      quantitation ? estimate.quantitation : estimate.detection;
  if (!limit) return {};
  std::vector<Candidate> candidates =
      multiples_of_spread(estimate, quantitation);
  add_blank_mean(candidates, estimate, quantitation);
  add_noise_ratio(candidates, estimate, quantitation);
  constexpr double kArithmetic = 1e-14;
  for (Candidate& one : candidates) {
    if (std::abs(one.value - *limit) <= kArithmetic * *limit) {
      return std::move(one.expression);
    }
  }
  return {};
}

}  // namespace loqsmith
