#pragma once

#include <algorithm>
#include <cstddef>
#include <vector>

#include "loqsmith/signal/savitzky_golay.hpp"
#include "loqsmith/signal/summits.hpp"
#include "overlap_support.hpp"

namespace loqsmith::test {

/// The two peaks without noise, their feet and lines as the geometry has them.
/// Valley and touching point are those of the smoothed points of the noise-free
/// trace, since that is where they are looked for; areas and lines are those of
/// the curve itself, on a fine grid.
class ExactPair {
 public:
  ExactPair(const Pair& pair, const WindowTemplate& window)
      : wanted_(trace_of(pair)), window_(window), second_(second_apex(pair)) {
    SimulatedTrace quiet = wanted_;
    quiet.white_noise = 0.0;
    quiet.offset = 0.0;
    quiet.drift_per_minute = 0.0;
    const Trace trace = simulate_trace(quiet, "quiet");
    minutes_ = trace.minutes;
    const int points = smoothing_length({}, window.width_half_minutes, 0.01);
    smoothed_ = savitzky_golay(trace.minutes, trace.signal, points, 2, 0);
    valley_ = lowest(5.0, second_);
    gain_ = smoothing_noise_gain(points, 2);
  }

  // Of the first peak from its foot to the valley, of the second from there.
  double first_dropped() const {
    return area(5.0 - window_.left_minutes, minutes_[valley_]);
  }
  double second_dropped() const {
    return area(minutes_[valley_], second_ + window_.right_minutes);
  }

  // Of the first peak, which rides before the second, above its line.
  double rider() const { return above_line(minutes_[touch()]); }

  // Of the second's window less the rider's share in it.
  double parent() const {
    const double foot = second_ - window_.left_minutes;
    return area(foot, second_ + window_.right_minutes) -
           above_line(std::max(foot, minutes_[touch()]));
  }

  // What the baseline takes off an area: feet stand where a thousandth of the
  // height is left, and the baseline is held just outside of them.
  double feet_in_baseline() const {
    double highest = 0.0;
    for (double t = 4.9; t < second_ + 0.1; t += 1e-3) {
      highest = std::max(highest, at(t));
    }
    return 0.001 * highest * (window_.left_minutes + window_.right_minutes);
  }

  // By how much an area may be off where noise lifts the ends of the line by
  // one standard deviation of a smoothed point.
  double noise_of_line() const {
    return gain_ * wanted_.white_noise *
           (minutes_[valley_] - minutes_[touch()]);
  }

 private:
  double at(double t) const {
    double signal = 0.0;
    for (const SimulatedPeak& peak : wanted_.peaks) {
      signal +=
          peak.area * modified_gaussian(t, peak.minutes, peak.sigma, peak.tau);
    }
    return signal;
  }

  double area(double from, double to) const {
    constexpr int kSteps = 4000;
    const double step = (to - from) / kSteps;
    double sum = 0.0;
    for (int i = 0; i < kSteps; ++i) sum += at(from + (i + 0.5) * step);
    return step * sum;
  }

  std::size_t lowest(double from, double to) const {
    std::size_t where = 0;
    for (std::size_t i = 0; i < minutes_.size(); ++i) {
      if (minutes_[i] < from || minutes_[i] > to) continue;
      if (where == 0 || smoothed_[i] < smoothed_[where]) where = i;
    }
    return where;
  }

  // Seen from the valley, the way down that is least steep.
  std::size_t touch() const {
    const auto slope = [&](std::size_t i) {
      return (smoothed_[i] - smoothed_[valley_]) /
             (minutes_[valley_] - minutes_[i]);
    };
    std::size_t where = 0;
    for (std::size_t i = 0; i < valley_; ++i) {
      if (minutes_[i] < 5.0 - window_.left_minutes || minutes_[i] >= 5.0) {
        continue;
      }
      if (where == 0 || slope(i) < slope(where)) where = i;
    }
    return where;
  }

  // The curve's mean over a tenth of a width to either side.
  double held_at(double t) const {
    const double reach = 0.1 * window_.width_half_minutes;
    return area(t - reach, t + reach) / (2.0 * reach);
  }

  double above_line(double from) const {
    const double a = minutes_[touch()];
    const double b = minutes_[valley_];
    const auto line = [&](double t) {
      return held_at(a) + (held_at(b) - held_at(a)) * (t - a) / (b - a);
    };
    return area(from, b) - 0.5 * (line(from) + line(b)) * (b - from);
  }

  SimulatedTrace wanted_;
  const WindowTemplate& window_;
  double second_;
  std::vector<double> minutes_;
  std::vector<double> smoothed_;
  std::size_t valley_ = 0;
  double gain_ = 1.0;
};

}  // namespace loqsmith::test
