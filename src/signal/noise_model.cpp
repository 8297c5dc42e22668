#include "loqsmith/signal/noise_model.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <span>

#include "loqsmith/signal/autocovariance.hpp"
#include "loqsmith/signal/peak_free.hpp"
#include "loqsmith/signal/point_noise.hpp"
#include "loqsmith/signal/summits.hpp"

namespace loqsmith {
namespace {

constexpr double kReachWidths = 10.0;
constexpr std::size_t kFewestPoints = 20;
constexpr std::size_t kMostLags = 20;
constexpr double kCut = 3.5;

Residuals residuals_about_line(const Trace& near,
                               const std::vector<bool>& free) {
  NoiseStretch stretch;
  for (std::size_t i = 0; i < free.size(); ++i) {
    if (!free[i]) continue;
    stretch.minutes.push_back(near.minutes[i]);
    stretch.signal.push_back(near.signal[i]);
  }
  Residuals residuals;
  if (stretch.minutes.size() < kFewestPoints) return residuals;
  const LineNoise line = noise_about_line(stretch.minutes, stretch.signal);
  const double cut = kCut * line.standard_deviation;
  for (std::size_t i = 0; i < free.size(); ++i) {
    const double r =
        near.signal[i] - line.intercept - line.slope * near.minutes[i];
    const bool use = free[i] && std::abs(r) <= cut;
    residuals.values.push_back(use ? r : 0.0);
    residuals.used.push_back(use);
    if (use) ++residuals.count;
  }
  return residuals;
}

struct Creep {
  double variance = 0.0;
  double correlation = 0.0;
};

// Covariances at lags 1, 2, ... fitted by variance times correlation^lag.
Creep fit_creep(const std::vector<double>& covariances, double most) {
  constexpr int kSteps = 199;
  Creep best;
  double best_gain = 0.0;
  for (int step = 1; step <= kSteps; ++step) {
    const double rho = step / 200.0;
    double power = 1.0;
    double product = 0.0;
    double squares = 0.0;
    for (const double c : covariances) {
      power *= rho;
      product += c * power;
      squares += power * power;
    }
    const double variance = std::clamp(product / squares, 0.0, most);
    // By how much the sum of squares falls below that of no creep at all.
    const double gain = variance * (2.0 * product - variance * squares);
    if (gain > best_gain) {
      best_gain = gain;
      best = {variance, rho};
    }
  }
  return best;
}

}  // namespace

double NoiseModel::standard_deviation() const { return std::sqrt(variance()); }

double NoiseModel::point_to_point() const {
  const double r = correlation;
  const double share = (20.0 + r * (-30.0 + r * (12.0 - 2.0 * r))) / 20.0;
  return std::sqrt(white_variance + creeping_variance * share);
}

NoiseModel NoiseModel::scaled(double factor) const {
  const double square = factor * factor;
  return {square * white_variance, square * creeping_variance, correlation};
}

NoiseModel white_noise(double standard_deviation) {
  return {standard_deviation * standard_deviation, 0.0, 0.0};
}

NoiseModel fit_noise_model(const Trace& trace, double start_minutes,
                           double end_minutes, double width_half_minutes) {
  const double reach = kReachWidths * width_half_minutes;
  const Trace near =
      cut_trace(trace, start_minutes - reach, end_minutes + reach);
  const std::vector<bool> free =
      peak_free_points(near, start_minutes, end_minutes, width_half_minutes);
  const Residuals residuals = residuals_about_line(near, free);
  if (residuals.count < kFewestPoints) {
    return white_noise(point_to_point_noise(near.signal));
  }
  const double n = static_cast<double>(residuals.count);
  const double variance = autocovariance(residuals, 0) * n / (n - 2.0);
  std::vector<double> covariances;
  const std::size_t lags = std::min(kMostLags, residuals.count / 5);
  for (std::size_t lag = 1; lag <= lags; ++lag) {
    covariances.push_back(autocovariance(residuals, lag));
  }
  const Creep creep = fit_creep(covariances, variance);
  if (creep.variance * creep.correlation < 2.0 * variance / std::sqrt(n)) {
    return {variance, 0.0, 0.0};
  }
  return {variance - creep.variance, creep.variance, creep.correlation};
}

double weighted_noise(const std::vector<double>& weights,
                      const NoiseModel& noise) {
  double squares = 0.0;
  double crossed = 0.0;
  double carried = 0.0;
  // Most points of a stretch have no weight: only those between the first and
  // the last that have one matter.
  const auto counts = [](double weight) { return weight != 0.0; };
  const auto first = std::find_if(weights.begin(), weights.end(), counts);
  const auto last = std::find_if(weights.rbegin(), weights.rend(), counts);
  if (first == weights.end()) return 0.0;
  const std::span<const double> counting(first, last.base());
  for (const double weight : counting) squares += weight * weight;
  if (!(noise.creeping_variance > 0.0)) {
    return std::sqrt(std::max(0.0, noise.white_variance * squares));
  }
  for (const double weight : counting) {
    crossed += weight * carried;
    carried = noise.correlation * (carried + weight);
  }
  const double variance = noise.white_variance * squares +
                          noise.creeping_variance * (squares + 2.0 * crossed);
  return std::sqrt(std::max(0.0, variance));
}

}  // namespace loqsmith
