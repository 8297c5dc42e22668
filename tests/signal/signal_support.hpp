#pragma once

#include <algorithm>
#include <string>
#include <vector>

#include "loqsmith/signal/learn.hpp"
#include "loqsmith/signal/measure_peak.hpp"
#include "loqsmith/signal/noise.hpp"
#include "support/simulator.hpp"

namespace loqsmith::test {

/// What most tests here look for: a peak at 5 minutes.
inline TargetSettings target_at(double minutes, double window = 0.2) {
  TargetSettings target;
  target.id = "simazine";
  target.trace = "uv220";
  target.retention_minutes = minutes;
  target.window_minutes = window;
  return target;
}

inline WindowTemplate window_of(double left, double right, double width_half) {
  WindowTemplate window;
  window.left_minutes = left;
  window.right_minutes = right;
  window.width_half_minutes = width_half;
  return window;
}

/// The template that one standard of height 500 and sigma 0.05 teaches.
inline Outcome<WindowTemplate> taught_by(const Trace& trace,
                                         const TargetSettings& target) {
  const Outcome<TeacherPeak> seen =
      observe_teacher(trace, target, 1, Role::Standard);
  if (!seen) return NotApplicable{seen.reason()};
  return learn_template({*seen});
}

inline Outcome<NoiseEstimate> no_noise() { return NotApplicable{"none"}; }

inline bool has_reason(const Peak& peak, const std::string& word) {
  return std::find(peak.reasons.begin(), peak.reasons.end(), word) !=
         peak.reasons.end();
}

inline bool begins_with(const std::string& text, const std::string& head) {
  return text.substr(0, head.size()) == head;
}

}  // namespace loqsmith::test
