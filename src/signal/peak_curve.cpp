#include "loqsmith/signal/peak_curve.hpp"

#include <algorithm>
#include <cstddef>

#include "loqsmith/signal/peak_working.hpp"

namespace loqsmith {
namespace {

// Points [first, last) of the working's stretch that are shown.
struct Shown {
  std::size_t first = 0;
  std::size_t last = 0;
};

Shown shown_points(const std::vector<double>& minutes, double from, double to) {
  const auto first = std::lower_bound(minutes.begin(), minutes.end(), from);
  const auto last = std::upper_bound(first, minutes.end(), to);
  return {static_cast<std::size_t>(first - minutes.begin()),
          static_cast<std::size_t>(last - minutes.begin())};
}

// The trace, what was looked at in it, and the baseline that was taken off.
void lay_trace(const SmoothedStretch& stretch, const Shown& shown,
               PeakCurve& curve) {
  const std::vector<double>& detected = stretch.as_detected();
  const bool estimated = !stretch.detector.empty();
  for (std::size_t i = shown.first; i < shown.last; ++i) {
    const double below = detected[i] - stretch.signal[i];
    curve.minutes.push_back(stretch.minutes[i]);
    curve.signal.push_back(detected[i]);
    if (stretch.points > 1) {
      curve.smoothed.push_back(stretch.smoothed[i] + below);
    }
    if (estimated) curve.baseline.push_back(below);
  }
}

void lay_foot(const SmoothedStretch& stretch, const Foot& foot,
              PeakCurve& curve) {
  if (foot.points() == 0) return;
  curve.feet.push_back({stretch.minutes[foot.first],
                        stretch.minutes[foot.last - 1], foot.anchor_signal});
}

void lay_straight(const PeakWorking& working, const Peak& peak,
                  PeakCurve& curve) {
  const PlacedWindow& window =
      working.parted ? working.parted->window : working.placed;
  curve.baseline_start = window.baseline_at(peak.start_minutes);
  curve.baseline_end = window.baseline_at(peak.end_minutes);
  lay_foot(working.stretch, window.left, curve);
  lay_foot(working.stretch, window.right, curve);
}

void lay_point(const SmoothedStretch& stretch, std::size_t i, double fitted,
               PeakCurve& curve) {
  curve.fitted_minutes.push_back(stretch.minutes[i]);
  curve.fitted.push_back(fitted);
  curve.residual.push_back(stretch.signal[i] - fitted);
}

void lay_template(const PeakWorking& working, const WindowTemplate& window,
                  PeakCurve& curve) {
  const TemplateFit& fit = *working.fit;
  curve.fit = PeakCurve::Fit::Template;
  curve.fit_stands = fit.shape_passed();
  for (std::size_t i = working.placed.left.first; i < working.placed.right.last;
       ++i) {
    const double offset = working.stretch.minutes[i] - fit.apex_minutes;
    lay_point(working.stretch, i,
              fit.level + fit.slope * offset +
                  fit.response * shape_at(window.shape, offset),
              curve);
  }
}

void lay_model(const SmoothedStretch& stretch, const FittedStretch& model,
               PeakCurve& curve) {
  curve.fit = PeakCurve::Fit::Model;
  curve.fit_stands = true;
  const std::vector<FittedEmg>& peaks = model.fit.peaks;
  if (peaks.size() > 1) curve.parts.resize(peaks.size());
  for (std::size_t i = model.first; i < model.last; ++i) {
    const double line = model.fit.baseline_at(stretch.minutes[i]);
    double all = line;
    for (std::size_t k = 0; k < peaks.size(); ++k) {
      const double alone = peaks[k].signal_at(stretch.minutes[i]);
      all += alone;
      if (peaks.size() > 1) curve.parts[k].push_back(line + alone);
    }
    lay_point(stretch, i, all, curve);
  }
}

}  // namespace

PeakCurve peak_curve(const Peak& peak, const PeakWorking& working,
                     const WindowTemplate& window, double margin_widths) {
  const double margin = margin_widths * window.width_half_minutes;
  const SmoothedStretch& stretch = working.stretch;
  const Shown shown = shown_points(stretch.minutes, peak.start_minutes - margin,
                                   peak.end_minutes + margin);
  PeakCurve curve;
  lay_trace(stretch, shown, curve);
  if (stretch.detector.empty()) {
    lay_straight(working, peak, curve);
  } else if (!curve.minutes.empty()) {
    curve.baseline_start =
        interpolate(curve.minutes, curve.baseline, peak.start_minutes);
    curve.baseline_end =
        interpolate(curve.minutes, curve.baseline, peak.end_minutes);
  }
  if (working.fit) {
    lay_template(working, window, curve);
  } else if (working.parted && working.parted->model) {
    lay_model(stretch, *working.parted->model, curve);
  }
  return curve;
}

}  // namespace loqsmith
