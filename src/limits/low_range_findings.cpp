#include "loqsmith/limits/low_range_findings.hpp"

#include <algorithm>
#include <cmath>
#include <span>

#include "loqsmith/limits/words.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/least_squares.hpp"
#include "loqsmith/numerics/mean.hpp"

namespace loqsmith {
namespace {

// A sum of squares with its degrees of freedom.
struct Pool {
  double squares = 0.0;
  double df = 0.0;
};

// Where each level's points begin, and the end.
std::vector<std::size_t> level_starts(const LowRangeLine& line) {
  std::vector<std::size_t> starts;
  for (std::size_t i = 0; i < line.concentrations.size(); ++i)
    if (i == 0 || line.concentrations[i] != line.concentrations[i - 1])
      starts.push_back(i);
  starts.push_back(line.concentrations.size());
  return starts;
}

Pool within_levels(const LowRangeLine& line,
                   const std::vector<std::size_t>& starts, std::size_t first,
                   std::size_t last) {
  Pool pool;
  for (std::size_t level = first; level < last; ++level) {
    const std::span<const double> values(line.responses.data() + starts[level],
                                         starts[level + 1] - starts[level]);
    if (values.size() < 2) continue;
    const double sd = standard_deviation(values);
    const double df = static_cast<double>(values.size()) - 1.0;
    pool.squares += df * sd * sd;
    pool.df += df;
  }
  return pool;
}

Pool about_own_line(const LowRangeLine& line, std::size_t begin,
                    std::size_t end) {
  const auto from = static_cast<std::ptrdiff_t>(begin);
  const auto to = static_cast<std::ptrdiff_t>(end);
  const auto fit = fit_polynomial(
      {line.concentrations.begin() + from, line.concentrations.begin() + to},
      {line.responses.begin() + from, line.responses.begin() + to}, 0, 1);
  if (!fit) return {};
  return {fit->weighted_residual_sum,
          static_cast<double>(fit->degrees_of_freedom)};
}

std::optional<VarianceRatio> compare(const Pool& low, const Pool& high) {
  if (!(low.df >= 1.0) || !(high.df >= 1.0) || !(low.squares > 0.0))
    return std::nullopt;
  const double ratio = (high.squares / high.df) / (low.squares / low.df);
  return VarianceRatio{ratio, 1.0 - f_cdf(ratio, high.df, low.df)};
}

}  // namespace

std::optional<VarianceRatio> variance_ratio(const LowRangeLine& line) {
  const std::vector<std::size_t> starts = level_starts(line);
  const std::size_t levels = starts.size() - 1;
  const std::size_t half = levels / 2;
  const Pool low = within_levels(line, starts, 0, half);
  const Pool high = within_levels(line, starts, levels - half, levels);
  if (low.df >= 1.0 && high.df >= 1.0) return compare(low, high);
  return compare(about_own_line(line, 0, starts[half]),
                 about_own_line(line, starts[levels - half], starts[levels]));
}

void judge_variance(LimitEstimate& estimate, const LowRangeLine& line) {
  const std::optional<VarianceRatio> found = variance_ratio(line);
  if (!found || !(found->probability < 0.05)) return;
  const Grade grade =
      found->probability < 0.01 ? Grade::NotValid : Grade::Caution;
  estimate.findings.push_back(
      {grade, "variance-grows",
       "the variance of the upper standards up to " + figure(line.highest) +
           " is " + figure(found->ratio) +
           " times that of the lower ones (by chance in " +
           percent_figure(found->probability) +
           " of cases): one standard deviation does not describe them"});
}

void judge_curvature(LimitEstimate& estimate, const LowRangeLine& line) {
  const auto curve = fit_polynomial(line.concentrations, line.responses, 0, 2);
  if (!curve || !(curve->standard_errors[2] > 0.0)) return;
  const double t = std::abs(curve->coefficients[2]) / curve->standard_errors[2];
  const double critical = student_t_quantile(0.995, curve->degrees_of_freedom);
  if (!(t > critical)) return;
  estimate.findings.push_back({Grade::Caution, "curvature-at-low-end",
                               "the standards up to " + figure(line.highest) +
                                   " lie on a curve (quadratic term: t " +
                                   figure(t) + ", 1 %: " + figure(critical) +
                                   "): part of the scatter is curvature"});
}

void judge_against_blanks(LimitEstimate& estimate, double residual_sd,
                          double degrees_of_freedom,
                          const BlankSample& blanks) {
  const double ratio = residual_sd / blanks.sd;
  const double critical =
      f_quantile(0.99, degrees_of_freedom, blanks.degrees_of_freedom());
  if (!(ratio * ratio > critical)) return;
  estimate.findings.push_back(
      {Grade::Caution, "residuals-exceed-blanks",
       "the standards scatter " + figure(ratio) +
           " times as much as the blanks (F test, 1 %): the limit is that of "
           "the standards, likely too high"});
}

}  // namespace loqsmith
