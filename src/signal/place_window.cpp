#include "loqsmith/signal/place_window.hpp"

#include <algorithm>
#include <cmath>
#include <optional>
#include <span>

#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/signal/point_noise.hpp"
#include "loqsmith/signal/ringing.hpp"
#include "loqsmith/signal/time_index.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kLeastAnchorPoints = 5;
constexpr std::size_t kFewestAnchorPoints = 2;
// What is left of a neighbour where it no longer disturbs a baseline. More of a
// tall one would lift the baseline of a low peak by more than its noise.
constexpr double kFlankEnd = 0.0005;
constexpr double kHiddenFlank = 0.15;
// Feet stand where a thousandth of the height is left; a neighbour of the same
// shape is down to a hundredth at this share of their distance.
constexpr double kFlankShare = 0.8;
// Four standard deviations of a Gaussian, in widths at half height.
constexpr double kClearWidths = 1.7;

// One side is worked out in distances from the apex, outwards positive, so
// that left and right are one piece of code.
class Side {
 public:
  Side(const SmoothedStretch& stretch, const Placement& placement, bool left)
      : stretch_(stretch), placement_(placement), left_(left) {}

  Foot place(const std::vector<Summit>& neighbours) {
    Foot foot;
    double end = length();
    double anchor_from = end;
    double limit = reach();
    double inner = placement_.found ? 0.0 : 0.5 * length();
    for (const double summit : outward(neighbours)) {
      const double valley = valley_before(inner, summit);
      const double edge = flank_begin(valley, summit);
      limit = std::min(limit, edge);
      if (points_between(anchor_from, edge) >= kFewestAnchorPoints) break;
      if (edge < end && !foot.crowded) {
        foot.dropped = true;
        end = std::min(end, valley);
      }
      foot.crowded = true;
      anchor_from = summit + clear_distance();
      limit = reach();
      inner = summit;
    }
    foot.minutes = at(end);
    hold_baseline(foot, anchor_from, limit);
    return foot;
  }

 private:
  double length() const { return left_ ? placement_.left : placement_.right; }
  // A foot that is itself a valley says nothing of where a neighbour ends.
  double clear_distance() const {
    return std::max(length(), kClearWidths * placement_.width_half);
  }
  double at(double distance) const {
    return placement_.apex + (left_ ? -distance : distance);
  }
  double distance(double minutes) const {
    return left_ ? placement_.apex - minutes : minutes - placement_.apex;
  }
  double reach() const {
    return distance(left_ ? stretch_.minutes.front() : stretch_.minutes.back());
  }
  double smoothed(double distance_out) const {
    return smoothed_at(stretch_, at(distance_out));
  }

  std::vector<double> outward(const std::vector<Summit>& neighbours) const {
    const double least =
        (placement_.found ? 0.5 : 0.75) * placement_.width_half;
    std::vector<double> distances;
    for (const Summit& summit : neighbours) {
      const double out = distance(summit.minutes);
      if (out > least) distances.push_back(out);
    }
    std::sort(distances.begin(), distances.end());
    return distances;
  }

  double valley_before(double from, double summit) const {
    const double a = at(std::min(from, summit));
    const double b = at(summit);
    return distance(lowest_between(stretch_, std::min(a, b), std::max(a, b)));
  }

  // Where a neighbour's flank begins: at most where it would by the template,
  // mirrored; further in where its signal is not yet down to the valley.
  double flank_begin(double valley, double summit) const {
    const double mirrored = left_ ? placement_.right : placement_.left;
    const double low = smoothed(valley);
    const double level = std::max(2.0 * stretch_.gain * placement_.noise,
                                  kFlankEnd * (smoothed(summit) - low));
    const double step = 0.05 * placement_.width_half;
    double out = summit;
    while (out - step > valley && smoothed(out) - low > level) out -= step;
    // Noise hides the last of the flank.
    out = std::max(valley, out - kHiddenFlank * placement_.width_half);
    return std::min(out, summit - kFlankShare * mirrored);
  }

  // Points [first, last) with a distance in [from, to).
  std::pair<std::size_t, std::size_t> range(double from, double to) const {
    const std::vector<double>& t = stretch_.minutes;
    if (!(to > from)) return {0, 0};
    return left_ ? std::pair{first_after(t, at(to)), first_after(t, at(from))}
                 : std::pair{first_at_or_after(t, at(from)),
                             first_at_or_after(t, at(to))};
  }

  std::size_t points_between(double from, double to) const {
    const auto [first, last] = range(from, to);
    return last - first;
  }

  std::size_t wanted_points(double from) const {
    return std::max(kLeastAnchorPoints,
                    points_between(from, from + 0.5 * placement_.width_half));
  }

  void hold_baseline(Foot& foot, double from, double limit) const {
    const std::size_t wanted = wanted_points(from);
    // The last point of the trace counts: a little beyond the limit.
    const double open = limit >= reach() ? limit * (1.0 + 1e-9) + 1e-9 : limit;
    auto [first, last] = range(from, open);
    if (last - first > wanted) {
      if (left_) {
        first = last - wanted;
      } else {
        last = first + wanted;
      }
    }
    foot.first = first;
    foot.last = last;
    foot.shortened = last - first < wanted;
    if (first == last) return;
    const std::size_t n = last - first;
    foot.anchor_minutes = mean(std::span(stretch_.minutes).subspan(first, n));
    foot.anchor_signal = mean(std::span(stretch_.signal).subspan(first, n));
  }

  const SmoothedStretch& stretch_;
  const Placement& placement_;
  bool left_;
};

void add_reason(PlacedWindow& window, bool holds, const char* word) {
  if (holds) window.reasons.emplace_back(word);
}

void hold_at_valley(const SmoothedStretch& stretch, Foot& foot) {
  foot.anchor_minutes = foot.minutes;
  foot.anchor_signal = smoothed_at(stretch, foot.minutes);
}

// One level baseline, or the valleys, where neighbours leave no room.
void mend_missing_anchors(const SmoothedStretch& stretch,
                          PlacedWindow& window) {
  Foot& left = window.left;
  Foot& right = window.right;
  if (left.points() > 0 && right.points() > 0) return;
  if (left.points() == 0 && right.points() == 0) {
    hold_at_valley(stretch, left);
    hold_at_valley(stretch, right);
    add_reason(window, true, "baseline-at-valley");
    return;
  }
  Foot& bare = left.points() == 0 ? left : right;
  const Foot& held = left.points() == 0 ? right : left;
  bare.anchor_minutes = bare.minutes;
  bare.anchor_signal = held.anchor_signal;
  add_reason(window, true, "baseline-one-sided");
}

// What rounding alone may leave of a prominence.
double rounding_of_smoothed(const SmoothedStretch& stretch) {
  return 1e-12 * std::abs(*std::max_element(stretch.smoothed.begin(),
                                            stretch.smoothed.end()));
}

double noise_around(const SmoothedStretch& stretch, const Summit& summit,
                    double width_half) {
  const std::vector<double>& t = stretch.minutes;
  const std::size_t first = first_at_or_after(t, summit.minutes - width_half);
  const std::size_t last = first_after(t, summit.minutes + width_half);
  return point_to_point_noise(
      std::span(stretch.signal).subspan(first, last - first));
}

}  // namespace

double PlacedWindow::right_share(double minutes) const {
  return (minutes - left.anchor_minutes) /
         (right.anchor_minutes - left.anchor_minutes);
}

double PlacedWindow::baseline_at(double minutes) const {
  return left.anchor_signal +
         right_share(minutes) * (right.anchor_signal - left.anchor_signal);
}

Outcome<PlacedWindow> place_window(const SmoothedStretch& stretch,
                                   const std::vector<Summit>& neighbours,
                                   const Placement& placement) {
  if (stretch.minutes.size() < 2) {
    return NotApplicable{"window-not-covered: the trace has no points there"};
  }
  PlacedWindow window;
  window.left = Side(stretch, placement, true).place(neighbours);
  window.right = Side(stretch, placement, false).place(neighbours);
  if (!(window.left.minutes >= stretch.minutes.front())) {
    return NotApplicable{"window-not-covered: the trace begins too late"};
  }
  if (!(window.right.minutes <= stretch.minutes.back())) {
    return NotApplicable{"window-not-covered: the trace ends too early"};
  }
  if (window.left.points() == 0 && !window.left.crowded) {
    return NotApplicable{
        "window-not-covered: no point before it for the baseline"};
  }
  if (window.right.points() == 0 && !window.right.crowded) {
    return NotApplicable{
        "window-not-covered: no point after it for the baseline"};
  }
  const bool dropped = window.left.dropped || window.right.dropped;
  add_reason(window, dropped, "overlapped");
  add_reason(window, window.left.shortened || window.right.shortened,
             "baseline-shortened");
  mend_missing_anchors(stretch, window);
  return window;
}

std::vector<Summit> significant_summits(const SmoothedStretch& stretch,
                                        const std::vector<Summit>& summits,
                                        double multiple, double noise,
                                        double width_half) {
  std::vector<Summit> significant;
  std::optional<double> rounding;  // few traces need it
  const double unit = multiple * std::sqrt(2.0) * stretch.gain;
  for (const Summit& summit : summits) {
    if (!(summit.prominence > unit * noise)) continue;
    if (!rounding) rounding = rounding_of_smoothed(stretch);
    if (!(summit.prominence > *rounding)) continue;
    const double here = noise_around(stretch, summit, width_half);
    if (!(summit.prominence > unit * here)) continue;
    if (is_ringing(stretch, summits, summit, multiple, noise)) continue;
    significant.push_back(summit);
  }
  return significant;
}

}  // namespace loqsmith
