#include "loqsmith/calibration/curve_difference.hpp"

#include <algorithm>
#include <cstddef>
#include <string>

#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/least_squares.hpp"

namespace loqsmith {
namespace {

constexpr double kConfidence = 0.99;
constexpr double kRounding = 1e-24;  // of sum w y^2

struct Group {
  std::vector<double> x;
  std::vector<double> y;
  std::vector<double> weights;

  void add(const StandardPoint& point) {
    x.push_back(point.concentration);
    y.push_back(point.response);
    weights.push_back(point.weight);
  }
};

int lowest_power(const CalibrationSettings& settings) {
  const bool zero =
      settings.intercept == CalibrationSettings::Intercept::Zero ||
      settings.model == CalibrationSettings::Model::ResponseFactor;
  return zero ? 1 : 0;
}

int highest_power(const CalibrationSettings& settings) {
  return settings.model == CalibrationSettings::Model::Quadratic ? 2 : 1;
}

Outcome<LeastSquaresFit> fit(const Group& group,
                             const CalibrationSettings& settings) {
  return fit_polynomial(group.x, group.y, lowest_power(settings),
                        highest_power(settings), group.weights);
}

double value_at(const LeastSquaresFit& curve, int lowest, double x) {
  double value = 0.0;
  for (std::size_t i = curve.coefficients.size(); i-- > 0;) {
    value = value * x + curve.coefficients[i];
  }
  return lowest == 0 ? value : value * x;
}

double mean_difference_percent(const Calibration& common,
                               const LeastSquaresFit& earlier,
                               const LeastSquaresFit& later) {
  const int lowest = lowest_power(common.settings);
  double sum = 0.0;
  double n = 0.0;
  for (const CalibrationLevel& level : common.levels) {
    if (level.points == 0) continue;
    const double before = value_at(earlier, lowest, level.concentration);
    if (!(before > 0.0)) continue;
    const double after = value_at(later, lowest, level.concentration);
    sum += 100.0 * (after - before) / before;
    n += 1.0;
  }
  return n > 0.0 ? sum / n : 0.0;
}

double weighted_square_sum(const Group& group) {
  double sum = 0.0;
  for (std::size_t i = 0; i < group.y.size(); ++i) {
    sum += group.weights[i] * group.y[i] * group.y[i];
  }
  return sum;
}

}  // namespace

Outcome<CurveDifference> compare_curves(const Calibration& common,
                                        const std::vector<int>& later) {
  Group before;
  Group after;
  Group both;
  for (const StandardPoint& point : common.points) {
    if (!point.used) continue;
    const bool is_later =
        std::find(later.begin(), later.end(), point.injection) != later.end();
    (is_later ? after : before).add(point);
    both.add(point);
  }
  const auto whole = fit(both, common.settings);
  const auto first = fit(before, common.settings);
  const auto second = fit(after, common.settings);
  if (!whole || !first || !second) {
    return NotApplicable{
        "few-standards: too few standards on one side for a curve of its own"};
  }
  const double apart =
      first->weighted_residual_sum + second->weighted_residual_sum;
  if (!(apart > kRounding * weighted_square_sum(both))) {
    return NotApplicable{
        "not-defined: the standards do not scatter about their own curves"};
  }
  CurveDifference difference;
  difference.numerator_df = static_cast<int>(whole->coefficients.size());
  difference.denominator_df =
      first->degrees_of_freedom + second->degrees_of_freedom;
  // Rounding alone could make it negative.
  const double more = std::max(0.0, whole->weighted_residual_sum - apart);
  difference.f =
      (more / difference.numerator_df) / (apart / difference.denominator_df);
  difference.critical = f_quantile(kConfidence, difference.numerator_df,
                                   difference.denominator_df);
  difference.p = 1.0 - f_cdf(difference.f, difference.numerator_df,
                             difference.denominator_df);
  difference.mean_percent = mean_difference_percent(common, *first, *second);
  return difference;
}

}  // namespace loqsmith
