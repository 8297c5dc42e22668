#include <algorithm>
#include <functional>
#include <utility>

#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/signal/learn.hpp"
#include "loqsmith/signal/typical_noise.hpp"

namespace loqsmith {
namespace {

constexpr double kTeachingHeight = 50.0;
constexpr double kWeakTeachingHeight = 10.0;
// As many of the highest standards as give a median that one cannot move.
constexpr std::size_t kWeakTeachers = 3;
constexpr std::size_t kFewestSlicePoints = 5;

using Peaks = std::vector<TeacherPeak>;

bool overlapped(const TeacherPeak& peak) {
  return peak.left_overlapped || peak.right_overlapped;
}

Peaks good_teachers(const Peaks& seen) {
  Peaks good;
  for (const TeacherPeak& peak : seen) {
    if (peak.height_over_noise >= kTeachingHeight && !peak.saturated &&
        !overlapped(peak)) {
      good.push_back(peak);
    }
  }
  return good;
}

Peaks weak_teachers(const Peaks& seen) {
  Peaks weak;
  for (const TeacherPeak& peak : seen) {
    if (peak.role == Role::Standard && !peak.saturated &&
        peak.height_over_noise >= kWeakTeachingHeight) {
      weak.push_back(peak);
    }
  }
  std::stable_sort(weak.begin(), weak.end(),
                   [](const TeacherPeak& a, const TeacherPeak& b) {
                     return a.height > b.height;
                   });
  if (weak.size() > kWeakTeachers) weak.resize(kWeakTeachers);
  return weak;
}

double median_of(const Peaks& peaks, double TeacherPeak::*measure) {
  std::vector<double> values;
  for (const TeacherPeak& peak : peaks) values.push_back(peak.*measure);
  return median(values);
}

// The free feet where some are free, otherwise the valleys.
double median_foot(const Peaks& peaks, double TeacherPeak::*foot,
                   bool TeacherPeak::*is_overlapped) {
  Peaks free;
  for (const TeacherPeak& peak : peaks) {
    if (!(peak.*is_overlapped)) free.push_back(peak);
  }
  return median_of(free.empty() ? peaks : free, foot);
}

// The mean shape of those teachers that stand alone.
void learn_shape(const Peaks& teachers, WindowTemplate& window) {
  std::vector<ShapeLesson> lessons;
  std::vector<NoiseModel> noises;
  for (const TeacherPeak& peak : teachers) {
    if (peak.slice.offsets.size() < kFewestSlicePoints || overlapped(peak)) {
      continue;
    }
    lessons.push_back({peak.slice, peak.left_minutes, peak.right_minutes,
                       peak.height / peak.height_over_noise});
    noises.push_back(peak.noise_model);
  }
  const Outcome<TemplateShape> shape =
      mean_shape(lessons, window.left_minutes, window.right_minutes);
  if (!shape) return;
  window.shape = *shape;
  window.weights_noise = typical_noise(noises);
}

// The middle of what the teachers' own fits say, where any succeeded.
void learn_model(const Peaks& teachers, WindowTemplate& window) {
  Peaks fitted;
  for (const TeacherPeak& peak : teachers) {
    if (peak.sigma_minutes > 0.0) fitted.push_back(peak);
  }
  if (fitted.empty()) return;
  window.sigma_minutes = median_of(fitted, &TeacherPeak::sigma_minutes);
  window.tau_minutes = median_of(fitted, &TeacherPeak::tau_minutes);
}

std::vector<std::pair<int, double>> retention_drift(const Peaks& seen) {
  std::vector<std::pair<int, double>> drift;
  for (const TeacherPeak& peak : seen) {
    if (peak.height_over_noise >= kWeakTeachingHeight && !peak.saturated) {
      drift.emplace_back(peak.injection, peak.retention_minutes);
    }
  }
  std::stable_sort(
      drift.begin(), drift.end(),
      [](const auto& a, const auto& b) { return a.first < b.first; });
  return drift;
}

std::string why_none(const Peaks& seen) {
  if (seen.empty()) return "no-teacher: no standard shows a peak";
  const bool all_saturated = std::all_of(seen.begin(), seen.end(),
                                         std::mem_fn(&TeacherPeak::saturated));
  if (all_saturated) return "no-teacher: all peaks of standards are saturated";
  return "no-teacher: no unsaturated standard reaches 10 times the noise";
}

}  // namespace

Outcome<WindowTemplate> learn_template(const std::vector<TeacherPeak>& seen) {
  WindowTemplate window;
  Peaks teachers = good_teachers(seen);
  if (teachers.empty()) {
    teachers = weak_teachers(seen);
    window.weak = true;
  }
  if (teachers.empty()) return NotApplicable{why_none(seen)};
  window.left_minutes = median_foot(teachers, &TeacherPeak::left_minutes,
                                    &TeacherPeak::left_overlapped);
  window.right_minutes = median_foot(teachers, &TeacherPeak::right_minutes,
                                     &TeacherPeak::right_overlapped);
  window.width_half_minutes =
      median_of(teachers, &TeacherPeak::width_half_minutes);
  learn_model(teachers, window);
  learn_shape(teachers, window);
  for (const TeacherPeak& peak : teachers) {
    window.teachers.push_back(peak.injection);
  }
  std::sort(window.teachers.begin(), window.teachers.end());
  window.drift = retention_drift(seen);
  return window;
}

double expected_minutes(const WindowTemplate& window, int injection) {
  const auto& drift = window.drift;
  if (drift.empty()) return 0.0;
  if (injection <= drift.front().first) return drift.front().second;
  if (injection >= drift.back().first) return drift.back().second;
  const auto next = std::upper_bound(
      drift.begin(), drift.end(), injection,
      [](int number, const auto& entry) { return number < entry.first; });
  const auto before = next - 1;
  const double share = static_cast<double>(injection - before->first) /
                       static_cast<double>(next->first - before->first);
  return before->second + share * (next->second - before->second);
}

}  // namespace loqsmith
