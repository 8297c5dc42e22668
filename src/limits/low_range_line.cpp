#include "loqsmith/limits/low_range_line.hpp"

#include <algorithm>
#include <cmath>

#include "loqsmith/limits/words.hpp"
#include "loqsmith/numerics/least_squares.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kLeastLevels = 4;
// Below this share of the largest response a scatter is rounding, not noise.
constexpr double kRoundingShare = 1e-12;
// 10 times 0.1 shall include 1.
constexpr double kEdge = 1.0 + 1e-9;

std::vector<const StandardPoint*> points_up_to(const Calibration& calibration,
                                               double highest) {
  std::vector<const StandardPoint*> points;
  for (const StandardPoint& point : calibration.points)
    if (point.used && point.concentration <= highest) points.push_back(&point);
  std::stable_sort(points.begin(), points.end(), [](auto a, auto b) {
    return a->concentration < b->concentration;
  });
  return points;
}

std::size_t levels_above_zero(const std::vector<double>& ascending) {
  std::size_t levels = 0;
  double last = 0.0;
  for (double concentration : ascending) {
    if (concentration > last) ++levels;
    last = concentration;
  }
  return levels;
}

bool is_rounding(double residual_sd, const std::vector<double>& responses) {
  double largest = 0.0;
  for (double response : responses)
    largest = std::max(largest, std::abs(response));
  return !(residual_sd > kRoundingShare * largest);
}

}  // namespace

double LowRangeLine::intercept_sd() const {
  return residual_sd * std::sqrt(leverage.at(0.0));
}

double LowRangeLine::blank_reading_sd(double replicates) const {
  return residual_sd * std::sqrt(1.0 / replicates + leverage.at(0.0));
}

Outcome<LowRangeLine> fit_low_range(const Calibration& calibration,
                                    std::optional<double> up_to) {
  const double highest =
      up_to ? *up_to * calibration.lowest * kEdge : calibration.highest;
  LowRangeLine line;
  for (const StandardPoint* point : points_up_to(calibration, highest)) {
    line.concentrations.push_back(point->concentration);
    line.responses.push_back(point->response);
  }
  line.levels = levels_above_zero(line.concentrations);
  if (line.levels < kLeastLevels)
    return NotApplicable{"few-low-levels: " + counted(line.levels, "level") +
                         " of standards up to " + figure(highest) +
                         ", a line in the range of the limit needs 4"};
  line.highest = line.concentrations.back();

  const bool zero =
      calibration.settings.intercept == CalibrationSettings::Intercept::Zero;
  const Outcome<LeastSquaresFit> fit =
      fit_polynomial(line.concentrations, line.responses, zero ? 1 : 0, 1);
  if (!fit) return NotApplicable{"no-line: " + fit.reason()};
  line.through_zero = zero;
  line.intercept = zero ? 0.0 : fit->coefficients.front();
  line.slope = fit->coefficients.back();
  line.leverage = leverage_of(line.concentrations, {}, zero);
  line.residual_sd = fit->residual_sd;
  line.degrees_of_freedom = fit->degrees_of_freedom;
  if (!(line.slope > 0.0))
    return NotApplicable{"slope-not-positive: the low standards do not rise"};
  if (is_rounding(line.residual_sd, line.responses))
    return NotApplicable{"no-scatter: the low standards lie exactly on a line"};
  return line;
}

}  // namespace loqsmith
