#include "loqsmith/signal/integrate.hpp"

#include <algorithm>
#include <cmath>
#include <span>

#include "loqsmith/signal/savitzky_golay.hpp"
#include "loqsmith/signal/time_index.hpp"

namespace loqsmith {
namespace {

struct Range {
  std::size_t first;
  std::size_t last;  // one beyond
};

Range points_within(const std::vector<double>& t, double start, double end) {
  return {first_at_or_after(t, start), first_after(t, end)};
}

// No weights yet, for the points of both feet and of a range.
PointWeights room_for(const PlacedWindow& window, Range range) {
  for (const Foot* foot : {&window.left, &window.right}) {
    if (foot->points() == 0) continue;
    range.first = std::min(range.first, foot->first);
    range.last = std::max(range.last, foot->last);
  }
  return {range.first, std::vector<double>(range.last - range.first, 0.0)};
}

void add_at(std::size_t point, double factor, PointWeights& weights) {
  weights.values[point - weights.first] += factor;
}

// Adds the weights of `factor` times the signal interpolated at a time.
void add_interpolated(const std::vector<double>& t, double at, double factor,
                      PointWeights& weights) {
  const std::size_t next = first_at_or_after(t, at);
  if (next == 0 || next == t.size() || t[next] == at) {
    add_at(std::min(next, t.size() - 1), factor, weights);
    return;
  }
  const double share = (at - t[next - 1]) / (t[next] - t[next - 1]);
  add_at(next - 1, factor * (1.0 - share), weights);
  add_at(next, factor * share, weights);
}

// Takes `factor` times the baseline at a time off the weights.
void take_baseline_weights(const PlacedWindow& window, double at, double factor,
                           PointWeights& weights) {
  const double share = window.right_share(at);
  const auto spread = [&](const Foot& foot, double amount) {
    const double each = amount / static_cast<double>(foot.points());
    for (std::size_t i = foot.first; i < foot.last; ++i) {
      add_at(i, -each, weights);
    }
  };
  // A side without points of its own is level with the other one.
  const bool both = window.left.points() > 0 && window.right.points() > 0;
  const double left = both ? 1.0 - share : 1.0;
  const double right = both ? share : 1.0;
  spread(window.left, factor * left);
  spread(window.right, factor * right);
}

// Adds what makes of the range's points and the interpolated ends trapezoids.
void add_trapezoids(const std::vector<double>& t, Range range, double start,
                    double end, PointWeights& weights) {
  if (range.first >= range.last) {
    add_interpolated(t, start, 0.5 * (end - start), weights);
    add_interpolated(t, end, 0.5 * (end - start), weights);
    return;
  }
  const double lead = 0.5 * (t[range.first] - start);
  add_interpolated(t, start, lead, weights);
  add_at(range.first, lead, weights);
  for (std::size_t i = range.first + 1; i < range.last; ++i) {
    const double half = 0.5 * (t[i] - t[i - 1]);
    add_at(i - 1, half, weights);
    add_at(i, half, weights);
  }
  const double rest = 0.5 * (end - t[range.last - 1]);
  add_at(range.last - 1, rest, weights);
  add_interpolated(t, end, rest, weights);
}

// The points that a smoothed signal at a time is made of.
Range smoothed_points(const SmoothedStretch& stretch, double minutes) {
  const std::vector<double>& t = stretch.minutes;
  const std::size_t points =
      std::min(static_cast<std::size_t>(stretch.points), t.size());
  const std::size_t nearest = first_at_or_after(t, minutes);
  const std::size_t half = points / 2;
  const std::size_t first =
      std::min(nearest > half ? nearest - half : 0, t.size() - points);
  return {first, first + points};
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

std::vector<double> PointWeights::over(std::size_t points) const {
  std::vector<double> all(points, 0.0);
  std::copy(values.begin(), values.end(),
            all.begin() + static_cast<std::ptrdiff_t>(first));
  return all;
}

PointWeights area_weights(const SmoothedStretch& stretch,
                          const PlacedWindow& window) {
  const std::vector<double>& t = stretch.minutes;
  const double start = window.left.minutes;
  const double end = window.right.minutes;
  const Range range = points_within(t, start, end);
  // The ends are interpolated with one point beyond.
  PointWeights weights =
      room_for(window, {range.first - std::min<std::size_t>(range.first, 1),
                        std::min(range.last + 1, t.size())});
  add_trapezoids(t, range, start, end, weights);
  // A straight line's area is its middle times its length.
  take_baseline_weights(window, 0.5 * (start + end), end - start, weights);
  return weights;
}

PointWeights parabola_weights(const std::vector<double>& minutes, double at) {
  const std::size_t n = minutes.size();
  const std::size_t next =
      std::clamp<std::size_t>(first_at_or_after(minutes, at), 1, n - 1);
  const std::size_t nearest =
      at - minutes[next - 1] <= minutes[next] - at ? next - 1 : next;
  const std::size_t first = std::clamp<std::size_t>(nearest, 1, n - 2) - 1;
  return {first, local_polynomial_weights(std::span(minutes).subspan(first, 3),
                                          at, 2, 0)};
}

PointWeights height_weights(const SmoothedStretch& stretch,
                            const PlacedWindow& window, double minutes) {
  const PointWeights three = parabola_weights(stretch.minutes, minutes);
  PointWeights weights = room_for(window, {three.first, three.first + 3});
  for (std::size_t i = 0; i < 3; ++i) {
    add_at(three.first + i, three.values[i], weights);
  }
  take_baseline_weights(window, minutes, 1.0, weights);
  return weights;
}

PointWeights smoothed_height_weights(const SmoothedStretch& stretch,
                                     const PlacedWindow& window,
                                     double minutes) {
  const Range range = smoothed_points(stretch, minutes);
  const std::vector<double> smoothing = local_polynomial_weights(
      std::span(stretch.minutes).subspan(range.first, range.last - range.first),
      minutes, stretch.order, 0);
  PointWeights weights = room_for(window, range);
  for (std::size_t i = 0; i < smoothing.size(); ++i) {
    add_at(range.first + i, smoothing[i], weights);
  }
  take_baseline_weights(window, minutes, 1.0, weights);
  return weights;
}

double smoothed_height_noise(const SmoothedStretch& stretch,
                             const PlacedWindow& window, double minutes,
                             const NoiseModel& noise) {
  const PointWeights weights =
      smoothed_height_weights(stretch, window, minutes);
  return std::max(stretch.rounding, weighted_noise(weights.values, noise));
}

double least_smoothed_height_noise(const SmoothedStretch& stretch,
                                   const PlacedWindow& window, double minutes,
                                   const NoiseModel& noise) {
  constexpr double kRounding = 1.0 - 1e-9;
  const Range range = smoothed_points(stretch, minutes);
  // Where the feet's points lie among the smoothed ones weights cancel.
  const bool apart =
      (window.left.points() == 0 || window.left.last <= range.first) &&
      (window.right.points() == 0 || window.right.first >= range.last);
  if (!apart) return stretch.rounding;
  const double points = static_cast<double>(range.last - range.first);
  return std::max(stretch.rounding,
                  kRounding * std::sqrt(noise.white_variance / points));
}

double signal_near(const SmoothedStretch& stretch, double minutes) {
  const PointWeights weights = parabola_weights(stretch.minutes, minutes);
  double signal = 0.0;
  for (std::size_t i = 0; i < weights.values.size(); ++i) {
    signal += weights.values[i] * stretch.signal[weights.first + i];
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
