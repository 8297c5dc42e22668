#pragma once

#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/signal/learn.hpp"
#include "loqsmith/signal/place_window.hpp"
#include "loqsmith/signal/summits.hpp"

namespace loqsmith {

/// A template scaled to one injection.
struct TemplateFit {
  double response = 0.0;        ///< signal unit x minute, signed
  std::vector<double> weights;  ///< of all points: response = sum w y
  double apex_minutes = 0.0;    ///< where the shape was placed
  double level = 0.0;           ///< of the straight baseline there
  double slope = 0.0;           ///< of the same, per minute
  double later_minutes = 0.0;   ///< by how much it would fit better later
  double misfit = 0.0;          ///< r' G^-1 r
  double allowed = 0.0;         ///< the most that passes
  bool shape_passed() const { return misfit <= allowed; }
};

/// The amount of the template's shape, together with a straight baseline, by
/// generalised least squares: the linear estimate of least variance. It is
/// fitted to the points from the outer end of the left foot's baseline points
/// to that of the right one's: the very points that the area rests on, so that
/// no neighbour enters that the area keeps out. The shape has unit area over
/// the window, so the response is an area too.
///
/// Weights follow the template's own noise model (weights_noise), one for the
/// whole sequence; they differ between injections by the places of the points
/// around the apex and by nothing else. Points count as evenly spaced for the
/// creeping part of the noise.
///
/// The shape stands at the found apex, or at the expected time where no peak
/// was found; from 10 of its own standard deviations up the response is placed
/// anew where the shape itself fits best (at most 0.15 widths at half height
/// away a step): the smoothed apex of a tailing peak is off by some hundredths
/// of its width, and low responses stay linear in the signal.
///
/// Shape test: shape, its derivative (a slightly misplaced apex is no other
/// shape) and a straight line are fitted under this trace's own noise G; the
/// residuals' r' G^-1 r must not exceed
///
///     q 1.25^2 (1 + (A u / s)^2) + k^2 A^2 p' G^-1 p,
///     k^2 = 0.02^2 + (3 scatter)^2
///
/// q: chi-square quantile at 0.9999, n - 4 degrees of freedom; 1.25: what the
/// noise itself may be off; A the response, u the shape's own noise, s the
/// trace's, p the shape: a high peak is measured finer than the standards have
/// taught its shape, and is allowed the shape's noise, its teachers' scatter,
/// and 2 %. Noise of zero leaves the last term alone and the rounding of the
/// arithmetic.
///
/// @param noise  of this trace
/// @return not applicable: no shape was learned; a neighbour bounds the window
///         or leaves no baseline beside it; too few points
Outcome<TemplateFit> fit_template(const SmoothedStretch& stretch,
                                  const PlacedWindow& window, double apex,
                                  const WindowTemplate& learned,
                                  const NoiseModel& noise);

}  // namespace loqsmith
