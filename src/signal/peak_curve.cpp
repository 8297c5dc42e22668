#include "loqsmith/signal/choose_apex.hpp"
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

// The baseline as it was laid when the peak was measured.
Outcome<PlacedWindow> baseline_again(const Trace& trace, const Peak& peak,
                                     const WindowTemplate& window) {
  const double width = window.width_half_minutes;
  const double apex = peak.retention_minutes;
  const Trace near =
      cut_trace(trace, apex - 2.0 * window.left_minutes - 10.0 * width,
                apex + 2.0 * window.right_minutes + 10.0 * width);
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

}  // namespace

PeakCurve peak_curve(const Trace& trace, const Peak& peak,
                     const WindowTemplate& window, double margin_widths) {
  const double margin = margin_widths * window.width_half_minutes;
  const Trace shown =
      cut_trace(trace, peak.start_minutes - margin, peak.end_minutes + margin);
  PeakCurve curve;
  curve.minutes = shown.minutes;
  curve.signal = shown.signal;
  const Outcome<PlacedWindow> placed = baseline_again(trace, peak, window);
  if (placed) {
    curve.baseline_start = placed->baseline_at(peak.start_minutes);
    curve.baseline_end = placed->baseline_at(peak.end_minutes);
  }
  return curve;
}

}  // namespace loqsmith
