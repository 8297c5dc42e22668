#include "loqsmith/judgement/order_statistics_regression.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/least_squares.hpp"
#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/numerics/normal.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kLeastMeasured = 3;

/// The results between one limit and the next.
struct LimitInterval {
  double limit = 0.0;
  std::size_t measured = 0;     ///< A
  std::size_t known_below = 0;  ///< B
  std::size_t censored = 0;     ///< C
  double above = 0.0;           ///< e, fraction above the limit
};

std::size_t count_below(const std::vector<double>& ascending, double x) {
  return static_cast<std::size_t>(
      std::lower_bound(ascending.begin(), ascending.end(), x) -
      ascending.begin());
}

std::vector<LimitInterval> intervals_of(const std::vector<double>& measured,
                                        const std::vector<double>& limits) {
  std::vector<LimitInterval> intervals;
  if (limits.empty() || measured.front() < limits.front()) {
    intervals.push_back({-std::numeric_limits<double>::infinity()});
  }
  for (const double limit : limits) {
    if (!intervals.empty() && intervals.back().limit == limit) continue;
    intervals.push_back({limit});
  }
  for (std::size_t j = 0; j < intervals.size(); ++j) {
    LimitInterval& one = intervals[j];
    const auto end = std::upper_bound(limits.begin(), limits.end(), one.limit);
    const auto at_or_below = static_cast<std::size_t>(end - limits.begin());
    const std::size_t measured_below = count_below(measured, one.limit);
    one.known_below = measured_below + at_or_below;
    one.censored = at_or_below - count_below(limits, one.limit);
    one.measured = (j + 1 < intervals.size()
                        ? count_below(measured, intervals[j + 1].limit)
                        : measured.size()) -
                   measured_below;
  }
  return intervals;
}

void set_fractions_above(std::vector<LimitInterval>& intervals) {
  double next = 0.0;
  for (auto one = intervals.rbegin(); one != intervals.rend(); ++one) {
    const auto a = static_cast<double>(one->measured);
    const auto b = static_cast<double>(one->known_below);
    // Nothing known below: the open start of the first interval.
    one->above = one->known_below == 0 ? 1.0 : next + a / (a + b) * (1 - next);
    next = one->above;
  }
}

/// Plotting positions of measured and censored results, interval by interval.
struct Positions {
  std::vector<double> measured;
  std::vector<double> censored;
};

Positions positions_of(const std::vector<LimitInterval>& intervals) {
  Positions positions;
  for (std::size_t j = 0; j < intervals.size(); ++j) {
    const LimitInterval& one = intervals[j];
    const double next = j + 1 < intervals.size() ? intervals[j + 1].above : 0.0;
    for (std::size_t i = 1; i <= one.measured; ++i) {
      positions.measured.push_back((1.0 - one.above) +
                                   (one.above - next) * static_cast<double>(i) /
                                       static_cast<double>(one.measured + 1));
    }
    for (std::size_t i = 1; i <= one.censored; ++i) {
      positions.censored.push_back((1.0 - one.above) * static_cast<double>(i) /
                                   static_cast<double>(one.censored + 1));
    }
  }
  return positions;
}

Outcome<OrderStatisticsFit> fit_line(std::vector<double> measured,
                                     const Positions& positions) {
  std::vector<double> quantiles;
  std::vector<double> logarithms;
  for (std::size_t i = 0; i < measured.size(); ++i) {
    quantiles.push_back(normal_quantile(positions.measured[i]));
    logarithms.push_back(std::log(measured[i]));
  }
  const Outcome<LeastSquaresFit> line =
      fit_polynomial(quantiles, logarithms, 0, 1);
  if (!line) return NotApplicable{line.reason()};
  OrderStatisticsFit fit;
  fit.intercept = line->coefficients[0];
  fit.slope = line->coefficients[1];
  if (!(fit.slope > 0.0)) {
    return NotApplicable{"slope-not-positive: the measured values do not rise"};
  }
  fit.measured_positions = positions.measured;
  fit.filled = std::move(measured);
  for (const double p : positions.censored) {
    fit.filled.push_back(
        std::exp(fit.intercept + fit.slope * normal_quantile(p)));
  }
  std::sort(fit.filled.begin(), fit.filled.end());
  return fit;
}

/// Weibull's plotting position turned about.
std::optional<double> percentile_of_ranks(const std::vector<double>& ascending,
                                          double p) {
  const double rank = p * static_cast<double>(ascending.size() + 1);
  if (!(rank >= 1.0) || rank > static_cast<double>(ascending.size())) {
    return std::nullopt;
  }
  const auto below = static_cast<std::size_t>(rank);
  const double lower = ascending[below - 1];
  if (below == ascending.size()) return lower;
  return lower +
         (rank - static_cast<double>(below)) * (ascending[below] - lower);
}

std::optional<double> standard_error_leaving_out_one(
    std::span<const CensoredValue> values) {
  std::vector<CensoredValue> ascending(values.begin(), values.end());
  std::sort(ascending.begin(), ascending.end(),
            [](const CensoredValue& a, const CensoredValue& b) {
              if (a.value != b.value) return a.value < b.value;
              return a.censoring < b.censoring;
            });
  std::vector<double> means;
  std::vector<CensoredValue> rest;
  for (std::size_t i = 0; i < ascending.size(); ++i) {
    const bool as_before = i > 0 &&
                           ascending[i].value == ascending[i - 1].value &&
                           ascending[i].censoring == ascending[i - 1].censoring;
    if (as_before) {
      means.push_back(means.back());
      continue;
    }
    rest = ascending;
    rest.erase(rest.begin() + static_cast<std::ptrdiff_t>(i));
    const Outcome<OrderStatisticsFit> fit = regress_on_order_statistics(rest);
    if (!fit) return std::nullopt;
    means.push_back(mean(fit->filled));
  }
  const auto n = static_cast<double>(means.size());
  return standard_deviation(means) * (n - 1.0) / std::sqrt(n);
}

std::string trouble_with(std::span<const CensoredValue> values) {
  for (const CensoredValue& one : values) {
    if (one.censoring == Censoring::Above) {
      return "above-range-present: the order of results beyond the range is "
             "not known";
    }
    if (!(one.value > 0.0)) {
      return "not-positive: a value or limit has no logarithm";
    }
  }
  const std::vector<double> measured = measured_values(values);
  if (measured.size() < kLeastMeasured) {
    return "too-few-measured: at least 3 values must be measured";
  }
  if (measured.front() == measured.back()) {
    return "all-equal: the measured values have no spread";
  }
  return {};
}

}  // namespace

Outcome<OrderStatisticsFit> regress_on_order_statistics(
    std::span<const CensoredValue> values) {
  if (std::string trouble = trouble_with(values); !trouble.empty()) {
    return NotApplicable{std::move(trouble)};
  }
  std::vector<double> limits;
  for (const CensoredValue& one : values) {
    if (one.censoring == Censoring::Below) limits.push_back(one.value);
  }
  std::sort(limits.begin(), limits.end());
  std::vector<double> measured = measured_values(values);
  std::vector<LimitInterval> intervals = intervals_of(measured, limits);
  set_fractions_above(intervals);
  return fit_line(std::move(measured), positions_of(intervals));
}

Outcome<CensoredEstimate> order_statistics_estimate(
    std::span<const CensoredValue> values) {
  const Outcome<OrderStatisticsFit> fit = regress_on_order_statistics(values);
  if (!fit) return NotApplicable{fit.reason()};
  CensoredEstimate estimate;
  estimate.mean = mean(fit->filled);
  estimate.standard_deviation = standard_deviation(fit->filled);
  for (std::size_t i = 0; i < kSummaryPercentiles.size(); ++i) {
    estimate.percentiles[i] =
        percentile_of_ranks(fit->filled, kSummaryPercentiles[i]);
  }
  estimate.standard_error = standard_error_leaving_out_one(values);
  if (!estimate.standard_error) {
    estimate.notes.emplace_back("too-few-for-upper-mean");
    return estimate;
  }
  const auto n = static_cast<double>(values.size());
  estimate.upper_mean =
      *estimate.mean + student_t_quantile(kUpperMeanConfidence, n - 1.0) *
                           *estimate.standard_error;
  return estimate;
}

}  // namespace loqsmith
