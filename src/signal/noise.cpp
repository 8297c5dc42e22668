#include "loqsmith/signal/noise.hpp"

#include <algorithm>
#include <cmath>
#include <span>

#include "loqsmith/signal/peak_free.hpp"
#include "loqsmith/signal/point_noise.hpp"
#include "loqsmith/signal/summits.hpp"
#include "loqsmith/signal/trace_noise.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kFewestPoints = 5;

double largest_minus_smallest(std::span<const double> values) {
  const auto [low, high] = std::minmax_element(values.begin(), values.end());
  return *high - *low;
}

std::vector<double> residuals(const NoiseStretch& stretch,
                              const LineNoise& line) {
  std::vector<double> left;
  for (std::size_t i = 0; i < stretch.minutes.size(); ++i) {
    left.push_back(stretch.signal[i] - line.intercept -
                   line.slope * stretch.minutes[i]);
  }
  return left;
}

Outcome<NoiseEstimate> estimate(const NoiseStretch& stretch, double wanted,
                                const NoiseSettings& settings) {
  const std::size_t n = stretch.minutes.size();
  if (n < kFewestPoints) {
    return NotApplicable{"noise-stretch-short: fewer than 5 points of noise"};
  }
  const LineNoise line = noise_about_line(stretch.minutes, stretch.signal);
  NoiseEstimate noise;
  noise.start_minutes = stretch.minutes.front();
  noise.end_minutes = stretch.minutes.back();
  noise.points = n;
  noise.standard_deviation = line.standard_deviation;
  noise.peak_to_peak = settings.drift == NoiseSettings::Drift::Kept
                           ? largest_minus_smallest(stretch.signal)
                           : largest_minus_smallest(residuals(stretch, line));
  if (stretch.covered_minutes < wanted) {
    noise.reasons.emplace_back("noise-stretch-short");
  }
  return noise;
}

}  // namespace

Outcome<NoiseEstimate> measure_noise(const Trace& trace, double center_minutes,
                                     double width_half_minutes,
                                     const NoiseSettings& settings) {
  const double wanted = settings.span_widths * width_half_minutes;
  const NoiseStretch stretch = stretch_between(
      trace, center_minutes - 0.5 * wanted, center_minutes + 0.5 * wanted);
  Outcome<NoiseEstimate> noise = estimate(stretch, wanted, settings);
  if (noise) {
    noise.value().model = fit_noise_model(trace, center_minutes, center_minutes,
                                          width_half_minutes);
    add_whole_trace_noise(noise.value(), trace, center_minutes, center_minutes,
                          width_half_minutes);
  }
  return noise;
}

Outcome<NoiseEstimate> measure_noise_beside(const Trace& trace,
                                            double start_minutes,
                                            double end_minutes,
                                            double width_half_minutes,
                                            const NoiseSettings& settings) {
  const double wanted = settings.span_widths * width_half_minutes;
  const NoiseStretch stretch = peak_free_beside(
      trace, start_minutes, end_minutes, width_half_minutes, wanted);
  Outcome<NoiseEstimate> noise = estimate(stretch, wanted, settings);
  if (noise) {
    noise.value().model =
        fit_noise_model(trace, start_minutes, end_minutes, width_half_minutes);
  }
  return noise;
}

void add_whole_trace_noise(NoiseEstimate& noise, const Trace& trace,
                           double start_minutes, double end_minutes,
                           double width_half_minutes) {
  const PeakFreeTrace free =
      peak_free_trace(trace, start_minutes, end_minutes, width_half_minutes);
  noise.whole = whole_trace_noise(free, width_half_minutes);
  noise.segments = segment_noise(free.used_minutes, free.used_signal,
                                 typical_step(trace.minutes));
}

double noise_figure(const NoiseEstimate& noise,
                    NoiseSettings::Measure measure) {
  switch (measure) {
    case NoiseSettings::Measure::HalfPeakToPeak:
    case NoiseSettings::Measure::PeakToPeak:
      return noise.peak_to_peak;
    case NoiseSettings::Measure::StandardDeviation:
      return noise.standard_deviation;
  }
  return noise.peak_to_peak;
}

Outcome<double> signal_to_noise(double height, const NoiseEstimate& noise,
                                NoiseSettings::Measure measure) {
  const double figure = noise_figure(noise, measure);
  if (!(figure > 0.0)) {
    return NotApplicable{"noise-zero: the signal shows no noise"};
  }
  const double factor =
      measure == NoiseSettings::Measure::HalfPeakToPeak ? 2.0 : 1.0;
  return factor * height / figure;
}

}  // namespace loqsmith
