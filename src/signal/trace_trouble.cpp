#include "loqsmith/signal/trace_trouble.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>

#include "loqsmith/signal/integrate.hpp"
#include "loqsmith/signal/time_index.hpp"

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
  const std::size_t first =
      std::max<std::size_t>(first_at_or_after(t, from), 1);
  const std::size_t last = std::min(first_at_or_after(t, to) + 1, t.size());
  const double most = kGapSteps * stretch.spacing.step;
  for (std::size_t i = first; i < last; ++i) {
    if (t[i] - t[i - 1] > most) return true;
  }
  return false;
}

bool has_negative_peak(const SmoothedStretch& stretch,
                       const PlacedWindow& window, const NoiseModel& noise,
                       double multiple, double height) {
  const std::vector<double>& t = stretch.minutes;
  double depth = kDepthShare * std::max(height, 0.0);
  double where = window.left.minutes;
  bool seen = false;
  for (std::size_t i = first_at_or_after(t, window.left.minutes);
       i < t.size() && t[i] <= window.right.minutes; ++i) {
    const double here = window.baseline_at(t[i]) - stretch.smoothed[i];
    if (!(here > depth)) continue;
    depth = here;
    where = t[i];
    seen = true;
  }
  if (!seen) return false;
  return depth >= multiple * least_smoothed_height_noise(stretch, window, where,
                                                         noise) &&
         depth >=
             multiple * smoothed_height_noise(stretch, window, where, noise);
}

bool is_flat(std::span<const double> signal) {
  return std::all_of(signal.begin(), signal.end(),
                     [&](double y) { return y == signal.front(); });
}

bool covers(const SmoothedStretch& stretch, double from_minutes,
            double to_minutes) {
  const std::vector<double>& t = stretch.minutes;
  if (t.empty()) return false;
  const double step = stretch.spacing.step;
  return t.front() <= from_minutes + step && t.back() >= to_minutes - step;
}

}  // namespace loqsmith
