#include "loqsmith/signal/trace_trouble.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>

#include "loqsmith/signal/integrate.hpp"

namespace loqsmith {
namespace {

constexpr double kGapSteps = 3.0;
constexpr double kDepthShare = 0.05;

}  // namespace

double smallest_step(std::span<const double> signal) {
  double step = 0.0;
  for (std::size_t i = 1; i < signal.size(); ++i) {
    const double change = std::abs(signal[i] - signal[i - 1]);
    if (change > 0.0 && (step == 0.0 || change < step)) step = change;
  }
  return step;
}

double rounding_noise(std::span<const double> signal) {
  return smallest_step(signal) / std::sqrt(6.0);
}

bool has_gap(const SmoothedStretch& stretch, const PlacedWindow& window) {
  const std::vector<double>& t = stretch.minutes;
  const double from = std::min(window.left.minutes, window.left.anchor_minutes);
  const double to = std::max(window.right.minutes, window.right.anchor_minutes);
  const auto before = [&](double minutes) {
    return static_cast<std::size_t>(
        std::lower_bound(t.begin(), t.end(), minutes) - t.begin());
  };
  const std::size_t first = std::max<std::size_t>(before(from), 1);
  const std::size_t last = std::min(before(to) + 1, t.size());
  const double most = kGapSteps * typical_step(t);
  for (std::size_t i = first; i < last; ++i) {
    if (t[i] - t[i - 1] > most) return true;
  }
  return false;
}

bool has_negative_peak(const SmoothedStretch& stretch,
                       const PlacedWindow& window, const NoiseModel& noise,
                       double multiple, double height) {
  double depth = kDepthShare * std::max(height, 0.0);
  double where = window.left.minutes;
  bool seen = false;
  for (std::size_t i = 0; i < stretch.minutes.size(); ++i) {
    const double t = stretch.minutes[i];
    if (t < window.left.minutes || t > window.right.minutes) continue;
    const double here = window.baseline_at(t) - stretch.smoothed[i];
    if (!(here > depth)) continue;
    depth = here;
    where = t;
    seen = true;
  }
  if (!seen) return false;
  const double deviation = std::max(
      stretch.rounding,
      weighted_noise(smoothed_height_weights(stretch, window, where), noise));
  return depth >= multiple * deviation;
}

bool is_flat(std::span<const double> signal) {
  return std::all_of(signal.begin(), signal.end(),
                     [&](double y) { return y == signal.front(); });
}

bool covers(std::span<const double> minutes, double from_minutes,
            double to_minutes) {
  if (minutes.empty()) return false;
  const double step = typical_step(minutes);
  return minutes.front() <= from_minutes + step &&
         minutes.back() >= to_minutes - step;
}

}  // namespace loqsmith
