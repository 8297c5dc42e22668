#include "loqsmith/signal/trace_noise.hpp"

#include <algorithm>
#include <cmath>
#include <string>

#include "loqsmith/signal/summits.hpp"

namespace loqsmith {
namespace {

constexpr double kReachWidths = 4.0;
constexpr std::size_t kNextLags = 20;  // all of them; beyond, every n-th
constexpr std::size_t kFarLags = 80;
constexpr double kShortestMemory = 0.3;  // points
constexpr double kLongestMemoryWidths = 5.0;
constexpr double kMemoryStep = 1.1;
constexpr double kLeastGain = 6.0;
constexpr int kRounds = 3;

struct Lagged {
  std::vector<std::size_t> lags;
  std::vector<double> covariances;
  double variance = 0.0;
};

Lagged covariances_up_to(const Residuals& residuals, std::size_t reach) {
  Lagged lagged;
  lagged.variance = autocovariance(residuals, 0);
  const std::size_t stride =
      reach > kNextLags + kFarLags ? (reach - kNextLags) / kFarLags : 1;
  for (std::size_t lag = 1; lag <= reach; lag += lag < kNextLags ? 1 : stride) {
    lagged.lags.push_back(lag);
    lagged.covariances.push_back(autocovariance(residuals, lag));
  }
  return lagged;
}

struct Creep {
  double variance = 0.0;
  double correlation = 0.0;
  double gain = 0.0;  // fall of the sum of squares against no creep
};

Creep creep_of_memory(const Lagged& lagged, double memory, double bias) {
  const double rho = std::exp(-1.0 / memory);
  double product = 0.0;
  double squares = 0.0;
  std::size_t lag_before = 0;
  double power = 1.0;
  double far_step = 0.0;
  for (std::size_t k = 0; k < lagged.lags.size(); ++k) {
    const std::size_t step = lagged.lags[k] - lag_before;
    if (step > 1 && far_step == 0.0) {
      far_step = std::exp(-static_cast<double>(step) / memory);
    }
    power *= step > 1 ? far_step : rho;
    lag_before = lagged.lags[k];
    product += (lagged.covariances[k] + bias) * power;
    squares += power * power;
  }
  const double most = lagged.variance + bias;
  const double variance = std::clamp(product / squares, 0.0, most);
  return {variance, rho, variance * (2.0 * product - variance * squares)};
}

Creep best_creep(const Lagged& lagged, double longest, double bias) {
  Creep best;
  for (double memory = kShortestMemory; memory <= longest;
       memory *= kMemoryStep) {
    const Creep creep = creep_of_memory(lagged, memory, bias);
    if (creep.gain > best.gain) best = creep;
  }
  return best;
}

// Mean variance that a least-squares parabola through so many points takes
// up: of the noise along the first three orthogonal polynomials.
double taken_by_parabola(const NoiseModel& noise, double points) {
  const auto n = static_cast<std::size_t>(std::max(4.0, points));
  const double count = static_cast<double>(n);
  std::vector<double> level(n, 1.0);
  std::vector<double> slope(n);
  std::vector<double> bend(n);
  for (std::size_t i = 0; i < n; ++i) {
    slope[i] = static_cast<double>(i) - 0.5 * (count - 1.0);
    bend[i] = slope[i] * slope[i] - (count * count - 1.0) / 12.0;
  }
  double taken = 0.0;
  for (const std::vector<double>* one : {&level, &slope, &bend}) {
    double squares = 0.0;
    for (const double value : *one) squares += value * value;
    const double spread = weighted_noise(*one, noise);
    taken += spread * spread / squares;
  }
  return taken / count;
}

std::string widths_words(double minutes, double width) {
  const auto widths = static_cast<int>(minutes / width);
  return "noise-trace-short: " + std::to_string(widths) +
         " widths at half height of the trace are free of peaks, at least " +
         std::to_string(static_cast<int>(kLeastPeakFreeWidths)) + " are needed";
}

}  // namespace

Outcome<NoiseModel> whole_trace_noise(const PeakFreeTrace& free,
                                      double width_half_minutes) {
  const double width = width_half_minutes;
  if (!(width > 0.0) || !(free.minutes >= kLeastPeakFreeWidths * width)) {
    return NotApplicable{width > 0.0 ? widths_words(free.minutes, width)
                                     : "noise-trace-short: no width known"};
  }
  const double n = static_cast<double>(free.residuals.count);
  const double points_per_width = width * n / free.minutes;
  const double reach = std::max(3.0, kReachWidths * points_per_width);
  const Lagged lagged = covariances_up_to(
      free.residuals, static_cast<std::size_t>(std::ceil(reach)));
  const double longest = kLongestMemoryWidths * points_per_width;
  NoiseModel model{lagged.variance, 0.0, 0.0};
  for (int round = 0; round < kRounds; ++round) {
    const double bias = taken_by_parabola(model, free.stretch_points);
    const double variance = lagged.variance + bias;
    const Creep creep = best_creep(lagged, longest, bias);
    if (!(creep.gain * n > kLeastGain * variance * variance)) {
      const double parameters = 3.0 * n / free.stretch_points;
      return NoiseModel{lagged.variance * n / (n - parameters), 0.0, 0.0};
    }
    model = {variance - creep.variance, creep.variance, creep.correlation};
  }
  return model;
}

}  // namespace loqsmith
