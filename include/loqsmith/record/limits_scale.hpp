#pragma once

#include <cstddef>
#include <iosfwd>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/record/axis.hpp"
#include "loqsmith/record/published_run.hpp"

namespace loqsmith {

/// The scale of concentration on which all limits of a set stand together with
/// its standards and samples. Its axis is laid in percent of the width, so that
/// a figure may grow and shrink without its texts doing so.
struct LimitsScale {
  Axis axis;
  std::vector<const ResultRow*> samples;  ///< those that are drawn
  /// Far below every limit and standard, where a logarithmic scale has no room.
  std::size_t samples_below = 0;
};

/// Logarithmic where the largest number is more than 20 times the smallest
/// above zero, otherwise linear from zero.
/// @return nothing where no limit and no standard is above zero
std::optional<LimitsScale> limits_scale(const AnalyteJudgement& analyte,
                                        const CalibrationSet& set);

// Marks of a strip of the scale; x in percent, y and sizes in pixels.

std::string percent(double x);
/// A shape of the page's marks (kReportMarks) about a place, with a text that a
/// pointing device shows; `title` may be empty.
std::string scale_mark(std::string_view shape, std::string_view css, double x,
                       double y, double size, std::string_view title);
std::string scale_line(std::string_view css, double x1, double y1, double x2,
                       double y2);
/// The row of the samples: each a mark of its state's shape, those that stand
/// close together piled up.
void scale_samples(std::ostream& out, const LimitsScale& scale);

/// A confidence interval with its ends.
std::string scale_interval(double from, double to, double y);

}  // namespace loqsmith
