#include "loqsmith/limits/tolerance_interval.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>

#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/mean.hpp"

namespace loqsmith {
namespace {

using Runs = std::vector<std::vector<double>>;

std::vector<double> all_of_them(const Runs& runs) {
  std::vector<double> all;
  for (const std::vector<double>& run : runs)
    all.insert(all.end(), run.begin(), run.end());
  return all;
}

double square(double value) { return value * value; }

// n of a balanced design, and what stands for it in another.
double replicates_per_run(const Runs& runs, double results) {
  double squares = 0.0;
  for (const std::vector<double>& run : runs)
    squares += square(static_cast<double>(run.size()));
  const double free_runs = static_cast<double>(runs.size()) - 1.0;
  return (results - squares / results) / free_runs;
}

void set_mean_squares(ToleranceInterval& interval, const Runs& runs,
                      double results) {
  double between = 0.0, within = 0.0;
  for (const std::vector<double>& run : runs) {
    const double run_mean = mean(run);
    between +=
        static_cast<double>(run.size()) * square(run_mean - interval.mean);
    for (double value : run) within += square(value - run_mean);
    if (run.size() != runs.front().size()) interval.balanced = false;
  }
  const double p = static_cast<double>(runs.size());
  interval.mean_square_between = between / (p - 1.0);
  interval.mean_square_within = within / (results - p);
}

// What depends on R, and its limit where R is infinite.
void set_shape(ToleranceInterval& interval, double repeatability,
               double between_runs, double n, double p, double results) {
  interval.intermediate_sd = std::sqrt(repeatability + between_runs);
  if (!(repeatability > 0.0)) {
    interval.b_squared = 1.0 / n;
    interval.degrees_of_freedom = p - 1.0;
    return;
  }
  const double ratio = between_runs / repeatability;
  interval.variance_ratio = ratio;
  interval.b_squared = (ratio + 1.0) / (n * ratio + 1.0);
  interval.degrees_of_freedom =
      square(ratio + 1.0) /
      (square(ratio + 1.0 / n) / (p - 1.0) + (1.0 - 1.0 / n) / results);
}

}  // namespace

Outcome<ToleranceInterval> beta_expectation_interval(const Runs& runs,
                                                     double beta) {
  const std::vector<double> all = all_of_them(runs);
  if (runs.size() < 2) return NotApplicable{"few-runs: at least 2 are needed"};
  if (all.size() <= runs.size())
    return NotApplicable{"no-replicates: no run has two results"};
  if (std::all_of(all.begin(), all.end(),
                  [&](double value) { return value == all.front(); }))
    return NotApplicable{"all-equal: the results have no spread"};

  const double results = static_cast<double>(all.size());
  const double p = static_cast<double>(runs.size());
  const double n = replicates_per_run(runs, results);
  ToleranceInterval interval;
  interval.mean = mean(all);
  set_mean_squares(interval, runs, results);
  const double excess =
      (interval.mean_square_between - interval.mean_square_within) / n;
  if (excess >= 0.0)
    set_shape(interval, interval.mean_square_within, excess, n, p, results);
  else
    set_shape(interval, square(standard_deviation(all)), 0.0, n, p, results);
  const double t =
      student_t_quantile(0.5 * (1.0 + beta), interval.degrees_of_freedom);
  const double half_width =
      t * std::sqrt(1.0 + 1.0 / (results * interval.b_squared)) *
      interval.intermediate_sd;
  interval.lower = interval.mean - half_width;
  interval.upper = interval.mean + half_width;
  if (!std::isfinite(half_width))
    return NotApplicable{"not-finite: the results are too large"};
  return interval;
}

}  // namespace loqsmith
