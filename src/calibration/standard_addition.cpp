#include "loqsmith/calibration/standard_addition.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <set>
#include <string>

#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/least_squares.hpp"

namespace loqsmith {
namespace {

void take_line(Calibration& line, const LeastSquaresFit& fit) {
  line.intercept = fit.coefficients[0];
  line.slope = fit.coefficients[1];
  line.residual_sd = fit.residual_sd;
  line.r2 = fit.r2_centred;
  line.degrees_of_freedom = fit.degrees_of_freedom;
  for (std::size_t i = 0; i < 2; ++i) {
    for (std::size_t j = 0; j < 2; ++j) {
      line.covariance[i][j] = fit.covariance_of(i, j);
    }
  }
}

void back_calculate(Calibration& line) {
  for (StandardPoint& point : line.points) {
    point.weight = point.used ? 1.0 : 0.0;
    const double back = (point.response - line.intercept) / line.slope;
    point.back_calculated = back;
    if (!(point.concentration > 0.0)) continue;
    point.deviation_percent =
        100.0 * (back - point.concentration) / point.concentration;
  }
}

void set_levels(Calibration& line, const std::set<double>& added) {
  for (const double amount : added) {
    CalibrationLevel level{amount, 0, std::nullopt, true};
    double sum = 0.0;
    for (const StandardPoint& point : line.points) {
      if (!point.used || point.concentration != amount) continue;
      ++level.points;
      sum += *point.deviation_percent;
    }
    level.mean_deviation_percent = sum / static_cast<double>(level.points);
    line.levels.push_back(level);
  }
  line.lowest = *added.begin();
  line.highest = *added.rbegin();
  line.accepted_lowest = line.lowest;
  line.accepted_highest = line.highest;
}

// Means and centred sum of squares of the points that the line goes through.
struct Centre {
  double n = 0.0;
  double x = 0.0;
  double y = 0.0;
  double square_sum = 0.0;  // S_xx
};

Centre centre_of(const Calibration& line) {
  Centre centre;
  for (const StandardPoint& point : line.points) {
    if (!point.used) continue;
    centre.n += 1.0;
    centre.x += point.concentration;
    centre.y += point.response;
  }
  centre.x /= centre.n;
  centre.y /= centre.n;
  for (const StandardPoint& point : line.points) {
    if (!point.used) continue;
    const double distance = point.concentration - centre.x;
    centre.square_sum += distance * distance;
  }
  return centre;
}

}  // namespace

Outcome<Calibration> fit_addition_line(std::vector<StandardPoint> points) {
  std::vector<double> x;
  std::vector<double> y;
  std::set<double> added;
  bool has_sample = false;
  for (const StandardPoint& point : points) {
    if (!point.used) continue;
    x.push_back(point.concentration);
    y.push_back(point.response);
    if (point.concentration > 0.0) {
      added.insert(point.concentration);
    } else {
      has_sample = true;
    }
  }
  if (!has_sample) {
    return NotApplicable{
        "no-sample-response: no injection of the sample without addition"};
  }
  if (added.size() < 2) {
    return NotApplicable{"few-additions: " + std::to_string(added.size()) +
                         " different amounts added, 2 are needed"};
  }
  const Outcome<LeastSquaresFit> fit = fit_polynomial(x, y, 0, 1);
  if (!fit) return NotApplicable{"no-fit: " + fit.reason()};
  Calibration line;
  line.points = std::move(points);
  take_line(line, *fit);
  if (!(line.slope > 0.0)) {
    return NotApplicable{
        "slope-not-positive: the response does not grow with the added "
        "amount"};
  }
  back_calculate(line);
  set_levels(line, added);
  return line;
}

StandardAddition amount_by_addition(const Calibration& line) {
  const Centre centre = centre_of(line);
  const double b = line.slope;
  const double s = line.residual_sd;
  const double spread = centre.y * centre.y / (b * b * centre.square_sum);
  StandardAddition found;
  found.amount = line.intercept / b;
  found.standard_error = s / b * std::sqrt(1.0 / centre.n + spread);
  const double t = student_t_quantile(0.975, line.degrees_of_freedom);
  found.propagated_half_width = t * found.standard_error;
  const double g = t * t * s * s / (b * b * centre.square_sum);
  if (!(g < 1.0)) {
    found.interval = NotApplicable{
        "no-finite-interval: the slope does not differ from zero"};
    return found;
  }
  const double half =
      t * s * std::sqrt((1.0 - g) / centre.n + spread) / (b * (1.0 - g));
  const double middle = centre.y / (b * (1.0 - g)) - centre.x;
  const ConcentrationInterval interval{middle - half, middle + half};
  found.expanded_uncertainty =
      std::max(interval.upper - found.amount, found.amount - interval.lower);
  found.interval = interval;
  return found;
}

}  // namespace loqsmith
