#pragma once

#include <optional>
#include <vector>

#include "loqsmith/signal/parted_peak.hpp"
#include "loqsmith/signal/place_window.hpp"
#include "loqsmith/signal/summits.hpp"

namespace loqsmith {

/// Who rides on whom: a peak is skimmed off its neighbour where the neighbour,
/// above the baseline of both, is at least this many times as high as the
/// peak above the skimming line. Below it the tail is no tail any more and the
/// perpendicular drop errs less. Common practice has values from 5 to 10.
inline constexpr double kParentOverRider = 5.0;

/// Tangent skim. The line below a rider goes from the valley that parts it
/// from its parent to the point behind the rider where it touches the trace
/// from below, at most to the template's foot or to the next neighbour's
/// valley. Both are sought on the smoothed trace; the line runs through the
/// mean of the raw points within a tenth of a width at half height of either
/// (3 points at least).
///
/// - A target that rides is what lies above the line.
/// - A target that is ridden upon is its whole template window (up to the
///   valley of a neighbour farther out) less what lies above the rider's line.
/// - A target that is not seen beside a parent (a blank, a low sample) is
///   measured above the line between the same places: the near end of its
///   window and the template's far foot. Where the parent has not come down to
///   a tenth of its height at the near end there is no tail yet, and a line
///   through its flank would say nothing: the drop stands.
///
/// A tail bends upwards, the line does not: the rider comes out low by the
/// area between chord and tail, seen or not seen, and the parent high by as
/// much. The error grows with the parent, so it is for riders of which that is
/// small (or `model`).
///
/// @return nothing where neither of the two is that much higher
std::optional<PartedPeak> skim_overlap(const SmoothedStretch& stretch,
                                       const std::vector<Summit>& neighbours,
                                       const PlacedWindow& placed,
                                       const Placement& placement);

}  // namespace loqsmith
