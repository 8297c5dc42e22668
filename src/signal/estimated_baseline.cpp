#include "loqsmith/signal/estimated_baseline.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <utility>

#include "loqsmith/numerics/least_squares.hpp"
#include "loqsmith/signal/baseline_asymmetric.hpp"
#include "loqsmith/signal/baseline_snip.hpp"
#include "loqsmith/signal/savitzky_golay.hpp"
#include "loqsmith/signal/summits.hpp"

namespace loqsmith {
namespace {

using Baseline = IntegrationSettings::Baseline;

constexpr double kSmoothWidths = 2.0;
constexpr double kSofterWidths = 1.0;
constexpr double kSettledRatio = 1e-3;
constexpr double kRoughRatio = 1e-2;
constexpr double kSnipWidths = 2.0;
// Half of the smoothing before snip, to either side.
constexpr double kMeanWidths = 0.25;

// Mean of an odd number of points over half a width at half height; where the
// times are uneven, the line through them.
std::vector<double> short_means(const Trace& near, double width_half,
                                double step) {
  const double points =
      std::clamp(2.0 * kMeanWidths * width_half / step, 1.0, 1001.0);
  const int odd = 2 * static_cast<int>(std::floor(0.5 * points)) + 1;
  return savitzky_golay(near.minutes, near.signal, odd, 1, 0);
}

// The parabola through a softer baseline, at each point. A smooth baseline ends
// straight: on a bent one its ends would lie off by more than the noise, and
// with them what it takes for noise.
std::vector<double> bend_below(const Trace& near, double width_half,
                               double step) {
  const std::vector<double>& t = near.minutes;
  const AsymmetricBaseline soft = reweighted_baseline(
      t, near.signal, std::pow(kSofterWidths * width_half / step, 4.0),
      kRoughRatio);
  const double middle = 0.5 * (t.front() + t.back());
  std::vector<double> x;
  for (const double minutes : t) x.push_back((minutes - middle) / width_half);
  const auto parabola = fit_polynomial(x, soft.signal, 0, 2);
  if (!parabola) return std::vector<double>(t.size(), 0.0);
  const std::vector<double>& c = parabola->coefficients;
  std::vector<double> bend;
  for (const double at : x) bend.push_back(c[0] + at * (c[1] + at * c[2]));
  return bend;
}

EstimatedBaseline baseline_of_rest(const Trace& rest, Baseline baseline,
                                   double width_half, double longer_side,
                                   double step) {
  if (baseline == Baseline::Snip) {
    return {snip_baseline(rest.minutes, short_means(rest, width_half, step),
                          snip_window(width_half, longer_side, step)),
            true};
  }
  AsymmetricBaseline found =
      reweighted_baseline(rest.minutes, rest.signal,
                          baseline_smoothness(width_half, step), kSettledRatio);
  return {std::move(found.signal), found.settled};
}

void lay_at_zero(PlacedWindow& window) {
  for (Foot* foot : {&window.left, &window.right}) {
    foot->first = 0;
    foot->last = 0;
    foot->anchor_minutes = foot->minutes;
    foot->anchor_signal = 0.0;
    foot->shortened = false;
  }
  // What is said of the straight baseline does not hold of this one.
  std::erase_if(window.reasons, [](const std::string& word) {
    return word.rfind("baseline-", 0) == 0;
  });
}

}  // namespace

std::string baseline_name(Baseline baseline) {
  switch (baseline) {
    case Baseline::Valley:
      return "valley";
    case Baseline::AsymmetricLeastSquares:
      return "asymmetric-least-squares";
    case Baseline::Snip:
      return "snip";
  }
  return "valley";
}

Baseline baseline_from_name(const std::string& name) {
  for (const Baseline baseline :
       {Baseline::AsymmetricLeastSquares, Baseline::Snip}) {
    if (name == baseline_name(baseline)) return baseline;
  }
  return Baseline::Valley;
}

bool is_estimated(Baseline baseline) { return baseline != Baseline::Valley; }

double baseline_smoothness(double width_half_minutes, double step_minutes) {
  return std::pow(kSmoothWidths * width_half_minutes / step_minutes, 4.0);
}

int snip_window(double width_half_minutes, double longer_side_minutes,
                double step_minutes) {
  const double side =
      std::max(kSnipWidths * width_half_minutes, longer_side_minutes) +
      kMeanWidths * width_half_minutes;
  return std::max(1, static_cast<int>(std::ceil(side / step_minutes)));
}

std::optional<EstimatedBaseline> estimate_baseline(const Trace& near,
                                                   Baseline baseline,
                                                   double width_half_minutes,
                                                   double longer_side_minutes) {
  if (!is_estimated(baseline)) return {};
  const double step = typical_step(near.minutes);
  if (!(step > 0.0)) return {};
  const std::vector<double> bend = bend_below(near, width_half_minutes, step);
  Trace rest;
  rest.minutes = near.minutes;
  for (std::size_t i = 0; i < bend.size(); ++i) {
    rest.signal.push_back(near.signal[i] - bend[i]);
  }
  EstimatedBaseline found = baseline_of_rest(rest, baseline, width_half_minutes,
                                             longer_side_minutes, step);
  for (std::size_t i = 0; i < bend.size(); ++i) found.signal[i] += bend[i];
  return found;
}

SmoothedStretch smooth_stretch_above(Trace near,
                                     const IntegrationSettings& settings,
                                     double width_half_minutes,
                                     double longer_side_minutes,
                                     const NoiseModel& noise) {
  const Spacing spacing = spacing_of(near.minutes);
  const int points =
      smoothing_length(settings, width_half_minutes, spacing.step);
  const int order = settings.smoothing_order;
  const auto baseline = estimate_baseline(
      near, settings.baseline, width_half_minutes, longer_side_minutes);
  if (!baseline) {
    return smooth_stretch(std::move(near), spacing, points, order, noise);
  }
  Trace above;
  above.minutes = near.minutes;
  for (std::size_t i = 0; i < near.signal.size(); ++i) {
    above.signal.push_back(near.signal[i] - baseline->signal[i]);
  }
  SmoothedStretch stretch =
      smooth_stretch(std::move(above), spacing, points, order, noise);
  stretch.detector = std::move(near.signal);
  stretch.baseline_settled = baseline->settled;
  return stretch;
}

Outcome<PlacedWindow> place_window_above(const SmoothedStretch& stretch,
                                         const std::vector<Summit>& neighbours,
                                         const Placement& placement) {
  Outcome<PlacedWindow> placed = place_window(stretch, neighbours, placement);
  if (placed && !stretch.detector.empty()) lay_at_zero(placed.value());
  return placed;
}

}  // namespace loqsmith
