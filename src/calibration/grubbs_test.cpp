#include "loqsmith/calibration/grubbs_test.hpp"

#include <algorithm>
#include <cmath>

#include "loqsmith/base/reading_figures.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/mean.hpp"

namespace loqsmith {
namespace {

constexpr double kRoundingShare = 1e-12;

// 2 n times the tail of the t that belongs to G; nothing where G is as large
// as n values allow, because all others are equal.
std::optional<double> p_of(double g, double n) {
  const double left = (n - 1.0) * (n - 1.0) - n * g * g;
  if (!(left > kRoundingShare * n * n)) return std::nullopt;
  const double t = std::sqrt(n * (n - 2.0) * g * g / left);
  return std::min(1.0, 2.0 * n * student_t_upper_tail(t, n - 2.0));
}

Outcome<DiagnosticTest> test_level(const ReplicateGroup& group) {
  const Outcome<Grubbs> found = grubbs_test(group.responses);
  if (!found)
    return NotApplicable{found.reason() + " at " + figure(group.concentration)};
  DiagnosticTest test;
  test.name = "grubbs";
  test.statistic = found->g;
  test.critical = found->critical;
  test.p = found->p;
  test.degrees_1 = static_cast<double>(group.responses.size()) - 2.0;
  test.passed = found->g <= found->critical;
  test.concentration = group.concentration;
  test.injection = group.injections[found->place];
  test.meaning = "injection " + std::to_string(*test.injection) +
                 (test.passed ? " lies furthest from the mean of its level, "
                                "within the others' scatter"
                              : " is an outlier among the replicates of its "
                                "level") +
                 " at " + figure(group.concentration) + " (G " +
                 figure(test.statistic) + ", critical value " +
                 figure(test.critical) + ")";
  return test;
}

}  // namespace

double grubbs_critical(std::size_t count, double significance) {
  const auto n = static_cast<double>(count);
  const double t = student_t_quantile(1.0 - significance / (2.0 * n), n - 2.0);
  return (n - 1.0) / std::sqrt(n) * std::sqrt(t * t / (n - 2.0 + t * t));
}

Outcome<Grubbs> grubbs_test(std::span<const double> values,
                            double significance) {
  if (values.size() < 3)
    return NotApplicable{"few-points: the test needs three values"};
  const double centre = mean(values);
  const double s = standard_deviation(values);
  Grubbs found;
  double furthest = 0.0, largest = 0.0;
  for (std::size_t i = 0; i < values.size(); ++i) {
    const double distance = std::abs(values[i] - centre);
    largest = std::max(largest, std::abs(values[i]));
    if (!(distance > furthest)) continue;
    furthest = distance;
    found.place = i;
  }
  if (!(s > kRoundingShare * largest))
    return NotApplicable{"not-defined: all values are equal"};
  found.g = furthest / s;
  const auto p = p_of(found.g, static_cast<double>(values.size()));
  if (!p) return NotApplicable{"not-defined: all values but one are equal"};
  found.p = *p;
  found.critical = grubbs_critical(values.size(), significance);
  return found;
}

std::vector<NamedDiagnostic> grubbs_by_level(
    const std::vector<ReplicateGroup>& groups) {
  std::vector<NamedDiagnostic> tests;
  for (const ReplicateGroup& group : groups)
    if (group.responses.size() >= 3)
      tests.push_back({"grubbs", test_level(group)});
  if (tests.empty())
    tests.push_back(
        {"grubbs",
         NotApplicable{"no-replicates: no level was injected three times"}});
  return tests;
}

}  // namespace loqsmith
