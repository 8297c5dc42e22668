#include "loqsmith/calibration/fit_calibration.hpp"

#include <algorithm>
#include <cmath>
#include <string>

#include "loqsmith/calibration/inverse.hpp"
#include "loqsmith/calibration/model_powers.hpp"
#include "loqsmith/calibration/replicate_groups.hpp"
#include "loqsmith/calibration/weight.hpp"
#include "loqsmith/numerics/least_squares.hpp"

namespace loqsmith {
namespace {

std::string number_of_levels(std::size_t count) {
  return std::to_string(count) + (count == 1 ? " level" : " levels");
}

void add_note(StandardPoint& point, const std::string& word) {
  point.note += point.note.empty() ? word : ";" + word;
}

// What enters the fit, with its weight; a weight has no value at zero.
void assign_weights(Calibration& calibration) {
  for (StandardPoint& point : calibration.points) {
    point.weight = 0.0;
    if (!point.used) continue;
    const std::optional<double> weight =
        calibration_weight(calibration, point.concentration);
    if (weight) {
      point.weight = *weight;
    } else {
      point.used = false;
      add_note(point, "zero-level-unweighted-only");
    }
  }
}

std::vector<CalibrationLevel> levels_of(
    const std::vector<StandardPoint>& points) {
  std::vector<CalibrationLevel> levels;
  for (const StandardPoint& point : points) {
    if (!(point.concentration > 0.0)) continue;
    auto at = std::find_if(levels.begin(), levels.end(), [&](const auto& l) {
      return l.concentration == point.concentration;
    });
    if (at == levels.end()) {
      at = levels.emplace(levels.end());
      at->concentration = point.concentration;
    }
    if (point.used) ++at->points;
  }
  std::sort(levels.begin(), levels.end(), [](const auto& a, const auto& b) {
    return a.concentration < b.concentration;
  });
  return levels;
}

bool all_responses_equal(const std::vector<StandardPoint>& points) {
  const StandardPoint* first = nullptr;
  for (const StandardPoint& point : points) {
    if (!point.used) continue;
    if (first == nullptr) first = &point;
    if (point.response != first->response) return false;
  }
  return true;
}

Outcome<LeastSquaresFit> fit_used(const std::vector<StandardPoint>& points,
                                  ModelPowers powers) {
  std::vector<double> x, y, weights;
  for (const StandardPoint& point : points) {
    if (!point.used) continue;
    x.push_back(point.concentration);
    y.push_back(point.response);
    weights.push_back(point.weight);
  }
  return fit_polynomial(x, y, powers.lowest, powers.highest, weights);
}

void take_coefficients(Calibration& calibration, const LeastSquaresFit& fit,
                       ModelPowers powers) {
  std::array<double, 3> coefficients{};
  const auto lowest = static_cast<std::size_t>(powers.lowest);
  for (std::size_t i = 0; i < fit.coefficients.size(); ++i) {
    coefficients[lowest + i] = fit.coefficients[i];
    for (std::size_t j = 0; j < fit.coefficients.size(); ++j)
      calibration.covariance[lowest + i][lowest + j] = fit.covariance_of(i, j);
  }
  calibration.intercept = coefficients[0];
  calibration.slope = coefficients[1];
  calibration.curvature = coefficients[2];
  calibration.residual_sd = fit.residual_sd;
  calibration.r2 = powers.lowest == 0 ? fit.r2_centred : fit.r2_uncentred;
  calibration.degrees_of_freedom = fit.degrees_of_freedom;
}

// Back-calculation also of the standards that were left out: whoever left
// them out wants to see by how much they miss.
void back_calculate(Calibration& calibration) {
  for (StandardPoint& point : calibration.points) {
    const Outcome<double> found = point_on_curve(calibration, point.response);
    if (!found) continue;
    point.back_calculated = *found;
    if (point.concentration > 0.0)
      point.deviation_percent =
          100.0 * (*found - point.concentration) / point.concentration;
  }
}

// Nothing where a used point of the level has no back-calculation.
std::optional<double> mean_deviation(const Calibration& calibration,
                                     const CalibrationLevel& level) {
  double sum = 0.0;
  for (const StandardPoint& point : calibration.points) {
    if (!point.used || point.concentration != level.concentration) continue;
    if (!point.deviation_percent) return std::nullopt;
    sum += *point.deviation_percent;
  }
  if (level.points == 0) return std::nullopt;
  return sum / static_cast<double>(level.points);
}

// 100 sqrt(sum ((x' - x)/x)^2 / (n - p)): EPA 8000D, 11.5.6 (from memory).
std::optional<double> relative_standard_error(const Calibration& calibration,
                                              int coefficients) {
  double sum = 0.0;
  int n = 0;
  for (const StandardPoint& point : calibration.points) {
    if (!point.used || !(point.concentration > 0.0)) continue;
    if (!point.deviation_percent) return std::nullopt;
    sum += *point.deviation_percent * *point.deviation_percent;
    ++n;
  }
  if (n <= coefficients) return std::nullopt;
  return std::sqrt(sum / static_cast<double>(n - coefficients));
}

// Weight 1/s2 comes from the replicates; a mean response factor has its own.
std::optional<NotApplicable> set_variance(Calibration& calibration) {
  const CalibrationSettings& settings = calibration.settings;
  if (settings.weight != CalibrationSettings::Weight::InverseVariance ||
      settings.model == CalibrationSettings::Model::ResponseFactor)
    return std::nullopt;
  const auto variance =
      pooled_variance_function(replicate_groups(calibration.points));
  if (!variance) return NotApplicable{variance.reason()};
  calibration.variance = *variance;
  return std::nullopt;
}

// The curve has to rise from zero to the highest standard, otherwise one
// response would stand for two concentrations.
std::optional<NotApplicable> why_not_rising(const Calibration& calibration) {
  if (!(calibration.slope > 0.0))
    return NotApplicable{
        "slope-not-positive: the response does not grow with the "
        "concentration"};
  const double at_highest =
      calibration.slope + 2.0 * calibration.curvature * calibration.highest;
  if (!(at_highest > 0.0))
    return NotApplicable{
        "curve-turns-over: the quadratic curve turns over below the highest "
        "standard: leave out "
        "the highest levels or choose another model"};
  return std::nullopt;
}

std::optional<NotApplicable> why_not_enough(const Calibration& calibration,
                                            int coefficients) {
  const auto needed = static_cast<std::size_t>(coefficients) + 1;
  const std::size_t levels = calibration.used_levels();
  if (levels < needed)
    return NotApplicable{
        "few-levels: standards at " + number_of_levels(levels) +
        " above zero, this model needs at least " + std::to_string(needed)};
  if (all_responses_equal(calibration.points))
    return NotApplicable{"flat-response: all standards gave the same response"};
  return std::nullopt;
}

void set_range(Calibration& calibration) {
  bool first = true;
  for (const CalibrationLevel& level : calibration.levels) {
    if (level.points == 0) continue;
    if (first) calibration.lowest = level.concentration;
    calibration.highest = level.concentration;
    first = false;
  }
}

}  // namespace

Outcome<Calibration> fit_calibration(std::vector<StandardPoint> points,
                                     const CalibrationSettings& settings) {
  const ModelPowers powers = model_powers(settings);

  Calibration calibration;
  calibration.settings = settings;
  calibration.points = std::move(points);
  if (auto lacking = set_variance(calibration)) return *lacking;
  assign_weights(calibration);
  calibration.levels = levels_of(calibration.points);
  set_range(calibration);
  if (auto lacking = why_not_enough(calibration, powers.count()))
    return *lacking;

  const Outcome<LeastSquaresFit> fit = fit_used(calibration.points, powers);
  if (!fit) return NotApplicable{"no-fit: " + fit.reason()};
  take_coefficients(calibration, *fit, powers);
  if (auto falling = why_not_rising(calibration)) return *falling;

  back_calculate(calibration);
  calibration.relative_standard_error =
      relative_standard_error(calibration, powers.count());
  for (CalibrationLevel& level : calibration.levels)
    level.mean_deviation_percent = mean_deviation(calibration, level);
  accept_levels(calibration, std::nullopt, std::nullopt);
  return calibration;
}

}  // namespace loqsmith
