#include "loqsmith/limits/bootstrap_ratio_bounds.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>

#include "loqsmith/limits/words.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kFewestRatios = 199;
constexpr double kTail = 0.025;

// Value of rank p (n + 1), between neighbours in proportion.
double ranked(const std::vector<double>& sorted, double p) {
  const double rank = p * (static_cast<double>(sorted.size()) + 1.0) - 1.0;
  const double whole = std::floor(rank);
  const std::size_t below = static_cast<std::size_t>(whole);
  const std::size_t above = std::min(below + 1, sorted.size() - 1);
  if (std::isinf(sorted[above])) return sorted[above];
  return sorted[below] + (rank - whole) * (sorted[above] - sorted[below]);
}

bool is_usable(const std::optional<double>& ratio) {
  return ratio && *ratio > 0.0;
}

// Bounds of one limit; none, and a note, where too many worlds lack it.
void set_bounds(LimitEstimate& estimate, const std::string& which,
                const std::optional<double>& limit, std::vector<double> ratios,
                std::optional<double>& lower, std::optional<double>& upper) {
  if (!limit) return;
  const std::size_t wanted = static_cast<std::size_t>(kBootstrapDraws);
  const std::size_t lacking = wanted - ratios.size();
  if (100 * lacking > wanted) {
    estimate.findings.push_back(
        {Grade::Note, "bounds-absent",
         "of " + counted(wanted, "draw") + ", " + std::to_string(lacking) +
             " have no " + which + " limit: it has no confidence bounds"});
    return;
  }
  const auto bounds = bootstrap_ratio_bounds(*limit, std::move(ratios));
  if (!bounds) return;
  if (std::isfinite(bounds->upper)) upper = bounds->upper;
  if (bounds->lower > 0.0) {
    lower = bounds->lower;
    return;
  }
  estimate.findings.push_back(
      {Grade::Note, "bounds-absent",
       "the true " + which +
           " limit may lie at or below zero: it has no lower bound"});
}

}  // namespace

Outcome<RatioBounds> bootstrap_ratio_bounds(double limit,
                                            std::vector<double> ratios) {
  if (ratios.size() < kFewestRatios)
    return NotApplicable{"few-draws: " + counted(ratios.size(), "draw") + ", " +
                         std::to_string(kFewestRatios) + " are needed"};
  std::sort(ratios.begin(), ratios.end());
  return RatioBounds{limit / ranked(ratios, 1.0 - kTail),
                     limit / ranked(ratios, kTail)};
}

void set_bootstrap_bounds(LimitEstimate& estimate, std::string_view stream,
                          const RatioDraw& draw, const std::string& coverage) {
  RandomStream random(stream);
  std::vector<double> detection, quantitation;
  for (int i = 0; i < kBootstrapDraws; ++i) {
    const DrawnRatios ratios = draw(random);
    if (is_usable(ratios.detection)) detection.push_back(*ratios.detection);
    if (is_usable(ratios.quantitation))
      quantitation.push_back(*ratios.quantitation);
  }
  set_bounds(estimate, "detection", estimate.detection, std::move(detection),
             estimate.detection_lower, estimate.detection_upper);
  set_bounds(estimate, "quantitation", estimate.quantitation,
             std::move(quantitation), estimate.quantitation_lower,
             estimate.quantitation_upper);
  estimate.terms.push_back({"bootstrap draws for the bounds, random stream \"" +
                                std::string(stream) + "\"",
                            static_cast<double>(kBootstrapDraws), ""});
  if (coverage.empty()) return;
  estimate.findings.push_back(
      {Grade::Note, "bounds-approximate",
       "the confidence bounds are approximate: " + coverage});
}

double drawn_chi_square(RandomStream& random, int degrees_of_freedom) {
  // Two degrees of freedom make an exponential distribution.
  double sum = 0.0;
  for (int pair = 0; pair < degrees_of_freedom / 2; ++pair)
    sum -= 2.0 * std::log(random.uniform());
  if (degrees_of_freedom % 2 == 0) return sum;
  const double last = random.normal();
  return sum + last * last;
}

}  // namespace loqsmith
