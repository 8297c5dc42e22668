#include "loqsmith/signal/teacher_feet.hpp"

#include <algorithm>
#include <cmath>
#include <optional>
#include <vector>

#include "loqsmith/signal/estimated_baseline.hpp"
#include "loqsmith/signal/integrate.hpp"
#include "loqsmith/signal/model_overlap.hpp"
#include "loqsmith/signal/noise.hpp"
#include "loqsmith/signal/own_feet.hpp"
#include "loqsmith/signal/peak_shape.hpp"
#include "loqsmith/signal/place_window.hpp"
#include "loqsmith/signal/point_noise.hpp"
#include "loqsmith/signal/saturation.hpp"
#include "loqsmith/signal/summits.hpp"

namespace loqsmith {
namespace {

constexpr double kSliceWidths = 12.0;
constexpr double kOverlapShare = 0.025;
constexpr double kSharpHeight = 50.0;

// One peak at work.
class Teacher {
 public:
  Teacher(const Trace& near, const TargetSettings& target, double apex,
          double width_half)
      : noise_(point_to_point_noise(near.signal)),
        width_half_(width_half),
        stretch_(smooth_stretch_above(near, target.integration, width_half, 0.0,
                                      white_noise(noise_))),
        apex_(apex) {
    const std::vector<Summit> all = find_summits(stretch_);
    summits_ = significant_summits(stretch_, all, target.integration.threshold,
                                   noise_, width_half);
    settle_apex();
  }

  bool has_peak() const { return seen_; }
  double apex() const { return apex_; }
  const SmoothedStretch& stretch() const { return stretch_; }
  const std::vector<Summit>& summits() const { return summits_; }

  Outcome<PlacedWindow> place() const {
    return place_at_own_feet(stretch_, summits_, apex_, width_half_, noise_);
  }

  bool overlapped(const PlacedWindow& window, bool left) const {
    const Foot& foot = left ? window.left : window.right;
    if (!foot.dropped) return false;
    const double height =
        smoothed_at(stretch_, apex_) - window.baseline_at(apex_);
    const double there =
        smoothed_at(stretch_, foot.minutes) - window.baseline_at(foot.minutes);
    return there >
           std::max(kOverlapShare * height, 3.0 * stretch_.gain * noise_);
  }

 private:
  void settle_apex() {
    double least = width_half_;
    const double about = apex_;
    for (const Summit& summit : summits_) {
      const double away = std::abs(summit.minutes - about);
      if (away > least) continue;
      least = away;
      apex_ = summit.minutes;
      seen_ = true;
    }
  }

  double noise_;
  double width_half_;
  SmoothedStretch stretch_;
  double apex_;
  std::vector<Summit> summits_;
  bool seen_ = false;
};

double noise_beside(const Trace& trace, const TargetSettings& target,
                    const PlacedWindow& window, double width_half,
                    const SmoothedStretch& stretch) {
  const Outcome<NoiseEstimate> noise =
      measure_noise_beside(trace, window.left.minutes, window.right.minutes,
                           width_half, target.noise);
  return noise ? noise->standard_deviation
               : point_to_point_noise(stretch.as_detected());
}

std::optional<double> half_width(const SmoothedStretch& stretch,
                                 const PlacedWindow& window, double apex,
                                 double height) {
  const auto width = width_at(stretch, window, apex, height, 0.5, 0.0);
  if (!width) return {};
  return width->total();
}

// The shape from the fit, and what a neighbour hides: width and overlapped
// feet. False where it fails.
bool take_from_fit(const Teacher& teacher, const PlacedWindow& window,
                   double width_half, TeacherFeet& feet) {
  const Outcome<TaughtShape> taught =
      teach_shape(teacher.stretch(), teacher.summits(), window, feet.apex,
                  width_half, feet.noise);
  if (!taught) return false;
  feet.sigma = taught->sigma;
  feet.tau = taught->tau;
  const bool hidden = feet.left_overlapped || feet.right_overlapped;
  if (hidden || !(feet.width_half > 0.0)) {
    feet.width_half = taught->width_half;
  }
  if (feet.left_overlapped) feet.left = taught->left;
  if (feet.right_overlapped) feet.right = taught->right;
  return true;
}

}  // namespace

Outcome<TeacherFeet> find_teacher_feet(const Trace& trace,
                                       const TargetSettings& target,
                                       double apex, double width_half) {
  if (!(width_half > 0.0)) return NotApplicable{"no-peak: it has no width"};
  const double reach = kSliceWidths * width_half;
  const Trace near = cut_trace(trace, apex - reach, apex + reach);
  const Teacher teacher(near, target, apex, width_half);
  if (!teacher.has_peak()) {
    return NotApplicable{"no-peak: none at the smoothing of its width"};
  }
  const Outcome<PlacedWindow> window = teacher.place();
  if (!window) return NotApplicable{window.reason()};

  const SmoothedStretch& stretch = teacher.stretch();
  TeacherFeet feet;
  feet.noise = noise_beside(trace, target, *window, width_half, stretch);
  feet.apex = teacher.apex();
  feet.height =
      signal_near(stretch, feet.apex) - window->baseline_at(feet.apex);
  if (!(feet.height > 0.0)) {
    return NotApplicable{"no-peak: nothing above the baseline"};
  }
  if (feet.height >= kSharpHeight * feet.noise) {
    feet.apex = sharpened_apex(stretch, feet.apex, width_half,
                               feet.noise / feet.height);
    feet.height =
        signal_near(stretch, feet.apex) - window->baseline_at(feet.apex);
  }
  feet.left = feet.apex - window->left.minutes;
  feet.right = window->right.minutes - feet.apex;
  feet.baseline_left = window->baseline_at(window->left.minutes);
  feet.baseline_right = window->baseline_at(window->right.minutes);
  feet.left_overlapped = teacher.overlapped(*window, true);
  feet.right_overlapped = teacher.overlapped(*window, false);
  const auto width = half_width(stretch, *window, feet.apex, feet.height);
  feet.width_half = width.value_or(0.0);
  const bool fitted =
      target.integration.overlap == IntegrationSettings::Overlap::Model &&
      take_from_fit(teacher, *window, width.value_or(width_half), feet);
  if (!fitted && !width) {
    return NotApplicable{"no-peak: it does not fall to half of its height"};
  }
  feet.saturated =
      is_saturated(stretch.minutes, stretch.as_detected(), window->left.minutes,
                   window->right.minutes, feet.height, feet.width_half);
  return feet;
}

}  // namespace loqsmith
