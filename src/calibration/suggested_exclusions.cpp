#include "loqsmith/calibration/suggested_exclusions.hpp"

#include <algorithm>
#include <map>

#include "loqsmith/base/reading_figures.hpp"
#include "loqsmith/calibration/fit_calibration.hpp"
#include "loqsmith/calibration/grubbs_test.hpp"
#include "loqsmith/calibration/influence.hpp"
#include "loqsmith/calibration/replicate_groups.hpp"

namespace loqsmith {
namespace {

constexpr double kSignificance = 0.01;

using Reasons = std::map<int, std::string>;  // by injection

void add_reason(Reasons& reasons, int injection, const std::string& why) {
  std::string& text = reasons[injection];
  text += text.empty() ? why : "; " + why;
}

void find_among_replicates(Reasons& reasons, const Calibration& calibration) {
  for (const ReplicateGroup& group : replicate_groups(calibration.points)) {
    const auto found = grubbs_test(group.responses, kSignificance);
    if (!found || !(found->g > found->critical)) continue;
    add_reason(reasons, group.injections[found->place],
               "outlier among the replicates of its level (Grubbs, G " +
                   figure(found->g) + ", critical value at 0.01 " +
                   figure(found->critical) + ")");
  }
}

void find_off_the_curve(Reasons& reasons, const Calibration& calibration) {
  const Outcome<DiagnosticTest> test = outlying_residual(calibration);
  if (!test || !(*test->p < kSignificance)) return;
  add_reason(reasons, *test->injection,
             "off the curve through the others (t " + figure(test->statistic) +
                 ", p " + figure(*test->p) + " over all standards)");
}

Outcome<Calibration> fit_without(const Calibration& calibration,
                                 int injection) {
  std::vector<StandardPoint> points = calibration.points;
  for (StandardPoint& point : points)
    if (point.injection == injection) point.used = false;
  return fit_calibration(std::move(points), calibration.settings);
}

}  // namespace

std::vector<SuggestedExclusion> suggest_exclusions(
    const Calibration& calibration) {
  Reasons reasons;
  find_among_replicates(reasons, calibration);
  find_off_the_curve(reasons, calibration);
  std::vector<SuggestedExclusion> suggested;
  for (const auto& [injection, why] : reasons) {
    const auto point = std::find_if(
        calibration.points.begin(), calibration.points.end(),
        [number = injection](const auto& p) { return p.injection == number; });
    suggested.push_back({injection, point->level, point->concentration, why,
                         fit_without(calibration, injection)});
  }
  return suggested;
}

}  // namespace loqsmith
