#include "loqsmith/signal/integrate.hpp"

#include <algorithm>
#include <cmath>
#include <span>

#include "loqsmith/signal/savitzky_golay.hpp"

namespace loqsmith {
namespace {

struct Range {
  std::size_t first;
  std::size_t last;  // one beyond
};

Range points_within(const std::vector<double>& t, double start, double end) {
  const auto first = std::lower_bound(t.begin(), t.end(), start) - t.begin();
  const auto last = std::upper_bound(t.begin(), t.end(), end) - t.begin();
  return {static_cast<std::size_t>(first), static_cast<std::size_t>(last)};
}

// Adds the weights of `factor` times the signal interpolated at a time.
void add_interpolated(const std::vector<double>& t, double at, double factor,
                      std::vector<double>& weights) {
  const auto next = static_cast<std::size_t>(
      std::lower_bound(t.begin(), t.end(), at) - t.begin());
  if (next == 0 || next == t.size() || t[next] == at) {
    weights[std::min(next, t.size() - 1)] += factor;
    return;
  }
  const double share = (at - t[next - 1]) / (t[next] - t[next - 1]);
  weights[next - 1] += factor * (1.0 - share);
  weights[next] += factor * share;
}

// Takes `factor` times the baseline at a time off the weights.
void take_baseline_weights(const PlacedWindow& window, double at, double factor,
                           std::vector<double>& weights) {
  const double share = window.right_share(at);
  const auto spread = [&](const Foot& foot, double amount) {
    for (std::size_t i = foot.first; i < foot.last; ++i) {
      weights[i] -= amount / static_cast<double>(foot.points());
    }
  };
  // A side without points of its own is level with the other one.
  const bool both = window.left.points() > 0 && window.right.points() > 0;
  const double left = both ? 1.0 - share : 1.0;
  const double right = both ? share : 1.0;
  spread(window.left, factor * left);
  spread(window.right, factor * right);
}

}  // namespace

double integrate_window(const SmoothedStretch& stretch,
                        const PlacedWindow& window) {
  const std::vector<double>& t = stretch.minutes;
  const Range range =
      points_within(t, window.left.minutes, window.right.minutes);
  double t_before = window.left.minutes;
  double y_before =
      interpolate(t, stretch.signal, t_before) - window.baseline_at(t_before);
  double area = 0.0;
  const auto add = [&](double minutes, double above) {
    area += 0.5 * (minutes - t_before) * (y_before + above);
    t_before = minutes;
    y_before = above;
  };
  for (std::size_t i = range.first; i < range.last; ++i) {
    add(t[i], stretch.signal[i] - window.baseline_at(t[i]));
  }
  const double end = window.right.minutes;
  add(end, interpolate(t, stretch.signal, end) - window.baseline_at(end));
  return area;
}

std::vector<double> area_weights(const SmoothedStretch& stretch,
                                 const PlacedWindow& window) {
  const std::vector<double>& t = stretch.minutes;
  const double start = window.left.minutes;
  const double end = window.right.minutes;
  std::vector<double> weights(t.size(), 0.0);
  double before = start;
  const auto add = [&](double minutes) {
    add_interpolated(t, before, 0.5 * (minutes - before), weights);
    add_interpolated(t, minutes, 0.5 * (minutes - before), weights);
    before = minutes;
  };
  const Range range = points_within(t, start, end);
  for (std::size_t i = range.first; i < range.last; ++i) add(t[i]);
  add(end);
  // A straight line's area is its middle times its length.
  take_baseline_weights(window, 0.5 * (start + end), end - start, weights);
  return weights;
}

std::vector<double> parabola_weights(const std::vector<double>& minutes,
                                     double at) {
  const std::size_t n = minutes.size();
  auto next = static_cast<std::size_t>(
      std::lower_bound(minutes.begin(), minutes.end(), at) - minutes.begin());
  next = std::clamp<std::size_t>(next, 1, n - 1);
  const std::size_t nearest =
      at - minutes[next - 1] <= minutes[next] - at ? next - 1 : next;
  const std::size_t first = std::clamp<std::size_t>(nearest, 1, n - 2) - 1;
  const std::vector<double> three =
      local_polynomial_weights(std::span(minutes).subspan(first, 3), at, 2, 0);
  std::vector<double> weights(n, 0.0);
  std::copy(three.begin(), three.end(),
            weights.begin() + static_cast<std::ptrdiff_t>(first));
  return weights;
}

std::vector<double> height_weights(const SmoothedStretch& stretch,
                                   const PlacedWindow& window, double minutes) {
  std::vector<double> weights = parabola_weights(stretch.minutes, minutes);
  take_baseline_weights(window, minutes, 1.0, weights);
  return weights;
}

std::vector<double> smoothed_height_weights(const SmoothedStretch& stretch,
                                            const PlacedWindow& window,
                                            double minutes) {
  const std::vector<double>& t = stretch.minutes;
  std::vector<double> weights(t.size(), 0.0);
  const std::size_t points =
      std::min(static_cast<std::size_t>(stretch.points), t.size());
  const auto nearest = static_cast<std::size_t>(
      std::lower_bound(t.begin(), t.end(), minutes) - t.begin());
  const std::size_t half = points / 2;
  const std::size_t first =
      std::min(nearest > half ? nearest - half : 0, t.size() - points);
  const std::vector<double> smoothing = local_polynomial_weights(
      std::span(t).subspan(first, points), minutes, stretch.order, 0);
  std::copy(smoothing.begin(), smoothing.end(),
            weights.begin() + static_cast<std::ptrdiff_t>(first));
  take_baseline_weights(window, minutes, 1.0, weights);
  return weights;
}

double signal_near(const SmoothedStretch& stretch, double minutes) {
  const std::vector<double> weights =
      parabola_weights(stretch.minutes, minutes);
  double signal = 0.0;
  for (std::size_t i = 0; i < weights.size(); ++i) {
    if (weights[i] != 0.0) signal += weights[i] * stretch.signal[i];
  }
  return signal;
}

std::size_t points_in_window(const SmoothedStretch& stretch,
                             const PlacedWindow& window) {
  const Range range =
      points_within(stretch.minutes, window.left.minutes, window.right.minutes);
  return range.last - range.first;
}

}  // namespace loqsmith
