#include "loqsmith/calibration/residual_normality.hpp"

#include "loqsmith/base/reading_figures.hpp"
#include "loqsmith/calibration/influence.hpp"
#include "loqsmith/numerics/shapiro_wilk.hpp"

namespace loqsmith {
namespace {

constexpr double kSignificance = 0.05;
constexpr int kFewestDegrees = 3;

}  // namespace

Outcome<DiagnosticTest> residual_normality(const Calibration& calibration) {
  if (calibration.degrees_of_freedom < kFewestDegrees)
    return NotApplicable{
        "few-points: residuals with fewer than three degrees of freedom"};
  const auto influence = point_influence(calibration);
  if (!influence) return NotApplicable{influence.reason()};
  std::vector<double> residuals;
  for (const PointInfluence& point : *influence)
    residuals.push_back(point.standardised_residual);
  const Outcome<ShapiroWilk> found = shapiro_wilk(residuals);
  if (!found) return NotApplicable{found.reason()};

  DiagnosticTest test;
  test.name = "residual-normality";
  test.degrees_1 = static_cast<double>(residuals.size());
  test.statistic = found->w;
  test.critical = shapiro_wilk_critical(residuals.size(), kSignificance);
  test.p = found->p;
  test.passed = found->p >= kSignificance;
  test.meaning = std::string(test.passed ? "the residuals could be normal"
                                         : "the residuals do not look normal") +
                 " (W " + figure(test.statistic) + ", critical value " +
                 figure(test.critical) + ")";
  return test;
}

}  // namespace loqsmith
