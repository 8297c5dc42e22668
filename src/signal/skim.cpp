#include "loqsmith/signal/skim.hpp"

#include <algorithm>
#include <cmath>
#include <span>

#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/signal/integrate.hpp"

namespace loqsmith {
namespace {

constexpr double kAnchorWidths = 0.1;
constexpr std::size_t kLeastAnchorPoints = 3;
// The highest of what goes unseen, in noise standard deviations.
constexpr double kUnseenHeight = 3.0;
// A flank becomes a tail where a tenth of the parent's height is left.
constexpr double kTailShare = 0.1;

// The points about a time that hold one end of a skimming line.
Foot hold_at(const SmoothedStretch& stretch, double at, double reach) {
  const std::vector<double>& t = stretch.minutes;
  auto first = static_cast<std::size_t>(
      std::lower_bound(t.begin(), t.end(), at - reach) - t.begin());
  auto last = static_cast<std::size_t>(
      std::upper_bound(t.begin(), t.end(), at + reach) - t.begin());
  const std::size_t least = std::min(kLeastAnchorPoints, t.size());
  while (last - first < least) {
    const bool left_next =
        last == t.size() || (first > 0 && at - t[first - 1] <= t[last] - at);
    if (left_next) {
      --first;
    } else {
      ++last;
    }
  }
  Foot foot;
  foot.minutes = at;
  foot.dropped = true;
  foot.crowded = true;
  foot.first = first;
  foot.last = last;
  const std::size_t n = last - first;
  foot.anchor_minutes = mean(std::span(t).subspan(first, n));
  foot.anchor_signal = mean(std::span(stretch.signal).subspan(first, n));
  return foot;
}

// Where a line from the valley touches the trace behind the rider: the least
// steep way down, seen outwards from the parent.
double touching_point(const SmoothedStretch& stretch, double valley,
                      double apex, double end) {
  const double from = smoothed_at(stretch, valley);
  const double direction = end > valley ? 1.0 : -1.0;
  double where = end;
  double least = (smoothed_at(stretch, end) - from) / std::abs(end - valley);
  for (std::size_t i = 0; i < stretch.minutes.size(); ++i) {
    const double t = stretch.minutes[i];
    if (direction * (t - apex) <= 0.0 || direction * (end - t) <= 0.0) continue;
    const double slope = (stretch.smoothed[i] - from) / std::abs(t - valley);
    if (slope < least) {
      least = slope;
      where = t;
    }
  }
  return where;
}

class Skim {
 public:
  Skim(const SmoothedStretch& stretch, const std::vector<Summit>& neighbours,
       const PlacedWindow& placed, const Placement& placement)
      : stretch_(stretch),
        neighbours_(neighbours),
        placed_(placed),
        placement_(placement) {}

  std::optional<PartedPeak> part() const {
    if (const auto rider = as_rider()) return rider;
    return as_parent();
  }

 private:
  double above_baseline(double at) const {
    return smoothed_at(stretch_, at) - placed_.baseline_at(at);
  }

  // The neighbour that bounds the window on one side.
  std::optional<double> neighbour(bool left) const {
    if (!(left ? placed_.left : placed_.right).dropped) return {};
    const double least =
        (placement_.found ? 0.5 : 0.75) * placement_.width_half;
    std::optional<double> nearest;
    for (const Summit& summit : neighbours_) {
      const double out = left ? placement_.apex - summit.minutes
                              : summit.minutes - placement_.apex;
      if (out <= least) continue;
      if (!nearest || out < std::abs(*nearest - placement_.apex)) {
        nearest = summit.minutes;
      }
    }
    return nearest;
  }

  // Line below a peak at `apex` whose parent stands on its left or right.
  PlacedWindow line_below(const PlacedWindow& own, double apex, bool found,
                          bool parent_left) const {
    const Foot& near = parent_left ? own.left : own.right;
    const Foot& far = parent_left ? own.right : own.left;
    const double end =
        found ? touching_point(stretch_, near.minutes, apex, far.minutes)
              : far.minutes;
    const double reach = kAnchorWidths * placement_.width_half;
    PlacedWindow line;
    (parent_left ? line.left : line.right) =
        hold_at(stretch_, near.minutes, reach);
    (parent_left ? line.right : line.left) = hold_at(stretch_, end, reach);
    return line;
  }

  double height_over(const PlacedWindow& line, double apex) const {
    return smoothed_at(stretch_, apex) - line.baseline_at(apex);
  }

  bool rides(double rider_height, double parent_height) const {
    const double least = kUnseenHeight * placement_.noise;
    return parent_height >= kParentOverRider * std::max(rider_height, least);
  }

  std::optional<PartedPeak> as_rider() const {
    const auto left = neighbour(true);
    const auto right = neighbour(false);
    if (!left && !right) return {};
    const bool parent_left =
        left && (!right || above_baseline(*left) >= above_baseline(*right));
    const double parent = parent_left ? *left : *right;
    const PlacedWindow line =
        line_below(placed_, placement_.apex, placement_.found, parent_left);
    const double height =
        placement_.found ? height_over(line, placement_.apex) : 0.0;
    if (!rides(height, above_baseline(parent))) return {};
    const Foot& near = parent_left ? line.left : line.right;
    if (!placement_.found &&
        above_baseline(near.minutes) > kTailShare * above_baseline(parent)) {
      return {};
    }
    return parted(line, {});
  }

  // The rider's line on one side, where the neighbour there is a rider.
  std::optional<PlacedWindow> rider_on(bool left) const {
    const auto rider = neighbour(left);
    if (!rider || !placement_.found) return {};
    const Outcome<PlacedWindow> own =
        place_window(stretch_, with_target(),
                     {*rider, placement_.left, placement_.right,
                      placement_.width_half, true, placement_.noise});
    if (!own || !(left ? own->right : own->left).dropped) return {};
    const PlacedWindow line = line_below(*own, *rider, true, !left);
    if (!rides(height_over(line, *rider), above_baseline(placement_.apex))) {
      return {};
    }
    return line;
  }

  // The target may be too close to its own refined apex to be told from it.
  std::vector<Summit> with_target() const {
    std::vector<Summit> all = neighbours_;
    const bool known =
        std::any_of(all.begin(), all.end(), [&](const Summit& summit) {
          return std::abs(summit.minutes - placement_.apex) <
                 0.5 * placement_.width_half;
        });
    if (!known) all.push_back({placement_.apex, 0.0, 0.0});
    return all;
  }

  std::optional<PartedPeak> as_parent() const {
    PlacedWindow whole = placed_;
    std::vector<PlacedWindow> riders;
    for (const bool left : {true, false}) {
      auto line = rider_on(left);
      if (!line) continue;
      const double end = whole_foot(left);
      Foot& foot = left ? whole.left : whole.right;
      foot.minutes = end;
      foot.dropped = false;
      Foot& outer = left ? line->left : line->right;
      const Foot& inner = left ? line->right : line->left;
      outer.minutes =
          left ? std::max(outer.minutes, end) : std::min(outer.minutes, end);
      const bool inside =
          left ? outer.minutes < inner.minutes : inner.minutes < outer.minutes;
      if (inside) riders.push_back(*line);
    }
    if (whole.left.dropped == placed_.left.dropped &&
        whole.right.dropped == placed_.right.dropped) {
      return {};
    }
    return parted(whole, riders);
  }

  // The template's foot, or the valley of a neighbour beyond the rider.
  double whole_foot(bool left) const {
    const double rider = *neighbour(left);
    std::vector<Summit> others = neighbours_;
    std::erase_if(
        others, [&](const Summit& summit) { return summit.minutes == rider; });
    const Outcome<PlacedWindow> without =
        place_window(stretch_, others, placement_);
    if (!without) return (left ? placed_.left : placed_.right).minutes;
    return (left ? without->left : without->right).minutes;
  }

  PartedPeak parted(const PlacedWindow& window,
                    const std::vector<PlacedWindow>& riders) const {
    PartedPeak peak;
    peak.overlap = "skim";
    peak.apex = placement_.apex;
    peak.window = window;
    peak.area = integrate_window(stretch_, window);
    peak.height =
        signal_near(stretch_, peak.apex) - window.baseline_at(peak.apex);
    const std::size_t points = stretch_.minutes.size();
    peak.area_weights = area_weights(stretch_, window).over(points);
    peak.height_weights =
        height_weights(stretch_, window, peak.apex).over(points);
    for (const PlacedWindow& rider : riders) {
      peak.area -= integrate_window(stretch_, rider);
      const PointWeights off = area_weights(stretch_, rider);
      for (std::size_t i = 0; i < off.values.size(); ++i) {
        peak.area_weights[off.first + i] -= off.values[i];
      }
    }
    return peak;
  }

  const SmoothedStretch& stretch_;
  const std::vector<Summit>& neighbours_;
  const PlacedWindow& placed_;
  const Placement& placement_;
};

}  // namespace

std::optional<PartedPeak> skim_overlap(const SmoothedStretch& stretch,
                                       const std::vector<Summit>& neighbours,
                                       const PlacedWindow& placed,
                                       const Placement& placement) {
  return Skim(stretch, neighbours, placed, placement).part();
}

}  // namespace loqsmith
