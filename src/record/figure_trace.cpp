#include <algorithm>
#include <cmath>

#include "loqsmith/record/curve_strokes.hpp"
#include "loqsmith/record/figures.hpp"
#include "loqsmith/record/html.hpp"
#include "loqsmith/record/svg.hpp"

namespace loqsmith {
namespace {

constexpr double kWidth = 440;
constexpr double kLeft = 62;
constexpr double kRight = kWidth - 14;
constexpr double kTop = 34;
constexpr double kBottom = 200;
constexpr double kStripTop = kBottom + 34;
constexpr double kStripBottom = kStripTop + 56;
constexpr double kBelow = 46;  ///< for the axis of time
constexpr double kFootSize = 3.5;
constexpr double kResidualDeviations = 2.0;

// Both parts of the figure stand on one axis of time.
struct Frame {
  Axis x;
  Axis y;
};

Axis signal_axis(const PeakCurve& curve, double span) {
  const auto [low, high] =
      std::minmax_element(curve.signal.begin(), curve.signal.end());
  // A little above the highest point for the apex's stroke.
  const double room =
      std::max(span - (*high - *low), 0.0) + 0.08 * (*high - *low);
  // Room goes above: a trace stands on its baseline.
  return tight_axis(*low - 0.1 * room, *high + 0.9 * room, kBottom, kTop, 6);
}

bool by_deviation(const CurveNoise& noise) {
  return noise.measure == NoiseSettings::Measure::StandardDeviation;
}

std::string noise_words(const CurveNoise& noise) {
  return by_deviation(noise) ? "sd " + short_number(noise.standard_deviation, 3)
                             : "h " + short_number(noise.peak_to_peak, 3);
}

// A band as high as the noise figure: h, or one standard deviation to either
// side of the middle.
void draw_noise_here(std::ostream& out, const Frame& frame,
                     const CurveNoise& noise) {
  const double middle = 0.5 * (noise.low + noise.high);
  const double half =
      by_deviation(noise) ? noise.standard_deviation : 0.5 * noise.peak_to_peak;
  const double top = frame.y.place(middle + half);
  const double bottom = frame.y.place(middle - half);
  for (const auto& [from, to] : noise.stretches) {
    const double left = frame.x.place(from);
    svg_rect(out, "noise", left, top, frame.x.place(to) - left,
             std::max(bottom - top, 1.0));
  }
  const double at = frame.x.place(noise.stretches.front().first);
  svg_text(out, "label small", at + 2, top - 6, "start", noise_words(noise));
}

// Noise that was measured elsewhere: its size as an upright bar.
void draw_noise_elsewhere(std::ostream& out, const Frame& frame,
                          const PeakCurve& curve) {
  const CurveNoise& noise = curve.noise;
  const double half =
      by_deviation(noise) ? noise.standard_deviation : 0.5 * noise.peak_to_peak;
  const double top = frame.y.place(curve.baseline_end + half);
  const double bottom = frame.y.place(curve.baseline_end - half);
  const double x = kRight - 7;
  svg_line(out, "noise-size", x, top, x, bottom);
  svg_line(out, "noise-size", x - 4, top, x + 4, top);
  svg_line(out, "noise-size", x - 4, bottom, x + 4, bottom);
  svg_text(out, "label small", kRight - 2, top - 6, "end",
           noise_words(noise) + ", " + noise.source);
}

void draw_noise(std::ostream& out, const Frame& frame, const PeakCurve& curve) {
  if (curve.noise.source.empty()) return;
  if (curve.noise.stretches.empty()) {
    draw_noise_elsewhere(out, frame, curve);
  } else {
    draw_noise_here(out, frame, curve.noise);
  }
}

void draw_baseline(std::ostream& out, const Frame& frame,
                   const FigureCurve& figure) {
  const PeakCurve& curve = figure.curve;
  const double start = frame.x.place(figure.peak.start_minutes);
  const double end = frame.x.place(figure.peak.end_minutes);
  for (const CurveFoot& foot : curve.feet) {
    const double y = frame.y.place(foot.signal);
    svg_line(out, "foot", frame.x.place(foot.from_minutes), y,
             frame.x.place(foot.to_minutes), y);
  }
  if (curve.baseline.size() == curve.minutes.size()) {
    draw_curve(out, "baseline", curve.minutes, curve.baseline, frame.x,
               frame.y);
  } else {
    svg_line(out, "baseline", start, frame.y.place(curve.baseline_start), end,
             frame.y.place(curve.baseline_end));
  }
  svg_circle(out, "foot-end", start, frame.y.place(curve.baseline_start),
             kFootSize);
  svg_circle(out, "foot-end", end, frame.y.place(curve.baseline_end),
             kFootSize);
}

void draw_fit(std::ostream& out, const Frame& frame, const PeakCurve& curve) {
  if (curve.fit == PeakCurve::Fit::None) return;
  for (const std::vector<double>& part : curve.parts) {
    draw_curve(out, "part", curve.fitted_minutes, part, frame.x, frame.y);
  }
  draw_curve(out, curve.fit_stands ? "fitted" : "fitted fails",
             curve.fitted_minutes, curve.fitted, frame.x, frame.y);
}

// Signal minus fit, with the noise's own spread behind it.
void draw_residual(std::ostream& out, const Axis& x, const PeakCurve& curve) {
  double most = kResidualDeviations * curve.noise.standard_deviation;
  for (const double left : curve.residual)
    most = std::max(most, std::abs(left));
  const Axis y =
      tight_axis(-1.05 * most, 1.05 * most, kStripBottom, kStripTop, 6);
  if (!curve.noise.source.empty()) {
    const double reach = kResidualDeviations * curve.noise.standard_deviation;
    const double top = y.place(reach);
    svg_rect(out, "noise", kLeft, top, kRight - kLeft, y.place(-reach) - top);
  }
  svg_left_axis(out, y, kLeft, kRight, "signal minus fit");
  svg_line(out, "zero", kLeft, y.place(0.0), kRight, y.place(0.0));
  draw_curve(out, "residual", curve.fitted_minutes, curve.residual, x, y);
}

}  // namespace

double signal_span(const PeakCurve& curve) {
  if (curve.signal.empty()) return 0.0;
  const auto [low, high] =
      std::minmax_element(curve.signal.begin(), curve.signal.end());
  return *high - *low;
}

void figure_trace(std::ostream& out, const FigureCurve& figure, double span) {
  const PeakCurve& curve = figure.curve;
  if (curve.minutes.size() < 2 || curve.signal.size() < 2) return;
  const bool strip = !curve.residual.empty();
  const double floor = strip ? kStripBottom : kBottom;
  const Frame frame{
      tight_axis(curve.minutes.front(), curve.minutes.back(), kLeft, kRight, 6),
      signal_axis(curve, span)};
  svg_begin(out, kWidth, floor + kBelow,
            "Trace of " + figure.analyte + " in injection " +
                std::to_string(figure.injection) + ", " + figure.caption);
  const double start = frame.x.place(figure.peak.start_minutes);
  const double end = frame.x.place(figure.peak.end_minutes);
  svg_rect(out, "window", start, kTop, end - start, kBottom - kTop);
  svg_bottom_axis(out, frame.x, floor, kTop, "minutes");
  svg_left_axis(
      out, frame.y, kLeft, kRight,
      figure.signal_unit.empty() ? "signal" : "signal, " + figure.signal_unit);
  draw_noise(out, frame, curve);
  draw_curve(out, "trace", curve.minutes, curve.signal, frame.x, frame.y);
  draw_curve(out, "smoothed", curve.minutes, curve.smoothed, frame.x, frame.y);
  draw_baseline(out, frame, figure);
  draw_fit(out, frame, curve);
  if (figure.peak.found) {
    const double apex = frame.x.place(figure.peak.retention_minutes);
    svg_line(out, "apex", apex, kTop, apex, kTop + 8);
  }
  if (strip) draw_residual(out, frame.x, curve);
  svg_end(out);
}

}  // namespace loqsmith
