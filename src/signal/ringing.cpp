#include "loqsmith/signal/ringing.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>

namespace loqsmith {
namespace {

constexpr double kTaller = 30.0;
constexpr double kReachLengths = 2.5;
constexpr double kMeanShare = 1.0 / 3.0;

struct LocalMean {
  double value = 0.0;
  double points = 0.0;
};

LocalMean mean_around(const SmoothedStretch& stretch, double minutes,
                      double half_width) {
  const std::vector<double>& t = stretch.minutes;
  const auto first =
      std::lower_bound(t.begin(), t.end(), minutes - half_width) - t.begin();
  const auto last =
      std::upper_bound(t.begin(), t.end(), minutes + half_width) - t.begin();
  LocalMean mean;
  for (auto i = static_cast<std::size_t>(first);
       i < static_cast<std::size_t>(last); ++i) {
    mean.value += stretch.signal[i];
    mean.points += 1.0;
  }
  if (mean.points > 0.0) mean.value /= mean.points;
  return mean;
}

// The dip towards the taller summit is where smoothing makes one, and the
// signal itself does not rise from it.
bool dips_by_smoothing(const SmoothedStretch& stretch, const Summit& taller,
                       const Summit& summit, double multiple, double noise) {
  const double length =
      stretch.spacing.step * static_cast<double>(stretch.points);
  const double dip =
      lowest_between(stretch, std::min(taller.minutes, summit.minutes),
                     std::max(taller.minutes, summit.minutes));
  if (std::abs(dip - taller.minutes) > kReachLengths * length) return false;
  const double half_width = 0.5 * kMeanShare * length;
  const LocalMean low = mean_around(stretch, dip, half_width);
  const LocalMean high = mean_around(stretch, summit.minutes, half_width);
  if (!(low.points > 0.0) || !(high.points > 0.0)) return false;
  const double spread = noise * std::sqrt(1.0 / low.points + 1.0 / high.points);
  return !(high.value - low.value > multiple * spread);
}

}  // namespace

bool is_ringing(const SmoothedStretch& stretch,
                const std::vector<Summit>& summits, const Summit& summit,
                double multiple, double noise) {
  if (stretch.order < 2 || stretch.points < 5) return false;
  return std::any_of(summits.begin(), summits.end(), [&](const Summit& other) {
    return other.prominence > kTaller * summit.prominence &&
           dips_by_smoothing(stretch, other, summit, multiple, noise);
  });
}

}  // namespace loqsmith
