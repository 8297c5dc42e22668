#include "loqsmith/calibration/lack_of_fit.hpp"

#include <algorithm>
#include <cmath>

#include "loqsmith/base/reading_figures.hpp"
#include "loqsmith/calibration/fitted_points.hpp"
#include "loqsmith/calibration/model_powers.hpp"
#include "loqsmith/calibration/replicate_groups.hpp"
#include "loqsmith/numerics/distributions.hpp"

namespace loqsmith {
namespace {

constexpr double kConfidence = 0.95;

std::string meaning_of(const DiagnosticTest& test) {
  const std::string figures = " (F " + figure(test.statistic) +
                              ", critical value " + figure(test.critical) + ")";
  return test.passed ? "the levels lie no further off the curve than their "
                       "replicates scatter" +
                           figures + ": the model fits"
                     : "the levels lie further off the curve than their "
                       "replicates scatter" +
                           figures + ": the model does not fit";
}

}  // namespace

Outcome<DiagnosticTest> lack_of_fit(const Calibration& calibration) {
  const FittedPoints points = fitted_points(calibration);
  const auto groups = weighted_replicate_groups(calibration.points);
  const int coefficients = model_powers(calibration.settings).count();
  const int levels = static_cast<int>(groups.size());
  const int within = static_cast<int>(points.size()) - levels;
  if (within < 1)
    return NotApplicable{"no-replicates: no level was injected twice"};
  if (levels <= coefficients)
    return NotApplicable{"few-levels: no more levels than coefficients"};

  double pure = 0.0;
  for (const ReplicateGroup& group : groups) pure += squares_within(group);
  double total = 0.0;
  for (double residual : points.weighted_residual) total += residual * residual;
  if (is_without_scatter(points, std::sqrt(pure / within)))
    return NotApplicable{"not-defined: all replicates agree"};

  DiagnosticTest test;
  test.name = "lack-of-fit";
  test.degrees_1 = levels - coefficients;
  test.degrees_2 = within;
  test.statistic =
      std::max(0.0, total - pure) / *test.degrees_1 / (pure / within);
  test.critical = f_quantile(kConfidence, *test.degrees_1, within);
  test.p = f_upper_tail(test.statistic, *test.degrees_1, within);
  test.passed = test.statistic <= test.critical;
  test.meaning = meaning_of(test);
  return test;
}

}  // namespace loqsmith
