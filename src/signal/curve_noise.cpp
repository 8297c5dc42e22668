#include <algorithm>

#include "loqsmith/signal/peak_curve.hpp"
#include "loqsmith/signal/peak_free.hpp"
#include "loqsmith/signal/summits.hpp"

namespace loqsmith {
namespace {

// A step of more than this many usual ones parts two stretches.
constexpr double kGapSteps = 2.5;

void lay_stretches(const NoiseStretch& points, double step, CurveNoise& noise) {
  if (points.minutes.empty()) return;
  const auto [low, high] =
      std::minmax_element(points.signal.begin(), points.signal.end());
  noise.low = *low;
  noise.high = *high;
  double from = points.minutes.front();
  double last = from;
  for (const double t : points.minutes) {
    if (t - last > kGapSteps * step) {
      noise.stretches.emplace_back(from, last);
      from = t;
    }
    last = t;
  }
  noise.stretches.emplace_back(from, last);
}

}  // namespace

CurveNoise curve_noise(const NoiseEstimate& noise,
                       const NoiseSettings& settings,
                       const std::string& source) {
  CurveNoise drawn;
  drawn.peak_to_peak = noise.peak_to_peak;
  drawn.standard_deviation = noise.standard_deviation;
  drawn.measure = settings.measure;
  drawn.source = source;
  return drawn;
}

CurveNoise curve_noise_around(const Trace& trace, const NoiseEstimate& noise,
                              const NoiseSettings& settings,
                              const std::string& source) {
  CurveNoise drawn = curve_noise(noise, settings, source);
  lay_stretches(stretch_between(trace, noise.start_minutes, noise.end_minutes),
                typical_step(trace.minutes), drawn);
  return drawn;
}

CurveNoise curve_noise_beside(const Trace& trace, double start_minutes,
                              double end_minutes, double width_half_minutes,
                              const NoiseEstimate& noise,
                              const NoiseSettings& settings) {
  CurveNoise drawn = curve_noise(noise, settings, "same trace");
  lay_stretches(
      peak_free_beside(trace, start_minutes, end_minutes, width_half_minutes,
                       settings.span_widths * width_half_minutes),
      typical_step(trace.minutes), drawn);
  return drawn;
}

}  // namespace loqsmith
