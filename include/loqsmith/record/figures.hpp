#pragma once

#include <iosfwd>
#include <string>
#include <vector>

#include "loqsmith/record/published_run.hpp"

namespace loqsmith {

// The figures of one analyte, each one SVG element.

/// Standards (used and left out), the fitted curve, solid over the accepted
/// range, and the levels.
void figure_calibration(std::ostream& out, const AnalyteJudgement& analyte,
                        const CalibrationSet& set);

/// Back-calculated deviation of each standard on a logarithmic concentration
/// axis, where the low levels can be told apart.
void figure_deviation(std::ostream& out, const AnalyteJudgement& analyte,
                      const CalibrationSet& set);

/// One logarithmic scale of concentration in the vial: each procedure's limits
/// with their bounds, the standards' levels, the samples.
void figure_limits(std::ostream& out, const AnalyteJudgement& analyte,
                   const CalibrationSet& set);

/// True where figure_limits() has something to draw.
bool has_limits_figure(const AnalyteJudgement& analyte,
                       const CalibrationSet& set);

/// One stretch of trace with its baseline and window.
///
/// @param span  height of the signal axis, shared by an analyte's figures;
///              zero: as the trace needs
void figure_trace(std::ostream& out, const FigureCurve& curve,
                  const std::string& signal_unit, double span);

/// The mean peak shape that the template response scales, over its window.
void figure_shape(std::ostream& out, const std::string& analyte,
                  const TemplateShape& shape);

/// Largest minus smallest signal of the stretch.
double signal_span(const PeakCurve& curve);

}  // namespace loqsmith
