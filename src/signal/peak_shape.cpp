#include "loqsmith/signal/peak_shape.hpp"

#include <algorithm>
#include <cmath>
#include <span>
#include <vector>

#include "loqsmith/signal/local_fit.hpp"

namespace loqsmith {
namespace {

constexpr double kWidestReach = 0.75;
constexpr double kLeastReach = 0.15;

constexpr double kNoiseMultiple = 3.0;

class Walk {
 public:
  Walk(const SmoothedStretch& stretch, const PlacedWindow& window, double apex,
       double height)
      : stretch_(stretch), window_(window), apex_(apex), height_(height) {}

  // Distance to the first crossing of a level, going left or right.
  std::optional<double> crossing(double level, bool left) const {
    const std::vector<double>& t = stretch_.minutes;
    double t_before = apex_;
    double y_before = height_;
    auto i = static_cast<std::size_t>(
        (left ? std::lower_bound(t.begin(), t.end(), apex_)
              : std::upper_bound(t.begin(), t.end(), apex_)) -
        t.begin());
    while (left ? i > 0 : i < t.size()) {
      const std::size_t k = left ? i - 1 : i;
      const double y = stretch_.signal[k] - window_.baseline_at(t[k]);
      if (y <= level) {
        const double share = (y_before - level) / (y_before - y);
        const double at = t_before + share * (t[k] - t_before);
        return inside(at) ? std::optional(std::abs(at - apex_)) : std::nullopt;
      }
      if (!inside(t[k])) return std::nullopt;
      t_before = t[k];
      y_before = y;
      i = left ? i - 1 : i + 1;
    }
    return std::nullopt;
  }

 private:
  bool inside(double minutes) const {
    return minutes >= window_.left.minutes && minutes <= window_.right.minutes;
  }

  const SmoothedStretch& stretch_;
  const PlacedWindow& window_;
  double apex_;
  double height_;
};

}  // namespace

std::optional<WidthAt> width_at(const SmoothedStretch& stretch,
                                const PlacedWindow& window, double apex,
                                double height, double fraction, double noise) {
  const double level = fraction * height;
  if (!(level > 0.0) || !(level >= kNoiseMultiple * noise)) return {};
  const Walk walk(stretch, window, apex, height);
  const std::optional<double> front = walk.crossing(level, true);
  const std::optional<double> rear = walk.crossing(level, false);
  if (!front || !rear || !(*front > 0.0) || !(*rear > 0.0)) return {};
  return WidthAt{*front, *rear};
}

double tailing_factor(const WidthAt& at_5_percent) {
  return at_5_percent.total() / (2.0 * at_5_percent.front);
}

double asymmetry_factor(const WidthAt& at_10_percent) {
  return at_10_percent.rear / at_10_percent.front;
}

double plate_number(double retention_minutes, double width_half_minutes) {
  const double ratio = retention_minutes / width_half_minutes;
  return 5.54 * ratio * ratio;
}

std::optional<double> capacity_factor(double retention_minutes,
                                      double hold_up_minutes) {
  if (!(hold_up_minutes > 0.0) || !(retention_minutes >= hold_up_minutes)) {
    return {};
  }
  return (retention_minutes - hold_up_minutes) / hold_up_minutes;
}

double resolution(double first_minutes, double first_width_half,
                  double second_minutes, double second_width_half) {
  return 1.18 * (second_minutes - first_minutes) /
         (first_width_half + second_width_half);
}

double apex_reach(double noise_share) {
  const double reach = kWidestReach * std::pow(100.0 * noise_share, 1.0 / 5.5);
  return std::clamp(reach, kLeastReach, kWidestReach);
}

double sharpened_apex(const SmoothedStretch& stretch, double apex,
                      double width_half_minutes, double noise_share) {
  constexpr int kOrder = 4;
  constexpr double kLeastSteps = 3.5;
  const double reach = std::max(apex_reach(noise_share) * width_half_minutes,
                                kLeastSteps * stretch.spacing.step);
  const std::vector<double>& t = stretch.minutes;
  const auto first = static_cast<std::size_t>(
      std::lower_bound(t.begin(), t.end(), apex - reach) - t.begin());
  const auto last = static_cast<std::size_t>(
      std::upper_bound(t.begin(), t.end(), apex + reach) - t.begin());
  if (last < first + kOrder + 2) return apex;
  const std::span<const double> signal = stretch.signal;
  const LocalFit fit(std::span<const double>(t).subspan(first, last - first),
                     signal.subspan(first, last - first), kOrder);
  double found = apex;
  for (int round = 0; round < 8; ++round) {
    const Jet there = fit.at(found);
    if (!(there[2] < 0.0)) return apex;
    found -= there[1] / there[2];
    if (!(std::abs(found - apex) < 0.5 * width_half_minutes)) return apex;
  }
  return found;
}

}  // namespace loqsmith
