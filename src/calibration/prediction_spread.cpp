#include "loqsmith/calibration/prediction_spread.hpp"

#include <algorithm>

#include "loqsmith/calibration/inverse.hpp"
#include "loqsmith/calibration/weight.hpp"

namespace loqsmith {
namespace {

using Weight = CalibrationSettings::Weight;

bool has_an_additive_part_beside(const Calibration& calibration) {
  const CalibrationSettings& settings = calibration.settings;
  if (!calibration.blanks || !is_weighted(settings)) return false;
  if (!(calibration.residual_sd > 0.0)) return false;
  return settings.model == CalibrationSettings::Model::ResponseFactor ||
         settings.weight != Weight::InverseVariance;
}

// 1 / w, the weight not taken below the lowest level.
double law_at(const Calibration& calibration, double concentration) {
  const double at = std::max(concentration, calibration.lowest);
  return 1.0 / calibration_weight(calibration, at).value();
}

}  // namespace

PredictionSpread::PredictionSpread(const Calibration& calibration,
                                   int replicates)
    : calibration_(calibration), replicates_(replicates) {
  if (has_an_additive_part_beside(calibration)) separate_additive_part();
}

double PredictionSpread::variance_at(double concentration) const {
  if (!used_.empty()) {
    const Parts parts = parts_at(concentration);
    return parts.additive + parts.proportional;
  }
  const double sd = response_sd_at(calibration_, concentration);
  return sd * sd / replicates_ + curve_variance(calibration_, concentration);
}

double PredictionSpread::degrees_at(double concentration) const {
  const double of_fit = calibration_.degrees_of_freedom;
  if (used_.empty()) return of_fit;
  const Parts parts = parts_at(concentration);
  const double sum = parts.additive + parts.proportional;
  return sum * sum /
         (parts.additive * parts.additive /
              calibration_.blanks->degrees_of_freedom +
          parts.proportional * parts.proportional / of_fit);
}

// w_i v(x)^T (X^T W X)^-1 v(x_i)
double PredictionSpread::share_of(const StandardPoint& point,
                                  double concentration) const {
  const std::array<double, 3> at{1.0, concentration,
                                 concentration * concentration};
  const std::array<double, 3> from{1.0, point.concentration,
                                   point.concentration * point.concentration};
  double sum = 0.0;
  for (std::size_t i = 0; i < 3; ++i)
    for (std::size_t j = 0; j < 3; ++j)
      sum += at[i] * calibration_.covariance[i][j] * from[j];
  return point.weight * sum /
         (calibration_.residual_sd * calibration_.residual_sd);
}

PredictionSpread::Parts PredictionSpread::parts_at(double concentration) const {
  double blanks = 1.0 / replicates_;
  double weights = law_at(calibration_, concentration) / replicates_;
  for (const StandardPoint* point : used_) {
    const double share = share_of(*point, concentration);
    blanks += share * share;
    weights += share * share / point->weight;
  }
  const double sd = calibration_.blanks->sd;
  return {sd * sd * blanks, q2_ * weights};
}

double PredictionSpread::squares_over_variance(double q2) const {
  const double additive = calibration_.blanks->sd * calibration_.blanks->sd;
  double sum = 0.0;
  for (const StandardPoint* point : used_) {
    const double off =
        point->response -
        response_from_concentration(calibration_, point->concentration);
    sum += off * off / (additive + q2 / point->weight);
  }
  return sum;
}

// The sum falls as q grows: at s_w it is n - p at most, for additive >= 0.
void PredictionSpread::separate_additive_part() {
  for (const StandardPoint& point : calibration_.points)
    if (point.used) used_.push_back(&point);
  const double wanted = calibration_.degrees_of_freedom;
  if (calibration_.blanks->sd > 0.0 && squares_over_variance(0.0) <= wanted)
    return;  // the blanks' scatter explains all of it
  double low = 0.0;
  double high = calibration_.residual_sd * calibration_.residual_sd;
  for (;;) {
    const double middle = 0.5 * (low + high);
    if (middle <= low || middle >= high) break;
    (squares_over_variance(middle) > wanted ? low : high) = middle;
  }
  q2_ = high;
}

}  // namespace loqsmith
