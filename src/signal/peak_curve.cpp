#include <algorithm>

#include "loqsmith/signal/choose_apex.hpp"
#include "loqsmith/signal/estimated_baseline.hpp"
#include "loqsmith/signal/fit_template.hpp"
#include "loqsmith/signal/measure_peak.hpp"
#include "loqsmith/signal/parted_peak.hpp"
#include "loqsmith/signal/place_window.hpp"
#include "loqsmith/signal/point_noise.hpp"
#include "loqsmith/signal/summits.hpp"

namespace loqsmith {
namespace {

// How the peak was parted from its neighbours.
IntegrationSettings::Overlap overlap_of(const Peak& peak) {
  if (peak.overlap == "skim") return IntegrationSettings::Overlap::Skim;
  if (peak.overlap == "model") return IntegrationSettings::Overlap::Model;
  return IntegrationSettings::Overlap::Drop;
}

// What peaks are looked for in, with the default smoothing.
std::vector<double> smoothed_as_found(const Trace& shown, double width_half) {
  const IntegrationSettings settings;
  if (shown.minutes.size() < 3) return shown.signal;
  return smooth_stretch(shown,
                        smoothing_length(settings, width_half,
                                         typical_step(shown.minutes)),
                        settings.smoothing_order,
                        white_noise(point_to_point_noise(shown.signal)))
      .smoothed;
}

Trace around_peak(const Trace& trace, const Peak& peak,
                  const WindowTemplate& window) {
  const double margin = 10.0 * window.width_half_minutes;
  return cut_trace(
      trace, peak.retention_minutes - 2.0 * window.left_minutes - margin,
      peak.retention_minutes + 2.0 * window.right_minutes + margin);
}

// The straight baseline as it was laid when the peak was measured.
Outcome<PlacedWindow> baseline_again(const Trace& near, const Peak& peak,
                                     const WindowTemplate& window) {
  const double width = window.width_half_minutes;
  const double apex = peak.retention_minutes;
  if (near.minutes.size() < 3) {
    return NotApplicable{"window-not-covered: the trace has no points there"};
  }
  const IntegrationSettings settings;
  const double noise = point_to_point_noise(near.signal);
  const SmoothedStretch stretch = smooth_stretch(
      near, smoothing_length(settings, width, typical_step(near.minutes)),
      settings.smoothing_order, white_noise(noise));
  const std::vector<Summit> neighbours = significant_summits(
      stretch, find_summits(stretch), settings.threshold, noise, width);
  const Outcome<PlacedWindow> placed =
      place_window(stretch, neighbours,
                   {apex, window.left_minutes, window.right_minutes, width,
                    peak.found, noise});
  if (!placed) return placed;
  ChosenApex chosen;
  if (peak.found) chosen.minutes = apex;
  chosen.neighbours = neighbours;
  std::vector<std::string> reasons;
  const auto parted = part_overlap(stretch, chosen, *placed, window,
                                   overlap_of(peak), apex, noise, reasons);
  return parted ? parted->window : *placed;
}

// The estimated baseline at the points of the curve.
void draw_estimated(const Trace& near, const EstimatedBaseline& baseline,
                    const Peak& peak, PeakCurve& curve) {
  const auto at = [&](double minutes) {
    return interpolate(near.minutes, baseline.signal, minutes);
  };
  for (const double t : curve.minutes) curve.baseline.push_back(at(t));
  curve.baseline_start = at(peak.start_minutes);
  curve.baseline_end = at(peak.end_minutes);
}

// The scaled template as it was fitted when the peak was measured.
void draw_template(const Trace& near, const PlacedWindow& placed,
                   const Peak& peak, const WindowTemplate& window,
                   PeakCurve& curve) {
  if (!peak.template_response) return;
  SmoothedStretch stretch;
  stretch.minutes = near.minutes;
  stretch.signal = near.signal;
  const Outcome<TemplateFit> fit =
      fit_template(stretch, placed, peak.retention_minutes, window,
                   white_noise(point_to_point_noise(near.signal)));
  if (!fit) return;
  for (std::size_t i = placed.left.first; i < placed.right.last; ++i) {
    const double offset = near.minutes[i] - fit->apex_minutes;
    curve.fitted_minutes.push_back(near.minutes[i]);
    curve.fitted.push_back(fit->level + fit->slope * offset +
                           fit->response * shape_at(window.shape, offset));
  }
}

}  // namespace

PeakCurve peak_curve(const Trace& trace, const Peak& peak,
                     const WindowTemplate& window, double margin_widths) {
  const double margin = margin_widths * window.width_half_minutes;
  const Trace shown =
      cut_trace(trace, peak.start_minutes - margin, peak.end_minutes + margin);
  PeakCurve curve;
  curve.minutes = shown.minutes;
  curve.signal = shown.signal;
  curve.smoothed = smoothed_as_found(shown, window.width_half_minutes);
  const Trace near = around_peak(trace, peak, window);
  const auto estimated = estimate_baseline(
      near, baseline_from_name(peak.baseline), window.width_half_minutes,
      std::max(window.left_minutes, window.right_minutes));
  if (estimated) {
    draw_estimated(near, *estimated, peak, curve);
    return curve;
  }
  const Outcome<PlacedWindow> placed = baseline_again(near, peak, window);
  if (placed) {
    curve.baseline_start = placed->baseline_at(peak.start_minutes);
    curve.baseline_end = placed->baseline_at(peak.end_minutes);
    draw_template(near, *placed, peak, window, curve);
  }
  return curve;
}

}  // namespace loqsmith
