#include "loqsmith/calibration/fitted_points.hpp"

#include <algorithm>
#include <cmath>

#include "loqsmith/calibration/inverse.hpp"

namespace loqsmith {
namespace {

constexpr double kRoundingShare = 1e-12;

}  // namespace

FittedPoints fitted_points(const Calibration& calibration) {
  std::vector<const StandardPoint*> used;
  for (const StandardPoint& point : calibration.points)
    if (point.used) used.push_back(&point);
  std::stable_sort(used.begin(), used.end(),
                   [](auto a, auto b) { return a->injection < b->injection; });

  FittedPoints points;
  for (const StandardPoint* point : used) {
    const double fitted =
        response_from_concentration(calibration, point->concentration);
    points.injection.push_back(point->injection);
    points.concentration.push_back(point->concentration);
    points.response.push_back(point->response);
    points.weight.push_back(point->weight);
    points.weighted_residual.push_back(std::sqrt(point->weight) *
                                       (point->response - fitted));
  }
  return points;
}

bool is_without_scatter(const FittedPoints& points, double residual_sd) {
  double largest = 0.0;
  for (std::size_t i = 0; i < points.size(); ++i)
    largest = std::max(
        largest, std::sqrt(points.weight[i]) * std::abs(points.response[i]));
  return !(residual_sd > kRoundingShare * largest);
}

}  // namespace loqsmith
