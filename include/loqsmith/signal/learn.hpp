#pragma once

#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/chromatogram/role.hpp"
#include "loqsmith/chromatogram/trace.hpp"
#include "loqsmith/signal/noise_model.hpp"
#include "loqsmith/signal/settings.hpp"
#include "loqsmith/signal/template_shape.hpp"

namespace loqsmith {

/// What one standard, check standard or control shows of a target.
struct TeacherPeak {
  int injection = 0;
  Role role = Role::Standard;
  double retention_minutes = 0.0;   ///< interpolated apex
  double left_minutes = 0.0;        ///< apex minus left foot, > 0
  double right_minutes = 0.0;       ///< right foot minus apex, > 0
  double width_half_minutes = 0.0;  ///< > 0
  double height = 0.0;              ///< above the baseline between the feet
  double height_over_noise = 0.0;   ///< multiples of the noise sd
  bool saturated = false;           ///< flat top
  bool left_overlapped = false;     ///< a neighbour's valley is the left foot
  bool right_overlapped = false;
  /// Only where the target's overlap is `model` and its fit succeeds; 0 else.
  double sigma_minutes = 0.0;
  double tau_minutes = 0.0;
  /// Only where the target's response is `template`; otherwise empty.
  PeakSlice slice = {};
  NoiseModel noise_model = {};  ///< of the same trace, beside the peak
};

/// Where the target is to be looked for and over what window it is measured.
struct WindowTemplate {
  double left_minutes = 0.0;  ///< distance of the feet from the apex, medians
  double right_minutes = 0.0;
  double width_half_minutes = 0.0;  ///< median
  bool weak = false;  ///< no teacher at 50 noise sd: reason weak-template
  std::vector<int> teachers;  ///< injections whose feet entered, in run order
  /// Retention time in run order; piecewise linear, constant beyond the last.
  std::vector<std::pair<int, double>> drift;  ///< injection, minutes
  /// Medians of the fitted exponentially modified Gaussians, only where the
  /// target's overlap is `model`; a sigma of 0: not known.
  double sigma_minutes = 0.0;
  double tau_minutes = 0.0;
  /// Only where the target's response is `template`; otherwise empty. Learned
  /// from the teachers of the window; overlapped ones never teach it.
  TemplateShape shape = {};
  /// The one noise model that the template's weights follow in the whole
  /// sequence; until the blanks are known, that of the teachers' traces.
  NoiseModel weights_noise = {};
};

/// The peak nearest the method's retention time within its window.
/// @return not applicable: no peak in the window, trace does not cover it.
Outcome<TeacherPeak> observe_teacher(const Trace& trace,
                                     const TargetSettings& target,
                                     int injection, Role role);

/// Medians over the peaks fit to teach: height at least 50 noise standard
/// deviations, not saturated, not overlapped; if there is none, the highest
/// unsaturated standards from 10 up (an overlapped one gives its free side's
/// foot and the valley), then `weak`.
/// @return not applicable where nothing may teach, with the reason.
Outcome<WindowTemplate> learn_template(const std::vector<TeacherPeak>& seen);

/// Where the target is expected in an injection, from the drift.
double expected_minutes(const WindowTemplate& window, int injection);

}  // namespace loqsmith
