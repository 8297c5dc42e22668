#pragma once

#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/signal/choose_apex.hpp"
#include "loqsmith/signal/fit_overlap.hpp"
#include "loqsmith/signal/learn.hpp"
#include "loqsmith/signal/parted_peak.hpp"
#include "loqsmith/signal/place_window.hpp"
#include "loqsmith/signal/summits.hpp"

namespace loqsmith {

/// Fits the target, its neighbours and a straight baseline together
/// (fit_overlap), over the points from one stretch that holds the baseline to
/// the other.
///
/// One rule for every role. A window that no neighbour bounds is measured by
/// plain area over its baseline, be it a standard, a sample or a blank. A
/// window that a neighbour bounds is measured by the fit: the response is the
/// fitted peak's area over the very template window, so the same quantity as
/// the plain area of the peak without its neighbour. Where no target is seen
/// (a blank, a low sample) its time is held at the expected one and its shape
/// at the template's: only its area is fitted, linear and signed, around zero
/// where there is none. The responses differ in their noise, not in what they
/// mean; `response_noise` gives each its own.
///
/// A peak tells its own sigma and tau when it is as high as a teacher (50
/// noise standard deviations) and its valleys go down to half of its height
/// or below; otherwise its shape is the template's, which peaks that elute
/// side by side share.
///
/// Reasons: "model-shape-assumed" (the template knows no sigma and tau: a
/// Gaussian of its width), "model-misfit" (residuals of more than 3 noise
/// standard deviations: the peaks do not look like the model).
///
/// @return not applicable: "model-not-converged", also where the fit ran away:
///         a peak upside down, moved by more than a width, or three times as
///         wide or narrow as the template
Outcome<PartedPeak> model_overlap(const SmoothedStretch& stretch,
                                  const ChosenApex& chosen,
                                  const PlacedWindow& placed,
                                  const WindowTemplate& window, double expected,
                                  double noise);

/// What one teacher's own fit says of its shape, for the template; minutes.
struct TaughtShape {
  double sigma = 0.0;
  double tau = 0.0;
  double width_half = 0.0;
  double left = 0.0;  ///< from the apex to where 0.1 % of the height is left
  double right = 0.0;
};

/// Sigma and tau of one high peak by the same fit, its own shape free;
/// neighbours that do not tell their own take the same one.
///
/// @param apex        as found, minutes
/// @param width_half  as known so far, minutes; may be off by a factor of 3
/// @return not applicable: as above
Outcome<TaughtShape> teach_shape(const SmoothedStretch& stretch,
                                 const std::vector<Summit>& neighbours,
                                 const PlacedWindow& placed, double apex,
                                 double width_half, double noise);

}  // namespace loqsmith
