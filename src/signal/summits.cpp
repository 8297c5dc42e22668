#include "loqsmith/signal/summits.hpp"

#include <algorithm>
#include <cmath>
#include <utility>

#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/signal/moving_parabola.hpp"
#include "loqsmith/signal/savitzky_golay.hpp"
#include "loqsmith/signal/trace_trouble.hpp"

namespace loqsmith {
namespace {

// Signal of a spike replaced by what its neighbours say.
std::vector<double> without_spikes(const Trace& stretch,
                                   const std::vector<std::size_t>& spikes) {
  std::vector<double> signal = stretch.signal;
  for (const std::size_t i : spikes) {
    signal[i] = 0.5 * (signal[i - 1] + signal[i + 1]);
  }
  return signal;
}

// Standard deviation of a smoothed point over that of a point.
double smoothing_gain(int points, int order, const NoiseModel& noise) {
  const double deviation = noise.standard_deviation();
  if (points <= order) return 1.0;
  if (!(deviation > 0.0)) return smoothing_noise_gain(points, order);
  return weighted_noise(savitzky_golay_weights(points, order, 0), noise) /
         deviation;
}

std::size_t first_at_or_after(const std::vector<double>& minutes, double at) {
  return static_cast<std::size_t>(
      std::lower_bound(minutes.begin(), minutes.end(), at) - minutes.begin());
}

// Lowest value on the way from summit k to the next higher one (or the end).
double valley_towards(const std::vector<Summit>& summits,
                      const std::vector<double>& valleys, std::size_t k,
                      bool left) {
  double lowest = summits[k].value;
  for (std::size_t i = k;;) {
    lowest = std::min(lowest, valleys[left ? i : i + 1]);
    if (left ? i == 0 : i + 1 == summits.size()) return lowest;
    i = left ? i - 1 : i + 1;
    if (summits[i].value > summits[k].value) return lowest;
  }
}

// Lowest value between two places that lie between points: of these two and
// of the points [first, last) that part them.
double lowest_of(const SmoothedStretch& stretch, std::size_t first,
                 std::size_t last, double one_end, double other_end) {
  double lowest = std::min(one_end, other_end);
  for (std::size_t i = first; i < last; ++i) {
    lowest = std::min(lowest, stretch.smoothed[i]);
  }
  return lowest;
}

// @param behind  first point behind each summit
void measure_prominence(const SmoothedStretch& stretch,
                        const std::vector<std::size_t>& behind,
                        std::vector<Summit>& summits) {
  if (summits.empty()) return;
  std::vector<double> valleys;
  valleys.reserve(summits.size() + 1);
  double before = stretch.smoothed.front();
  std::size_t from = 0;
  for (std::size_t k = 0; k < summits.size(); ++k) {
    valleys.push_back(
        lowest_of(stretch, from, behind[k], before, summits[k].value));
    before = summits[k].value;
    from = behind[k];
  }
  valleys.push_back(lowest_of(stretch, from, stretch.smoothed.size(), before,
                              stretch.smoothed.back()));
  for (std::size_t k = 0; k < summits.size(); ++k) {
    const double higher = std::max(valley_towards(summits, valleys, k, true),
                                   valley_towards(summits, valleys, k, false));
    summits[k].prominence = std::max(0.0, summits[k].value - higher);
  }
}

}  // namespace

Trace cut_trace(const Trace& trace, double from_minutes, double to_minutes) {
  const std::vector<double>& t = trace.minutes;
  std::size_t first = first_at_or_after(t, from_minutes);
  std::size_t last = first_at_or_after(t, to_minutes);
  if (first > 0) --first;
  if (last < t.size()) ++last;
  Trace cut;
  const auto a = static_cast<std::ptrdiff_t>(first);
  const auto b = static_cast<std::ptrdiff_t>(std::max(first, last));
  cut.minutes.assign(t.begin() + a, t.begin() + b);
  cut.signal.assign(trace.signal.begin() + a, trace.signal.begin() + b);
  return cut;
}

double typical_step(std::span<const double> minutes) {
  if (minutes.size() < 2) return 0.0;
  if (evenly_spaced(minutes)) {
    return (minutes.back() - minutes.front()) /
           static_cast<double>(minutes.size() - 1);
  }
  std::vector<double> steps;
  steps.reserve(minutes.size());
  for (std::size_t i = 1; i < minutes.size(); ++i) {
    steps.push_back(minutes[i] - minutes[i - 1]);
  }
  return median(steps);
}

int smoothing_length(const IntegrationSettings& settings,
                     double width_half_minutes, double step_minutes) {
  if (settings.smoothing_points > 0) return settings.smoothing_points;
  const double points =
      std::clamp(width_half_minutes / step_minutes, 3.0, 2001.0);
  return 2 * static_cast<int>(std::lround((points - 1.0) / 2.0)) + 1;
}

std::vector<std::size_t> find_spikes(std::span<const double> signal,
                                     double noise) {
  constexpr double kNoiseMultiple = 5.0;
  constexpr double kOwnShare = 0.75;
  std::vector<std::size_t> spikes;
  for (std::size_t i = 1; i + 1 < signal.size(); ++i) {
    const double excess = signal[i] - std::max(signal[i - 1], signal[i + 1]);
    if (!(excess > 0.0) || !(excess > kNoiseMultiple * noise)) continue;
    const std::size_t first = i >= 3 ? i - 3 : 0;
    const std::size_t last = std::min(i + 4, signal.size());
    const double level = median(signal.subspan(first, last - first));
    if (excess > kOwnShare * (signal[i] - level)) spikes.push_back(i);
  }
  return spikes;
}

SmoothedStretch smooth_stretch(const Trace& stretch, int points, int order,
                               const NoiseModel& noise) {
  SmoothedStretch ready;
  ready.minutes = stretch.minutes;
  ready.signal = stretch.signal;
  ready.spikes = find_spikes(stretch.signal, noise.standard_deviation());
  const std::vector<double> clean = without_spikes(stretch, ready.spikes);
  ValueAndSlope smoothed =
      smooth_value_and_slope(ready.minutes, clean, points, order);
  ready.smoothed = std::move(smoothed.value);
  ready.slope = std::move(smoothed.slope);
  ready.points = points > order ? points : 1;
  ready.order = points > order ? order : 0;
  ready.gain = smoothing_gain(points, order, noise);
  if (!(noise.variance() > 0.0)) ready.rounding = rounding_noise(clean);
  return ready;
}

std::vector<Summit> find_summits(const SmoothedStretch& stretch) {
  std::vector<Summit> summits;
  std::vector<std::size_t> behind;
  const std::vector<double>& slope = stretch.slope;
  const std::vector<double>& t = stretch.minutes;
  const std::size_t n = slope.size();
  std::size_t up = n;  // last point on the rise
  for (std::size_t i = 0; i < n; ++i) {
    if (slope[i] > 0.0) {
      up = i;
    } else if (slope[i] < 0.0 && up < n) {
      const double share = slope[up] / (slope[up] - slope[i]);
      const double at = t[up] + share * (t[i] - t[up]);
      std::size_t next = up + 1;
      while (next < i && t[next] <= at) ++next;
      const double along = (at - t[next - 1]) / (t[next] - t[next - 1]);
      summits.push_back(
          {at,
           stretch.smoothed[next - 1] +
               along * (stretch.smoothed[next] - stretch.smoothed[next - 1]),
           0.0});
      behind.push_back(next);
      up = n;
    }
  }
  measure_prominence(stretch, behind, summits);
  return summits;
}

double lowest_between(const SmoothedStretch& stretch, double from_minutes,
                      double to_minutes) {
  double where = from_minutes;
  double lowest = smoothed_at(stretch, from_minutes);
  for (std::size_t i = first_at_or_after(stretch.minutes, from_minutes);
       i < stretch.minutes.size() && stretch.minutes[i] <= to_minutes; ++i) {
    if (stretch.smoothed[i] < lowest) {
      lowest = stretch.smoothed[i];
      where = stretch.minutes[i];
    }
  }
  if (smoothed_at(stretch, to_minutes) < lowest) where = to_minutes;
  return where;
}

double smoothed_at(const SmoothedStretch& stretch, double minutes) {
  return interpolate(stretch.minutes, stretch.smoothed, minutes);
}

double interpolate(std::span<const double> x, std::span<const double> y,
                   double at) {
  if (at <= x.front()) return y.front();
  if (at >= x.back()) return y.back();
  const auto next = static_cast<std::size_t>(
      std::upper_bound(x.begin(), x.end(), at) - x.begin());
  const double share = (at - x[next - 1]) / (x[next] - x[next - 1]);
  return y[next - 1] + share * (y[next] - y[next - 1]);
}

}  // namespace loqsmith
