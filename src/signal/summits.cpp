#include "loqsmith/signal/summits.hpp"

#include <algorithm>
#include <cmath>
#include <utility>

#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/signal/moving_parabola.hpp"
#include "loqsmith/signal/savitzky_golay.hpp"
#include "loqsmith/signal/time_index.hpp"
#include "loqsmith/signal/trace_trouble.hpp"

namespace loqsmith {
namespace {

// Signal of a spike replaced by what its neighbours say.
std::vector<double> without_spikes(std::vector<double> signal,
                                   const std::vector<std::size_t>& spikes) {
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

// Lowest value on the way from each summit to the next higher one that came
// before it (or to the beginning), in the order in which they are shown.
class WayBack {
 public:
  // @param valley  lowest value since the summit before
  double lowest(double summit, double valley) {
    while (!higher_.empty() && !(higher_.back().summit > summit)) {
      valley = std::min(valley, higher_.back().lowest);
      higher_.pop_back();
    }
    higher_.push_back({summit, valley});
    return std::min(summit, valley);
  }

 private:
  struct Seen {
    double summit;
    double lowest;
  };
  std::vector<Seen> higher_;  // each is higher than those behind it
};

// Lowest value between two places that lie between points: of these two and
// of the points [first, last) that part them. Two at a time: one alone waits
// for its own last comparison.
double lowest_of(const SmoothedStretch& stretch, std::size_t first,
                 std::size_t last, double one_end, double other_end) {
  const std::vector<double>& y = stretch.smoothed;
  double even = one_end;
  double odd = other_end;
  std::size_t i = first;
  for (; i + 1 < last; i += 2) {
    even = std::min(even, y[i]);
    odd = std::min(odd, y[i + 1]);
  }
  if (i < last) even = std::min(even, y[i]);
  return std::min(even, odd);
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
  WayBack to_the_left;
  for (std::size_t k = 0; k < summits.size(); ++k) {
    summits[k].prominence = to_the_left.lowest(summits[k].value, valleys[k]);
  }
  WayBack to_the_right;
  for (std::size_t k = summits.size(); k-- > 0;) {
    const double right = to_the_right.lowest(summits[k].value, valleys[k + 1]);
    summits[k].prominence = std::max(
        0.0, summits[k].value - std::max(summits[k].prominence, right));
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
  return spacing_of(minutes).step;
}

Spacing spacing_of(std::span<const double> minutes) {
  const std::size_t n = minutes.size();
  if (n < 2) return {};
  if (evenly_spaced(minutes)) {
    return {(minutes.back() - minutes.front()) / static_cast<double>(n - 1),
            true};
  }
  std::vector<double> steps(n - 1);
  for (std::size_t i = 1; i < n; ++i)
    steps[i - 1] = minutes[i] - minutes[i - 1];
  return {median_in_place(steps), false};
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
  const double least = std::max(0.0, kNoiseMultiple * noise);
  std::vector<std::size_t> spikes;
  for (std::size_t i = 1; i + 1 < signal.size(); ++i) {
    const double excess = signal[i] - std::max(signal[i - 1], signal[i + 1]);
    if (!(excess > least)) continue;
    const std::size_t first = i >= 3 ? i - 3 : 0;
    const std::size_t last = std::min(i + 4, signal.size());
    const double level = median(signal.subspan(first, last - first));
    if (excess > kOwnShare * (signal[i] - level)) spikes.push_back(i);
  }
  return spikes;
}

SmoothedStretch smooth_stretch(Trace stretch, int points, int order,
                               const NoiseModel& noise) {
  const Spacing spacing = spacing_of(stretch.minutes);
  return smooth_stretch(std::move(stretch), spacing, points, order, noise);
}

SmoothedStretch smooth_stretch(Trace stretch, const Spacing& spacing,
                               int points, int order, const NoiseModel& noise) {
  SmoothedStretch ready;
  ready.spacing = spacing;
  ready.minutes = std::move(stretch.minutes);
  ready.signal = std::move(stretch.signal);
  ready.spikes = find_spikes(ready.signal, noise.standard_deviation());
  std::vector<double> mended;
  if (!ready.spikes.empty()) {
    mended = without_spikes(ready.signal, ready.spikes);
  }
  const std::vector<double>& clean =
      ready.spikes.empty() ? ready.signal : mended;
  ValueAndSlope smoothed =
      smooth_value_and_slope(ready.minutes, clean, points, order, spacing.even);
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
  for (std::size_t i = 0;;) {
    while (i < n && !(slope[i] > 0.0)) ++i;
    while (i < n && !(slope[i] < 0.0)) ++i;
    if (i == n) break;
    std::size_t up = i - 1;  // last point on the rise
    while (!(slope[up] > 0.0)) --up;
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
  }
  measure_prominence(stretch, behind, summits);
  return summits;
}

double lowest_between(const SmoothedStretch& stretch, double from_minutes,
                      double to_minutes) {
  double where = from_minutes;
  double lowest = smoothed_at(stretch, from_minutes);
  const std::size_t last = first_after(stretch.minutes, to_minutes);
  for (std::size_t i = first_at_or_after(stretch.minutes, from_minutes);
       i < last; ++i) {
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
  const std::size_t next = first_after(x, at);
  const double share = (at - x[next - 1]) / (x[next] - x[next - 1]);
  return y[next - 1] + share * (y[next] - y[next - 1]);
}

}  // namespace loqsmith
