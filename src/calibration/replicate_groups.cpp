#include "loqsmith/calibration/replicate_groups.hpp"

#include <algorithm>
#include <cmath>

#include "loqsmith/calibration/calibration.hpp"
#include "loqsmith/numerics/mean.hpp"

namespace loqsmith {
namespace {

std::vector<ReplicateGroup> groups_of(const std::vector<StandardPoint>& points,
                                      bool weighted) {
  std::vector<ReplicateGroup> groups;
  for (const StandardPoint& point : points) {
    if (!point.used) continue;
    auto at = std::find_if(groups.begin(), groups.end(), [&](const auto& g) {
      return g.concentration == point.concentration;
    });
    if (at == groups.end()) {
      at = groups.emplace(groups.end());
      at->concentration = point.concentration;
    }
    at->responses.push_back(weighted ? std::sqrt(point.weight) * point.response
                                     : point.response);
    at->injections.push_back(point.injection);
  }
  std::sort(groups.begin(), groups.end(), [](const auto& a, const auto& b) {
    return a.concentration < b.concentration;
  });
  return groups;
}

}  // namespace

std::vector<ReplicateGroup> replicate_groups(
    const std::vector<StandardPoint>& points) {
  return groups_of(points, false);
}

std::vector<ReplicateGroup> weighted_replicate_groups(
    const std::vector<StandardPoint>& points) {
  return groups_of(points, true);
}

double squares_within(const ReplicateGroup& group) {
  const std::vector<double>& values = group.responses;
  if (std::all_of(values.begin(), values.end(),
                  [&](double v) { return v == values.front(); }))
    return 0.0;
  const double centre = mean(values);
  double sum = 0.0;
  for (double value : values) sum += (value - centre) * (value - centre);
  return sum;
}

}  // namespace loqsmith
