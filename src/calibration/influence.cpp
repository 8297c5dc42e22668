#include "loqsmith/calibration/influence.hpp"

#include <algorithm>
#include <array>
#include <cmath>

#include "loqsmith/base/reading_figures.hpp"
#include "loqsmith/calibration/fitted_points.hpp"
#include "loqsmith/calibration/model_powers.hpp"
#include "loqsmith/numerics/distributions.hpp"

namespace loqsmith {
namespace {

constexpr double kSignificance = 0.05;
// Nearer to 1 than this a residual is rounding.
constexpr double kLeastFreedom = 1e-12;

// w v^T Cov v / s^2 of the row v = (1, x, x^2).
double leverage_at(const Calibration& calibration, double x, double weight) {
  const std::array<double, 3> row{1.0, x, x * x};
  double sum = 0.0;
  for (std::size_t i = 0; i < 3; ++i)
    for (std::size_t j = 0; j < 3; ++j)
      sum += row[i] * calibration.covariance[i][j] * row[j];
  return weight * sum / (calibration.residual_sd * calibration.residual_sd);
}

std::optional<double> deleted_residual(double standardised, int degrees) {
  const double rest = degrees - standardised * standardised;
  if (degrees < 2 || !(rest > kLeastFreedom * degrees)) return std::nullopt;
  return standardised * std::sqrt((degrees - 1) / rest);
}

template <class Larger>
const PointInfluence& largest(const std::vector<PointInfluence>& points,
                              Larger measure) {
  return *std::max_element(
      points.begin(), points.end(),
      [&](const auto& a, const auto& b) { return measure(a) < measure(b); });
}

DiagnosticTest test_of(const std::string& name, const PointInfluence& point,
                       double statistic, double critical) {
  DiagnosticTest test;
  test.name = name;
  test.statistic = statistic;
  test.critical = critical;
  test.passed = statistic <= critical;
  test.injection = point.injection;
  test.concentration = point.concentration;
  return test;
}

std::string standard_of(const PointInfluence& point) {
  return "the standard of injection " + std::to_string(point.injection) +
         " at " + figure(point.concentration);
}

}  // namespace

Outcome<std::vector<PointInfluence>> point_influence(
    const Calibration& calibration) {
  const FittedPoints points = fitted_points(calibration);
  const double s = calibration.residual_sd;
  if (is_without_scatter(points, s))
    return NotApplicable{"not-defined: the standards lie exactly on the curve"};
  const int p = model_powers(calibration.settings).count();
  const int degrees = calibration.degrees_of_freedom;
  const double cook_limit = f_quantile(0.5, p, degrees);

  std::vector<PointInfluence> influence;
  for (std::size_t i = 0; i < points.size(); ++i) {
    PointInfluence one;
    one.injection = points.injection[i];
    one.concentration = points.concentration[i];
    one.leverage =
        leverage_at(calibration, one.concentration, points.weight[i]);
    const double free = 1.0 - one.leverage;
    if (!(free > kLeastFreedom))
      return NotApplicable{
          "not-defined: one standard alone determines a coefficient"};
    one.standardised_residual =
        points.weighted_residual[i] / (s * std::sqrt(free));
    one.deleted_residual = deleted_residual(one.standardised_residual, degrees);
    one.cooks_distance = one.standardised_residual * one.standardised_residual *
                         one.leverage / (free * p);
    one.high_leverage =
        one.leverage > 2.0 * p / static_cast<double>(points.size());
    one.influential = one.cooks_distance > cook_limit;
    influence.push_back(one);
  }
  return influence;
}

Outcome<DiagnosticTest> largest_leverage(const Calibration& calibration) {
  const auto points = point_influence(calibration);
  if (!points) return NotApplicable{points.reason()};
  const auto n = static_cast<double>(points->size());
  const int p = model_powers(calibration.settings).count();
  if (!(n > 2.0 * p))
    return NotApplicable{
        "few-points: with so few standards each has a high leverage"};
  const PointInfluence& worst =
      largest(*points, [](const auto& one) { return one.leverage; });
  DiagnosticTest test = test_of("leverage", worst, worst.leverage, 2.0 * p / n);
  test.meaning = standard_of(worst) +
                 (test.passed ? " has the largest leverage, within the rule"
                              : " carries much of the curve alone") +
                 " (leverage " + figure(test.statistic) + ", limit " +
                 figure(test.critical) + ")";
  return test;
}

Outcome<DiagnosticTest> largest_cooks_distance(const Calibration& calibration) {
  const auto points = point_influence(calibration);
  if (!points) return NotApplicable{points.reason()};
  const int p = model_powers(calibration.settings).count();
  const int degrees = calibration.degrees_of_freedom;
  const PointInfluence& worst =
      largest(*points, [](const auto& one) { return one.cooks_distance; });
  DiagnosticTest test = test_of("cooks-distance", worst, worst.cooks_distance,
                                f_quantile(0.5, p, degrees));
  test.degrees_1 = p;
  test.degrees_2 = degrees;
  test.p = f_upper_tail(test.statistic, p, degrees);
  test.meaning =
      (test.passed ? "no standard moves the curve much; the most " : "") +
      standard_of(worst) +
      (test.passed ? "" : " moves the curve beyond what scatter explains") +
      " (Cook's distance " + figure(test.statistic) + ", limit " +
      figure(test.critical) + ")";
  return test;
}

Outcome<DiagnosticTest> outlying_residual(const Calibration& calibration) {
  const auto points = point_influence(calibration);
  if (!points) return NotApplicable{points.reason()};
  const int degrees = calibration.degrees_of_freedom - 1;
  if (degrees < 1)
    return NotApplicable{"few-points: the curve through the others is exact"};
  for (const PointInfluence& one : *points)
    if (!one.deleted_residual)
      return NotApplicable{"not-defined: all standards but that of injection " +
                           std::to_string(one.injection) +
                           " lie exactly on a curve"};
  const PointInfluence& worst = largest(*points, [](const auto& one) {
    return std::abs(one.standardised_residual);
  });
  const auto n = static_cast<double>(points->size());
  const double t = *worst.deleted_residual;
  DiagnosticTest test =
      test_of("outlying-residual", worst, std::abs(t),
              student_t_quantile(1.0 - kSignificance / (2.0 * n), degrees));
  test.degrees_1 = degrees;
  test.p = std::min(1.0, 2.0 * n * student_t_upper_tail(std::abs(t), degrees));
  test.meaning = standard_of(worst) +
                 (test.passed ? " lies furthest off the curve through the "
                                "others, within their scatter"
                              : " lies off the curve through the others") +
                 " (t " + figure(t) + ", critical value " +
                 figure(test.critical) + ")";
  return test;
}

}  // namespace loqsmith
