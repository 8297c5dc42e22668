#include "loqsmith/calibration/weight_advice.hpp"

#include <cmath>

#include "loqsmith/base/reading_figures.hpp"
#include "loqsmith/calibration/fit_calibration.hpp"

namespace loqsmith {
namespace {

using Weight = CalibrationSettings::Weight;

constexpr double kDecade = 10.0;
// A sum smaller by less than this share is chance.
constexpr double kWorthwhile = 0.8;

std::string word_of(Weight weight) {
  switch (weight) {
    case Weight::None:
      return "none";
    case Weight::InverseX:
      return "1/x";
    case Weight::InverseXSquared:
      return "1/x2";
    case Weight::InverseVariance:
      return "1/s2";
  }
  return {};
}

// The standards in use, as they were before any weight left one out.
std::vector<StandardPoint> used_points(const Calibration& calibration) {
  std::vector<StandardPoint> points;
  for (const StandardPoint& point : calibration.points)
    if (point.used) points.push_back(point);
  return points;
}

Outcome<double> sum_of_relative_errors(const Calibration& fitted) {
  double sum = 0.0;
  for (const StandardPoint& point : fitted.points) {
    if (!point.used || !(point.concentration > 0.0)) continue;
    if (!point.deviation_percent)
      return NotApplicable{"a standard lies beyond the curve"};
    sum += std::abs(*point.deviation_percent);
  }
  return sum;
}

WeightCandidate candidate(const std::vector<StandardPoint>& points,
                          CalibrationSettings settings, Weight weight) {
  settings.weight = weight;
  WeightCandidate found;
  found.weight = weight;
  const Outcome<Calibration> fit = fit_calibration(points, settings);
  if (fit)
    found.sum_relative_error_percent = sum_of_relative_errors(*fit);
  else
    found.sum_relative_error_percent = NotApplicable{fit.reason()};
  return found;
}

const WeightCandidate* least_of(const std::vector<WeightCandidate>& all) {
  const WeightCandidate* least = nullptr;
  for (const WeightCandidate& one : all)
    if (one.sum_relative_error_percent &&
        (least == nullptr ||
         *one.sum_relative_error_percent < *least->sum_relative_error_percent))
      least = &one;
  return least;
}

std::string comparison(const std::vector<WeightCandidate>& all) {
  std::string text;
  for (const WeightCandidate& one : all) {
    if (!one.sum_relative_error_percent) continue;
    text += (text.empty() ? "" : ", ") + word_of(one.weight) + " " +
            figure(*one.sum_relative_error_percent) + " %";
  }
  return "sum of relative back-calculation errors by weight: " + text;
}

std::string advice_of(const WeightAdvice& advice, double span) {
  std::string text = comparison(advice.candidates);
  if (advice.unweighted_over_a_decade)
    text += "; unweighted over a factor of " + figure(span) +
            " the low levels count for little: consider a weight";
  if (!advice.advises_change) return text + "; no change is advised";
  if (advice.least && *advice.least != advice.in_use)
    text += "; " + word_of(*advice.least) + " errs least";
  return text;
}

}  // namespace

WeightAdvice advise_weight(const Calibration& calibration) {
  WeightAdvice advice;
  advice.in_use = calibration.settings.weight;
  if (calibration.settings.model ==
      CalibrationSettings::Model::ResponseFactor) {
    advice.advice = "a mean response factor has its weight by definition";
    return advice;
  }
  const std::vector<StandardPoint> points = used_points(calibration);
  for (Weight weight : {Weight::None, Weight::InverseX, Weight::InverseXSquared,
                        Weight::InverseVariance})
    advice.candidates.push_back(
        candidate(points, calibration.settings, weight));

  const double span = calibration.highest / calibration.lowest;
  advice.unweighted_over_a_decade =
      advice.in_use == Weight::None && span > kDecade;
  advice.advises_change = advice.unweighted_over_a_decade;
  const WeightCandidate* least = least_of(advice.candidates);
  if (least != nullptr) advice.least = least->weight;
  const Outcome<double> own = sum_of_relative_errors(calibration);
  if (least != nullptr && own &&
      *least->sum_relative_error_percent < kWorthwhile * *own)
    advice.advises_change = true;
  advice.advice = advice_of(advice, span);
  return advice;
}

}  // namespace loqsmith
