#pragma once

#include <iosfwd>
#include <string>
#include <vector>

#include "loqsmith/record/published_run.hpp"

namespace loqsmith {

// The figures of one analyte.

/// Standards (used and left out), the fitted curve, solid over the accepted
/// range, and the levels.
void figure_calibration(std::ostream& out, const AnalyteJudgement& analyte,
                        const CalibrationSet& set);

/// Back-calculated deviation of each standard on a logarithmic concentration
/// axis, where the low levels can be told apart.
void figure_deviation(std::ostream& out, const AnalyteJudgement& analyte,
                      const CalibrationSet& set);

/// Residual of each standard in units of the response, on the same axis, with
/// one residual standard deviation as the fit's weights have it: whether one
/// number describes the scatter at all levels, a reader sees.
void figure_residuals(std::ostream& out, const AnalyteJudgement& analyte,
                      const CalibrationSet& set);

/// One scale of concentration in the vial: each procedure's critical value and
/// limits with their bounds and grade, the limits that govern, the standards'
/// levels, the samples. Its parts are HTML and SVG, so that long names wrap.
void figure_limits(std::ostream& out, const AnalyteJudgement& analyte,
                   const CalibrationSet& set,
                   const ReportingSettings& reporting);

/// True where figure_limits() has something to draw.
bool has_limits_figure(const AnalyteJudgement& analyte,
                       const CalibrationSet& set);

/// One stretch of trace, raw and smoothed, with its window, its baseline and
/// what holds it, the noise that stands beside it, and the template or model
/// where one was fitted; what that leaves in a strip of its own below, on the
/// same axis of time.
///
/// @param span  height of the signal axis, shared by an analyte's figures;
///              zero: as the trace needs
void figure_trace(std::ostream& out, const FigureCurve& curve, double span);

/// The mean peak shape that the template response scales, over its window.
void figure_shape(std::ostream& out, const std::string& analyte,
                  const TemplateShape& shape);

/// Largest minus smallest signal of the stretch.
double signal_span(const PeakCurve& curve);

}  // namespace loqsmith
