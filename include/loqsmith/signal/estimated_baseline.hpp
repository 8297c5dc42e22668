#pragma once

#include <optional>
#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/chromatogram/trace.hpp"
#include "loqsmith/signal/noise_model.hpp"
#include "loqsmith/signal/place_window.hpp"
#include "loqsmith/signal/settings.hpp"
#include "loqsmith/signal/summits.hpp"

namespace loqsmith {

/// "valley", "asymmetric-least-squares", "snip": the words of the method.
std::string baseline_name(IntegrationSettings::Baseline baseline);

/// The reverse; valley for any other word.
IntegrationSettings::Baseline baseline_from_name(const std::string& name);

/// True for a baseline that is estimated below the whole stretch, instead of a
/// straight line from foot to foot.
bool is_estimated(IntegrationSettings::Baseline baseline);

/// Smoothness of the asymmetric baseline, from the template:
///
///     (2 width_half / step)^4
///
/// that is a period of 12.6 widths at half height halved. A peak's points get
/// no weight, so the curve must bridge a gap of 3 to 5 widths without diving
/// into it: a gap of half a period or less is crossed on the curvature of its
/// surroundings. Waves of 30 widths and more are followed to 3 % of their
/// height.
double baseline_smoothness(double width_half_minutes, double step_minutes);

/// Widest window of snip to either side, in steps: two widths at half height
/// (a Gaussian is down to a hundred-thousandth of its height there) or the
/// template's longer side where it is more, and a quarter of a width for the
/// smoothing before it.
///
/// Source: "half of the widest peak's base width", M. Morhac et al., Nucl.
/// Instrum. Methods A 401 (1997) 113; from memory.
int snip_window(double width_half_minutes, double longer_side_minutes,
                double step_minutes);

/// A baseline below a stretch of a trace.
struct EstimatedBaseline {
  std::vector<double> signal;  ///< one for each point
  bool settled = true;  ///< false: still moving after the most solves allowed
};

/// The baseline that the method names, for a target of this width; nothing for
/// the straight one.
///
/// First the parabola through a softer baseline (smoothness (width_half /
/// step)^4) is taken off, so that a bend over the whole stretch, which neither
/// method follows to its ends, does no harm. Then
///
/// asymmetric least squares: the weights that know the noise, to a ratio of
/// 0.001; snip: decreasing windows on the signal itself (no logarithms, which
/// would make the response depend on the detector's offset and unit), smoothed
/// before by the mean over half a width at half height, as long as the straight
/// baseline's own means are: of single points it would follow the lowest.
/// Both scale with the signal and move with its offset.
///
/// Both lie below the middle of the noise where there is no peak: see
/// baseline_bias.hpp.
///
/// @param near                the target and at least some 10 widths on either
///                            side
/// @param longer_side_minutes of the template; 0: not known yet
std::optional<EstimatedBaseline> estimate_baseline(
    const Trace& near, IntegrationSettings::Baseline baseline,
    double width_half_minutes, double longer_side_minutes);

/// smooth_stretch() of the signal above the baseline that the settings name;
/// of the signal itself for the straight one, which is laid later.
SmoothedStretch smooth_stretch_above(Trace near,
                                     const IntegrationSettings& settings,
                                     double width_half_minutes,
                                     double longer_side_minutes,
                                     const NoiseModel& noise);

/// place_window(); where the baseline has been taken off, that of the window is
/// zero and no point holds it.
Outcome<PlacedWindow> place_window_above(const SmoothedStretch& stretch,
                                         const std::vector<Summit>& neighbours,
                                         const Placement& placement);

}  // namespace loqsmith
