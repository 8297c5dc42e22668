#include <algorithm>
#include <cmath>
#include <optional>

#include "loqsmith/signal/integrate.hpp"
#include "loqsmith/signal/learn.hpp"
#include "loqsmith/signal/noise.hpp"
#include "loqsmith/signal/peak_shape.hpp"
#include "loqsmith/signal/place_window.hpp"
#include "loqsmith/signal/point_noise.hpp"
#include "loqsmith/signal/saturation.hpp"
#include "loqsmith/signal/summits.hpp"
#include "loqsmith/signal/teacher_feet.hpp"

namespace loqsmith {
namespace {

constexpr double kSummitMultiple = 5.0;
constexpr int kFirstSmoothing = 5;
// Stands for "no noise to be seen": infinity is no number of ours.
constexpr double kNoiselessMultiple = 1e9;

// What is known of the peak so far.
struct Sighting {
  double apex = 0.0;
  double width_half = 0.0;
};

// Distance from the summit to half of its prominence, on one side.
double half_distance(const SmoothedStretch& stretch, const Summit& summit,
                     bool left) {
  const double level = summit.value - 0.5 * summit.prominence;
  const std::vector<double>& t = stretch.minutes;
  double last = 0.0;
  for (std::size_t k = 0; k < t.size(); ++k) {
    const std::size_t i = left ? t.size() - 1 - k : k;
    const double out = left ? summit.minutes - t[i] : t[i] - summit.minutes;
    if (out < 0.0) continue;
    last = out;
    if (stretch.smoothed[i] <= level) return out;
  }
  return last;
}

const Summit* nearest_summit(const std::vector<Summit>& summits, double at,
                             double reach) {
  const Summit* nearest = nullptr;
  double least = reach;
  for (const Summit& summit : summits) {
    const double distance = std::abs(summit.minutes - at);
    if (distance <= least) {
      nearest = &summit;
      least = distance;
    }
  }
  return nearest;
}

bool covers(const Trace& trace, double from, double to) {
  return trace.minutes.size() >= 5 && trace.minutes.front() <= from &&
         trace.minutes.back() >= to;
}

// First sight, with little smoothing, because no width is known yet.
Outcome<Sighting> first_sighting(const Trace& trace,
                                 const TargetSettings& target) {
  const double from = target.retention_minutes - target.window_minutes;
  const double to = target.retention_minutes + target.window_minutes;
  if (!covers(trace, from, to)) {
    return NotApplicable{
        "window-not-covered: the trace does not hold the whole window"};
  }
  const Trace near = cut_trace(trace, from - 3.0 * target.window_minutes,
                               to + 3.0 * target.window_minutes);
  const double noise = point_to_point_noise(near.signal);
  const int points = target.integration.smoothing_points > 0
                         ? target.integration.smoothing_points
                         : kFirstSmoothing;
  const SmoothedStretch stretch = smooth_stretch(near, points, 2, noise);
  const std::vector<Summit> summits =
      significant_summits(stretch, find_summits(stretch), kSummitMultiple,
                          noise, 3.0 * typical_step(near.minutes));
  const Summit* summit =
      nearest_summit(summits, target.retention_minutes, target.window_minutes);
  if (summit == nullptr) {
    return NotApplicable{"no-peak: none in the window of retention times"};
  }
  const double width = half_distance(stretch, *summit, true) +
                       half_distance(stretch, *summit, false);
  return Sighting{summit->minutes, width};
}

}  // namespace

Outcome<TeacherPeak> observe_teacher(const Trace& trace,
                                     const TargetSettings& target,
                                     int injection, Role role) {
  const Outcome<Sighting> first = first_sighting(trace, target);
  if (!first) return NotApplicable{first.reason()};
  Outcome<TeacherFeet> feet =
      find_teacher_feet(trace, target, first->apex, first->width_half);
  if (!feet) return NotApplicable{feet.reason()};
  // The width found with the right smoothing sets the smoothing once more.
  feet = find_teacher_feet(trace, target, feet->apex, feet->width_half);
  if (!feet) return NotApplicable{feet.reason()};

  TeacherPeak peak;
  peak.injection = injection;
  peak.role = role;
  peak.retention_minutes = feet->apex;
  peak.left_minutes = feet->left;
  peak.right_minutes = feet->right;
  peak.width_half_minutes = feet->width_half;
  peak.height = feet->height;
  peak.height_over_noise =
      feet->noise > 0.0
          ? std::min(feet->height / feet->noise, kNoiselessMultiple)
          : kNoiselessMultiple;
  peak.saturated = feet->saturated;
  peak.left_overlapped = feet->left_overlapped;
  peak.right_overlapped = feet->right_overlapped;
  return peak;
}

}  // namespace loqsmith
