#include "loqsmith/calibration/mandel_test.hpp"

#include <algorithm>

#include "loqsmith/base/reading_figures.hpp"
#include "loqsmith/calibration/fitted_points.hpp"
#include "loqsmith/calibration/model_powers.hpp"
#include "loqsmith/calibration/replicate_groups.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/least_squares.hpp"

namespace loqsmith {
namespace {

constexpr double kConfidence = 0.99;

std::string meaning_of(double f, double critical, bool quadratic_in_use) {
  const std::string figures =
      " (F " + figure(f) + ", critical value " + figure(critical) + ")";
  const bool better = f > critical;
  if (quadratic_in_use)
    return better ? "the quadratic describes the standards better than a "
                    "straight line" +
                        figures
                  : "the quadratic describes the standards no better than a "
                    "straight line" +
                        figures + ": a straight line would do";
  return better ? "a quadratic would describe the standards better than the "
                  "straight line" +
                      figures
                : "a quadratic would describe the standards no better" +
                      figures + ": the straight line suffices";
}

}  // namespace

Outcome<DiagnosticTest> mandel_test(const Calibration& calibration) {
  const FittedPoints points = fitted_points(calibration);
  const int lowest = model_powers(calibration.settings).lowest;
  const std::size_t most_coefficients = lowest == 0 ? 3 : 2;
  if (points.size() <= most_coefficients)
    return NotApplicable{"few-points: a quadratic leaves no degree of freedom"};
  if (replicate_groups(calibration.points).size() < most_coefficients)
    return NotApplicable{"few-levels: too few for a quadratic"};
  const auto line = fit_polynomial(points.concentration, points.response,
                                   lowest, 1, points.weight);
  const auto curve = fit_polynomial(points.concentration, points.response,
                                    lowest, 2, points.weight);
  if (!line || !curve) return NotApplicable{"few-levels: no quadratic"};
  if (is_without_scatter(points, curve->residual_sd))
    return NotApplicable{
        "not-defined: a quadratic goes through all standards exactly"};

  const bool quadratic_in_use =
      calibration.settings.model == CalibrationSettings::Model::Quadratic;
  DiagnosticTest test;
  test.name = "mandel";
  test.degrees_1 = 1.0;
  test.degrees_2 = curve->degrees_of_freedom;
  const double gained =
      line->weighted_residual_sum - curve->weighted_residual_sum;
  test.statistic =
      std::max(0.0, gained) / (curve->residual_sd * curve->residual_sd);
  test.critical = f_quantile(kConfidence, 1.0, *test.degrees_2);
  test.p = f_upper_tail(test.statistic, 1.0, *test.degrees_2);
  test.passed = (test.statistic > test.critical) == quadratic_in_use;
  test.meaning = meaning_of(test.statistic, test.critical, quadratic_in_use);
  return test;
}

}  // namespace loqsmith
