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
// Below this height over all noise, creeping noise included, a summit of the
// first sight is passed over.
constexpr double kLeastHeight = 5.0;
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

bool covers(const Trace& trace, double from, double to) {
  return trace.minutes.size() >= 5 && trace.minutes.front() <= from &&
         trace.minutes.back() >= to;
}

// All that may be the target at first sight, the nearest to the method's time
// first; with little smoothing, because no width is known yet.
std::vector<Sighting> first_sightings(const Trace& trace,
                                      const TargetSettings& target) {
  const double middle = target.retention_minutes;
  const double reach = 4.0 * target.window_minutes;
  const Trace near = cut_trace(trace, middle - reach, middle + reach);
  const double noise = point_to_point_noise(near.signal);
  const int points = target.integration.smoothing_points > 0
                         ? target.integration.smoothing_points
                         : kFirstSmoothing;
  const SmoothedStretch stretch =
      smooth_stretch(near, points, 2, white_noise(noise));
  std::vector<Sighting> sightings;
  for (const Summit& summit :
       significant_summits(stretch, find_summits(stretch), kSummitMultiple,
                           noise, 3.0 * typical_step(near.minutes))) {
    if (std::abs(summit.minutes - middle) > target.window_minutes) continue;
    const double width = half_distance(stretch, summit, true) +
                         half_distance(stretch, summit, false);
    sightings.push_back({summit.minutes, width});
  }
  std::stable_sort(sightings.begin(), sightings.end(),
                   [&](const Sighting& a, const Sighting& b) {
                     return std::abs(a.apex - middle) <
                            std::abs(b.apex - middle);
                   });
  return sightings;
}

// The width found with the right smoothing sets the smoothing once more.
Outcome<TeacherFeet> look_closer(const Trace& trace,
                                 const TargetSettings& target,
                                 const Sighting& first) {
  const Outcome<TeacherFeet> feet =
      find_teacher_feet(trace, target, first.apex, first.width_half);
  if (!feet) return feet;
  return find_teacher_feet(trace, target, feet->apex, feet->width_half);
}

TeacherPeak teacher_peak(const TeacherFeet& feet, int injection, Role role) {
  TeacherPeak peak;
  peak.injection = injection;
  peak.role = role;
  peak.retention_minutes = feet.apex;
  peak.left_minutes = feet.left;
  peak.right_minutes = feet.right;
  peak.width_half_minutes = feet.width_half;
  peak.height = feet.height;
  peak.height_over_noise = feet.height < kNoiselessMultiple * feet.noise
                               ? feet.height / feet.noise
                               : kNoiselessMultiple;
  peak.saturated = feet.saturated;
  peak.left_overlapped = feet.left_overlapped;
  peak.right_overlapped = feet.right_overlapped;
  peak.sigma_minutes = feet.sigma;
  peak.tau_minutes = feet.tau;
  return peak;
}

void add_shape(TeacherPeak& peak, const Trace& trace, const TeacherFeet& feet) {
  peak.slice = slice_of_peak(trace, feet);
  peak.noise_model = fit_noise_model(trace, feet.apex - feet.left,
                                     feet.apex + feet.right, feet.width_half);
}

}  // namespace

Outcome<TeacherPeak> observe_teacher(const Trace& trace,
                                     const TargetSettings& target,
                                     int injection, Role role) {
  if (!covers(trace, target.retention_minutes - target.window_minutes,
              target.retention_minutes + target.window_minutes)) {
    return NotApplicable{
        "window-not-covered: the trace does not hold the whole window"};
  }
  NotApplicable why{"no-peak: none in the window of retention times"};
  for (const Sighting& sighting : first_sightings(trace, target)) {
    const Outcome<TeacherFeet> feet = look_closer(trace, target, sighting);
    if (!feet) {
      why.reason = feet.reason();
    } else if (feet->height >= kLeastHeight * feet->noise) {
      TeacherPeak peak = teacher_peak(*feet, injection, role);
      if (target.integration.response ==
          IntegrationSettings::Response::Template) {
        add_shape(peak, trace, *feet);
      }
      return peak;
    }
  }
  return why;
}

}  // namespace loqsmith
