#pragma once

#include <cstddef>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/chromatogram/trace.hpp"
#include "loqsmith/signal/teacher_feet.hpp"

namespace loqsmith {

/// The points of one peak from foot to foot (and one beyond either), above its
/// straight baseline, at their times from its interpolated apex.
struct PeakSlice {
  std::vector<double> offsets;  ///< minutes from the apex, increasing
  std::vector<double> signal;   ///< above the baseline
};

/// What one peak has to say about the mean shape.
struct ShapeLesson {
  PeakSlice slice;
  double left_minutes = 0.0;  ///< its own feet; beyond them it is zero
  double right_minutes = 0.0;
  double noise = 0.0;  ///< standard deviation of a point
};

/// Mean peak shape of unit area over the template window, on an even grid from
/// the left foot to the right one.
struct TemplateShape {
  double left_minutes = 0.0;   ///< apex minus first grid point
  double step_minutes = 0.0;   ///< of the grid
  std::vector<double> values;  ///< per minute
  std::size_t lessons = 0;     ///< peaks that entered
  /// Standard deviation of a point of the mean by the lessons' own noise, per
  /// minute.
  double noise = 0.0;
  /// Root mean square difference of the lessons from the mean beyond what their
  /// noise explains, as part of the root mean square of the shape.
  double scatter = 0.0;

  bool empty() const { return values.empty(); }
  double right_minutes() const;
};

/// @param feet  of the peak, with its baseline
PeakSlice slice_of_peak(const Trace& trace, const TeacherFeet& feet);

/// Each lesson is brought to the grid relative to its own apex (a cubic through
/// the four nearest points: the peaks were sampled at different fractions of
/// a step) and to unit area over the window; then the mean is taken. A lesson
/// weighs 1 / (u^2 + 0.01^2), u being its noise over its height: noisy ones
/// count by their precision, good ones about equally, so that a single high
/// standard does not set the shape.
///
/// @param left, right  feet of the template window, minutes from the apex
/// @return not applicable: no lesson, or none with an area above zero
Outcome<TemplateShape> mean_shape(const std::vector<ShapeLesson>& lessons,
                                  double left, double right);

/// Shape and its derivative at a time from the apex; zero beyond the feet.
double shape_at(const TemplateShape& shape, double offset_minutes);
double shape_slope_at(const TemplateShape& shape, double offset_minutes);

}  // namespace loqsmith
