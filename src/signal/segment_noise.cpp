#include "loqsmith/signal/segment_noise.hpp"

#include <algorithm>
#include <cmath>

#include "loqsmith/numerics/mean.hpp"

namespace loqsmith {
namespace {

constexpr double kLongestMinutes = 1.0;
constexpr double kMinutesPerHour = 60.0;
constexpr std::size_t kFewestPoints = 5;

struct Line {
  double middle = 0.0;
  double level = 0.0;
  double slope = 0.0;

  double at(double minutes) const { return level + slope * (minutes - middle); }
};

Line least_squares_line(std::span<const double> x, std::span<const double> y) {
  Line line{mean(x), mean(y), 0.0};
  double sxx = 0.0;
  double sxy = 0.0;
  for (std::size_t i = 0; i < x.size(); ++i) {
    sxx += (x[i] - line.middle) * (x[i] - line.middle);
    sxy += (x[i] - line.middle) * (y[i] - line.level);
  }
  if (sxx > 0.0) line.slope = sxy / sxx;
  return line;
}

double range_about_line(std::span<const double> x, std::span<const double> y) {
  const Line line = least_squares_line(x, y);
  double low = y[0] - line.at(x[0]);
  double high = low;
  for (std::size_t i = 1; i < x.size(); ++i) {
    const double r = y[i] - line.at(x[i]);
    low = std::min(low, r);
    high = std::max(high, r);
  }
  return high - low;
}

}  // namespace

Outcome<SegmentNoise> segment_noise(std::span<const double> minutes,
                                    std::span<const double> signal,
                                    double step_minutes) {
  const NotApplicable short_stretch{
      "noise-stretch-short: no segment has points enough"};
  if (minutes.size() < kFewestPoints) return short_stretch;
  const double first = minutes.front();
  const double span = minutes.back() - first + step_minutes;
  const double wanted = std::max(1.0, std::ceil(span / kLongestMinutes - 1e-9));
  SegmentNoise noise;
  noise.segment_minutes = span / wanted;
  const double full = noise.segment_minutes / step_minutes;
  double sum = 0.0;
  std::size_t from = 0;
  for (double k = 1.0; k <= wanted; k += 1.0) {
    const double end = first + k * noise.segment_minutes - 0.5 * step_minutes;
    std::size_t to = from;
    while (to < minutes.size() && (minutes[to] < end || k == wanted)) ++to;
    const std::size_t points = to - from;
    if (points >= kFewestPoints && static_cast<double>(points) >= 0.5 * full) {
      sum += range_about_line(minutes.subspan(from, points),
                              signal.subspan(from, points));
      ++noise.segments;
    }
    from = to;
  }
  if (noise.segments == 0) return short_stretch;
  noise.peak_to_peak = sum / static_cast<double>(noise.segments);
  noise.drift_per_hour =
      kMinutesPerHour * least_squares_line(minutes, signal).slope;
  return noise;
}

}  // namespace loqsmith
