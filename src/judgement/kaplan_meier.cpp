#include "loqsmith/judgement/kaplan_meier.hpp"

#include <algorithm>
#include <cmath>

#include "loqsmith/numerics/distributions.hpp"

namespace loqsmith {
namespace {

// Products of fractions come out beside 0.5 by some units in the last place.
constexpr double kProbabilityRounding = 1e-12;

/// One side of the division: measured values and limits, both ascending.
struct Side {
  std::vector<double> measured;
  std::vector<double> limits;
};

struct Sides {
  Side below;
  Side above;
};

std::vector<double> limits_of(std::span<const CensoredValue> values,
                              Censoring kind) {
  std::vector<double> limits;
  for (const CensoredValue& one : values) {
    if (one.censoring == kind) limits.push_back(one.value);
  }
  std::sort(limits.begin(), limits.end());
  return limits;
}

Sides divide(std::span<const CensoredValue> values) {
  Sides sides;
  sides.below.limits = limits_of(values, Censoring::Below);
  sides.above.limits = limits_of(values, Censoring::Above);
  std::vector<double> measured = measured_values(values);
  auto first_above = measured.end();
  if (!sides.above.limits.empty()) {
    first_above = sides.below.limits.empty()
                      ? measured.begin()
                      : std::upper_bound(measured.begin(), measured.end(),
                                         sides.below.limits.back());
  }
  sides.below.measured.assign(measured.begin(), first_above);
  sides.above.measured.assign(first_above, measured.end());
  return sides;
}

std::size_t count_at_or_below(const std::vector<double>& ascending, double x) {
  return static_cast<std::size_t>(
      std::upper_bound(ascending.begin(), ascending.end(), x) -
      ascending.begin());
}

std::size_t count_at_or_above(const std::vector<double>& ascending, double x) {
  return static_cast<std::size_t>(
      ascending.end() -
      std::lower_bound(ascending.begin(), ascending.end(), x));
}

std::vector<double> distinct(std::vector<double> ascending) {
  ascending.erase(std::unique(ascending.begin(), ascending.end()),
                  ascending.end());
  return ascending;
}

// From the largest down; `share` is the fraction of results on this side.
void step_down(const Side& side, double share, ProductLimit& into) {
  std::vector<double> values = distinct(side.measured);
  std::reverse(values.begin(), values.end());
  double fraction = 1.0;
  for (const double x : values) {
    DistributionStep step;
    step.value = x;
    step.at_or_below = share * fraction;
    step.at_risk =
        count_at_or_below(side.measured, x) + count_at_or_below(side.limits, x);
    step.measured = count_at_or_below(side.measured, x) +
                    count_at_or_above(side.measured, x) - side.measured.size();
    fraction *= static_cast<double>(step.at_risk - step.measured) /
                static_cast<double>(step.at_risk);
    into.steps.push_back(step);
  }
  std::reverse(into.steps.begin(), into.steps.end());
  into.mass_below = share * fraction;
  if (!side.limits.empty()) into.lowest_limit = side.limits.front();
}

// From the smallest up, above the fraction `below`.
void step_up(const Side& side, double below, ProductLimit& into) {
  double surviving = 1.0;
  for (const double x : distinct(side.measured)) {
    DistributionStep step;
    step.value = x;
    step.at_risk =
        count_at_or_above(side.measured, x) + count_at_or_above(side.limits, x);
    step.measured = count_at_or_below(side.measured, x) +
                    count_at_or_above(side.measured, x) - side.measured.size();
    surviving *= static_cast<double>(step.at_risk - step.measured) /
                 static_cast<double>(step.at_risk);
    step.at_or_below = below + (1.0 - below) * (1.0 - surviving);
    into.steps.push_back(step);
  }
  into.mass_above = (1.0 - below) * surviving;
}

/// Places and masses whose moments are taken.
struct Masses {
  std::vector<double> places;
  std::vector<double> fractions;  ///< F at each place
};

Masses masses_of(const ProductLimit& distribution) {
  Masses masses;
  if (distribution.mass_below > 0.0) {
    masses.places.push_back(distribution.lowest_limit);
    masses.fractions.push_back(distribution.mass_below);
  }
  for (const DistributionStep& step : distribution.steps) {
    masses.places.push_back(step.value);
    masses.fractions.push_back(step.at_or_below);
  }
  return masses;
}

double moment(const Masses& masses, double centre, int power) {
  double sum = 0.0;
  double before = 0.0;
  for (std::size_t i = 0; i < masses.places.size(); ++i) {
    const double from_centre = masses.places[i] - centre;
    sum += (masses.fractions[i] - before) *
           (power == 1 ? from_centre : from_centre * from_centre);
    before = masses.fractions[i];
  }
  return sum;
}

double variance_of_mean(const ProductLimit& distribution,
                        const Masses& masses) {
  double variance = 0.0;
  double area = 0.0;
  std::size_t place = 0;
  for (const DistributionStep& step : distribution.steps) {
    for (; place + 1 < masses.places.size() &&
           masses.places[place + 1] <= step.value;
         ++place) {
      area += masses.fractions[place] *
              (masses.places[place + 1] - masses.places[place]);
    }
    if (step.at_risk == step.measured) continue;
    const auto n = static_cast<double>(step.at_risk);
    const auto d = static_cast<double>(step.measured);
    variance += area * area * d / (n * (n - d));
  }
  const auto m = static_cast<double>(distribution.counts.measured);
  return variance * m / (m - 1.0);
}

void set_spread(CensoredEstimate& estimate, const ProductLimit& distribution,
                const Masses& masses) {
  const auto n = static_cast<double>(distribution.counts.all());
  if (distribution.counts.all() < 2) return;
  estimate.standard_deviation =
      std::sqrt(moment(masses, *estimate.mean, 2) * n / (n - 1.0));
  if (distribution.counts.above > 0) {
    estimate.notes.emplace_back("no-upper-mean-with-above-range");
    return;
  }
  if (distribution.counts.measured < 2) return;
  estimate.standard_error = std::sqrt(variance_of_mean(distribution, masses));
  estimate.upper_mean =
      *estimate.mean + student_t_quantile(kUpperMeanConfidence, n - 1.0) *
                           *estimate.standard_error;
}

}  // namespace

Outcome<ProductLimit> product_limit(std::span<const CensoredValue> values) {
  const Sides sides = divide(values);
  const std::vector<double>& lower = sides.below.limits;
  const std::vector<double>& upper = sides.above.limits;
  if (!lower.empty() && !upper.empty() && lower.back() > upper.front()) {
    return NotApplicable{
        "limits-overlap: a \"<\" limit lies above the end of a range that was "
        "exceeded"};
  }
  ProductLimit found;
  found.counts = count_censored(values);
  if (found.counts.measured == 0) {
    return NotApplicable{"nothing-measured: every result is censored"};
  }
  const std::size_t on_lower_side = sides.below.measured.size() + lower.size();
  const double share = static_cast<double>(on_lower_side) /
                       static_cast<double>(found.counts.all());
  if (!lower.empty()) found.divided_at = lower.back();
  step_down(sides.below, share, found);
  if (!upper.empty()) step_up(sides.above, share, found);
  return found;
}

std::optional<double> percentile_of(const ProductLimit& distribution,
                                    double p) {
  const double wanted = p - kProbabilityRounding;
  if (distribution.mass_below >= wanted) return std::nullopt;
  for (const DistributionStep& step : distribution.steps) {
    if (step.at_or_below >= wanted) return step.value;
  }
  return std::nullopt;
}

CensoredEstimate kaplan_meier_estimate(const ProductLimit& distribution) {
  CensoredEstimate estimate;
  for (std::size_t i = 0; i < kSummaryPercentiles.size(); ++i) {
    estimate.percentiles[i] =
        percentile_of(distribution, kSummaryPercentiles[i]);
  }
  if (distribution.mass_above > 0.0) {
    estimate.notes.emplace_back("mean-open-above");
    return estimate;
  }
  const Masses masses = masses_of(distribution);
  if (distribution.mass_below > 0.0) {
    estimate.notes.emplace_back("mean-at-most");
  }
  const double centre = masses.places.front();
  estimate.mean = centre + moment(masses, centre, 1);
  set_spread(estimate, distribution, masses);
  return estimate;
}

}  // namespace loqsmith
