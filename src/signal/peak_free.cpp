#include "loqsmith/signal/peak_free.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>

#include "loqsmith/signal/noise_model.hpp"
#include "loqsmith/signal/point_noise.hpp"
#include "loqsmith/signal/summits.hpp"

namespace loqsmith {
namespace {

constexpr double kSummitMultiple = 5.0;
constexpr double kReachWidths = 1.7;
constexpr double kSearchSpans = 4.0;
constexpr int kRounds = 3;

// Standard deviation about a line of the points that count as free.
double noise_of_free(const Trace& near, const std::vector<bool>& free) {
  std::vector<double> minutes;
  std::vector<double> signal;
  for (std::size_t i = 0; i < free.size(); ++i) {
    if (!free[i]) continue;
    minutes.push_back(near.minutes[i]);
    signal.push_back(near.signal[i]);
  }
  if (minutes.size() < 5) return point_to_point_noise(near.signal);
  return noise_about_line(minutes, signal).standard_deviation;
}

struct Sides {
  std::vector<std::size_t> left;   // nearest to the peak first
  std::vector<std::size_t> right;  // the same
};

Sides free_sides(const Trace& near, const std::vector<bool>& free,
                 double start) {
  Sides sides;
  for (std::size_t i = 0; i < free.size(); ++i) {
    if (!free[i]) continue;
    (near.minutes[i] < start ? sides.left : sides.right).push_back(i);
  }
  std::reverse(sides.left.begin(), sides.left.end());
  return sides;
}

}  // namespace

std::vector<bool> peak_free_points(const Trace& near, double start_minutes,
                                   double end_minutes, double width_half) {
  const std::size_t n = near.minutes.size();
  std::vector<bool> outside(n);
  for (std::size_t i = 0; i < n; ++i) {
    const double t = near.minutes[i];
    outside[i] = t < start_minutes || t > end_minutes;
  }
  if (n < 5) return outside;
  const double point_noise = point_to_point_noise(near.signal);
  const SmoothedStretch stretch = smooth_stretch(
      near, smoothing_length({}, width_half, typical_step(near.minutes)), 2,
      white_noise(point_noise));
  const std::vector<Summit> summits = find_summits(stretch);
  std::vector<bool> free = outside;
  for (int round = 0; round < kRounds; ++round) {
    const double least = kSummitMultiple * noise_of_free(near, free);
    free = outside;
    for (const Summit& summit : summits) {
      if (!(summit.prominence > least)) continue;
      for (std::size_t i = 0; i < n; ++i) {
        const double away = std::abs(near.minutes[i] - summit.minutes);
        if (away <= kReachWidths * width_half) free[i] = false;
      }
    }
  }
  return free;
}

NoiseStretch stretch_between(const Trace& trace, double from_minutes,
                             double to_minutes) {
  NoiseStretch stretch;
  for (std::size_t i = 0; i < trace.minutes.size(); ++i) {
    const double t = trace.minutes[i];
    if (t < from_minutes || t > to_minutes) continue;
    stretch.minutes.push_back(t);
    stretch.signal.push_back(trace.signal[i]);
  }
  if (stretch.minutes.empty()) return stretch;
  // Up to one step at each end belongs to the points within.
  const double step = typical_step(stretch.minutes);
  const double span = stretch.minutes.back() - stretch.minutes.front();
  stretch.covered_minutes = span + 2.0 * step;
  return stretch;
}

NoiseStretch peak_free_beside(const Trace& trace, double start_minutes,
                              double end_minutes, double width_half_minutes,
                              double wanted_minutes) {
  const double reach = kSearchSpans * wanted_minutes;
  const Trace near =
      cut_trace(trace, start_minutes - reach, end_minutes + reach);
  NoiseStretch stretch;
  if (near.minutes.size() < 3) return stretch;
  const Sides sides = free_sides(
      near,
      peak_free_points(near, start_minutes, end_minutes, width_half_minutes),
      start_minutes);
  const double step = typical_step(near.minutes);
  const auto wanted =
      static_cast<std::size_t>(std::max(5.0, std::ceil(wanted_minutes / step)));
  const std::size_t half = (wanted + 1) / 2;
  std::size_t left = std::min(half, sides.left.size());
  const std::size_t right = std::min(wanted - left, sides.right.size());
  left = std::min(wanted - right, sides.left.size());
  for (std::size_t k = left; k > 0; --k) {
    stretch.minutes.push_back(near.minutes[sides.left[k - 1]]);
    stretch.signal.push_back(near.signal[sides.left[k - 1]]);
  }
  for (std::size_t k = 0; k < right; ++k) {
    stretch.minutes.push_back(near.minutes[sides.right[k]]);
    stretch.signal.push_back(near.signal[sides.right[k]]);
  }
  stretch.covered_minutes = left + right >= wanted
                                ? wanted_minutes
                                : static_cast<double>(left + right) * step;
  return stretch;
}

}  // namespace loqsmith
