#include "loqsmith/signal/baseline_bias.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <vector>

#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/numerics/random.hpp"
#include "loqsmith/signal/estimated_baseline.hpp"
#include "loqsmith/signal/integrate.hpp"
#include "loqsmith/signal/noise.hpp"
#include "loqsmith/signal/summits.hpp"

namespace loqsmith {
namespace {

constexpr double kMostPoints = 80'000.0;
constexpr double kFewestTraces = 12.0;
constexpr double kMostTraces = 64.0;
constexpr double kMarginWidths = 10.0;
// Windows stay this far from the ends, where baselines are less sure.
constexpr double kEndWidths = 7.0;
constexpr double kLowHeight = 10.0;
// A stretch as short as that around one peak shows less than this by chance.
constexpr double kClearlyNoisier = 1.3;

// Mean and spread of responses, gathered trace by trace.
struct Gathered {
  std::vector<double> all;
  std::vector<double> means;

  void add(const std::vector<double>& one_trace) {
    all.insert(all.end(), one_trace.begin(), one_trace.end());
    means.push_back(mean(one_trace));
  }
};

// Signal over the window around a time, with the baseline at zero.
struct Response {
  double area = 0.0;
  double height = 0.0;
};

class Simulation {
 public:
  Simulation(const TargetSettings& target, const WindowTemplate& window,
             const NoiseModel& noise, double step)
      : target_(target),
        window_(window),
        noise_(noise),
        stream_("baseline of " + target.id) {
    const double margin =
        target.window_minutes + kMarginWidths * window.width_half_minutes;
    const double length =
        2.0 * (window.left_minutes + window.right_minutes + margin);
    const auto points = static_cast<std::size_t>(std::ceil(length / step)) + 1;
    for (std::size_t i = 0; i < points; ++i) {
      times_.push_back(step * static_cast<double>(i));
    }
    middle_ = 0.5 * times_.back();
    place_windows();
  }

  SimulatedBaseline run() {
    const double wanted = kMostPoints / static_cast<double>(times_.size());
    const int traces =
        static_cast<int>(std::clamp(wanted, kFewestTraces, kMostTraces));
    for (int k = 0; k < traces; ++k) simulate_one();
    return {bias(blank_area_, low_area_), bias(blank_height_, low_height_),
            noise_};
  }

 private:
  // The middle one, and as many beside it as there is room for.
  void place_windows() {
    const double length = window_.left_minutes + window_.right_minutes;
    const double room =
        middle_ - kEndWidths * window_.width_half_minutes - length;
    const int beside = static_cast<int>(std::max(0.0, room / length));
    for (int k = -beside; k <= beside; ++k) {
      apexes_.push_back(middle_ + k * length);
    }
  }

  std::vector<double> draw_noise() {
    const double white = std::sqrt(noise_.white_variance);
    const double creeping = std::sqrt(noise_.creeping_variance);
    const double r = noise_.correlation;
    const double fresh = std::sqrt(1.0 - r * r);
    double state = stream_.normal();
    std::vector<double> signal;
    for (std::size_t i = 0; i < times_.size(); ++i) {
      signal.push_back(white * stream_.normal() + creeping * state);
      state = r * state + fresh * stream_.normal();
    }
    return signal;
  }

  std::vector<double> low_peak() const {
    const double height = kLowHeight * noise_.standard_deviation();
    const double width = window_.width_half_minutes;
    std::vector<double> signal;
    for (const double t : times_) {
      const double z = (t - middle_) / width;
      signal.push_back(height * std::exp(-4.0 * std::log(2.0) * z * z));
    }
    return signal;
  }

  Response respond(const SmoothedStretch& stretch, double apex) const {
    PlacedWindow placed;
    placed.left.minutes = placed.left.anchor_minutes =
        apex - window_.left_minutes;
    placed.right.minutes = placed.right.anchor_minutes =
        apex + window_.right_minutes;
    return {integrate_window(stretch, placed), signal_near(stretch, apex)};
  }

  SmoothedStretch above_baseline(std::vector<double> signal) const {
    Trace trace;
    trace.minutes = times_;
    trace.signal = std::move(signal);
    const auto baseline = estimate_baseline(
        trace, target_.integration.baseline, window_.width_half_minutes,
        std::max(window_.left_minutes, window_.right_minutes));
    SmoothedStretch stretch;
    stretch.minutes = times_;
    stretch.signal = std::move(trace.signal);
    for (std::size_t i = 0; i < times_.size(); ++i) {
      stretch.signal[i] -= baseline->signal[i];
    }
    return stretch;
  }

  void simulate_one() {
    std::vector<double> signal = draw_noise();
    const SmoothedStretch blank = above_baseline(signal);
    std::vector<double> areas, heights;
    for (const double apex : apexes_) {
      const Response one = respond(blank, apex);
      areas.push_back(one.area);
      heights.push_back(one.height);
    }
    blank_area_.add(areas);
    blank_height_.add(heights);

    SmoothedStretch peak;
    peak.minutes = times_;
    peak.signal = low_peak();
    const Response wanted = respond(peak, middle_);
    for (std::size_t i = 0; i < signal.size(); ++i) signal[i] += peak.signal[i];
    const Response found = respond(above_baseline(std::move(signal)), middle_);
    low_area_.add({found.area - wanted.area});
    low_height_.add({found.height - wanted.height});
  }

  static BaselineBias bias(const Gathered& blank, const Gathered& low) {
    const double traces = static_cast<double>(blank.means.size());
    return {.blank = mean(blank.means),
            .blank_error = standard_deviation(blank.means) / std::sqrt(traces),
            .blank_sd = standard_deviation(blank.all),
            .low_peak = mean(low.all),
            .low_peak_sd = standard_deviation(low.all)};
  }

  const TargetSettings& target_;
  const WindowTemplate& window_;
  const NoiseModel& noise_;
  RandomStream stream_;
  std::vector<double> times_;
  double middle_ = 0.0;
  std::vector<double> apexes_;
  Gathered blank_area_, blank_height_, low_area_, low_height_;
};

BaselineBias scaled(BaselineBias bias, double factor) {
  for (double* one : {&bias.blank, &bias.blank_error, &bias.blank_sd,
                      &bias.low_peak, &bias.low_peak_sd}) {
    *one *= factor;
  }
  return bias;
}

}  // namespace

SimulatedBaseline SimulatedBaseline::scaled_to(
    const NoiseEstimate& measured) const {
  const NoiseModel& there = measured.whole ? *measured.whole : measured.model;
  const double factor = there.point_to_point() / noise.point_to_point();
  return {scaled(area, factor), scaled(height, factor), noise.scaled(factor)};
}

BaselineBias SimulatedBaseline::of(IntegrationSettings::Response response,
                                   const NoiseModel& here) const {
  const double known = noise.point_to_point();
  const double seen = here.point_to_point();
  const bool noisier = known > 0.0 && seen > kClearlyNoisier * known;
  const double factor = noisier ? seen / known : 1.0;
  return scaled(
      response == IntegrationSettings::Response::Height ? height : area,
      factor);
}

std::optional<SimulatedBaseline> simulate_baseline(const TargetSettings& target,
                                                   const WindowTemplate& window,
                                                   const NoiseModel& noise,
                                                   double step_minutes) {
  if (!is_estimated(target.integration.baseline)) return {};
  if (!(noise.point_to_point() > 0.0) || !(step_minutes > 0.0)) return {};
  if (!(window.width_half_minutes > 0.0)) return {};
  return Simulation(target, window, noise, step_minutes).run();
}

void add_simulated_baseline(NoiseEstimate& noise, const Trace& trace,
                            const TargetSettings& target,
                            const WindowTemplate& window, double expected) {
  if (!is_estimated(target.integration.baseline)) return;
  const double width = window.width_half_minutes;
  const Trace near = cut_trace(trace, expected - kMarginWidths * width,
                               expected + kMarginWidths * width);
  noise.simulated_baseline = simulate_baseline(
      target, window, noise.whole ? *noise.whole : noise.model,
      typical_step(near.minutes));
}

}  // namespace loqsmith
