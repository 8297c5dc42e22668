#include "loqsmith/signal/measure_peak.hpp"

#include <algorithm>
#include <cmath>

#include "loqsmith/signal/choose_apex.hpp"
#include "loqsmith/signal/estimated_baseline.hpp"
#include "loqsmith/signal/fit_template.hpp"
#include "loqsmith/signal/integrate.hpp"
#include "loqsmith/signal/manual_bounds.hpp"
#include "loqsmith/signal/own_feet.hpp"
#include "loqsmith/signal/parted_peak.hpp"
#include "loqsmith/signal/peak_shape.hpp"
#include "loqsmith/signal/peak_working.hpp"
#include "loqsmith/signal/place_window.hpp"
#include "loqsmith/signal/response_noise.hpp"
#include "loqsmith/signal/saturation.hpp"
#include "loqsmith/signal/summits.hpp"
#include "loqsmith/signal/trace_at_hand.hpp"
#include "loqsmith/signal/trace_trouble.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kFewestPoints = 5;
constexpr std::size_t kFewPoints = 10;
constexpr double kSharpHeight = 50.0;

bool available(const IntegrationSettings& settings) {
  const bool scaled =
      settings.response == IntegrationSettings::Response::Template;
  if (settings.bounds == IntegrationSettings::Bounds::Own && scaled) {
    return false;
  }
  return !is_estimated(settings.baseline) ||
         (!scaled && settings.overlap == IntegrationSettings::Overlap::Drop);
}

// One target in one trace, measured step by step.
class Measurement {
 public:
  Measurement(const Trace& trace, const TargetSettings& target,
              const WindowTemplate& window, double expected,
              const Outcome<NoiseEstimate>& noise,
              const std::optional<ManualBounds>& manual)
      : target_(target),
        window_(window),
        expected_(expected),
        noise_(noise),
        manual_(manual) {
    const Trace near = surroundings(trace, target, window, expected);
    model_ = noise_of_this_trace(near, noise);
    point_noise_ = model_.standard_deviation();
    stretch_ = smooth_stretch_above(
        near, target.integration, window.width_half_minutes,
        std::max(window.left_minutes, window.right_minutes), model_);
  }

  Outcome<Peak> measure() {
    if (stretch_.minutes.size() < 3) {
      return NotApplicable{"window-not-covered: the trace has no points there"};
    }
    chosen_ = choose_apex(stretch_, target_, window_, expected_, model_);
    if (chosen_.cut && !manual_) {
      return NotApplicable{"peak-cut: the trace does not hold both its feet"};
    }
    if (target_.integration.bounds == IntegrationSettings::Bounds::Own) {
      take_own_feet();
    }
    const Outcome<PlacedWindow> placed =
        place_own(chosen_.minutes.value_or(expected_));
    if (!placed) return NotApplicable{placed.reason()};
    placed_ = *placed;
    const std::size_t points = points_in_window(stretch_, placed_);
    if (points < kFewestPoints) {
      return NotApplicable{"too-few-points: " + std::to_string(points) +
                           " in the window, at least 5 are needed"};
    }
    if (points < kFewPoints) add_reason("few-points");
    const bool whole = covers(stretch_, expected_ - target_.window_minutes,
                              expected_ + target_.window_minutes);
    if (!whole && !chosen_.minutes) {
      return NotApplicable{
          "window-not-covered: no peak in what the trace holds of the window"};
    }
    if (!whole) add_reason("window-cut-short");
    if (manual_) add_reason("manual-bounds");
    state_response();
    if (by(IntegrationSettings::Response::Template)) state_template();
    if (peak_.found) state_shape();
    state_noise();
    gather_reasons();
    return peak_;
  }

  // To be called last.
  PeakWorking hand_over() {
    return {std::move(stretch_), std::move(placed_), std::move(parted_),
            std::move(fit_)};
  }

 private:
  Outcome<PlacedWindow> place_own(double apex) const {
    return manual_ ? place_by_hand(stretch_, *manual_,
                                   window_.width_half_minutes, point_noise_)
                   : place(apex);
  }

  Outcome<PlacedWindow> place(double apex) const {
    return place_window_above(stretch_, chosen_.neighbours,
                              {apex, feet().left_minutes, feet().right_minutes,
                               window_.width_half_minutes,
                               chosen_.minutes.has_value(), point_noise_});
  }

  const WindowTemplate& feet() const { return own_ ? *own_ : window_; }

  // A peak that is not seen has none: it keeps the template's.
  void take_own_feet() {
    if (!chosen_.minutes) return;
    const double apex = *chosen_.minutes;
    const Outcome<PlacedWindow> placed =
        place_at_own_feet(stretch_, chosen_.neighbours, apex,
                          window_.width_half_minutes, point_noise_);
    if (!placed) return;
    own_ = window_;
    own_->left_minutes = apex - placed->left.minutes;
    own_->right_minutes = placed->right.minutes - apex;
  }

  void state_response() {
    peak_.found = chosen_.minutes.has_value();
    peak_.manual = manual_.has_value();
    double apex = chosen_.minutes.value_or(expected_);
    if (peak_.found && is_sharp()) {
      apex = sharpened_apex(stretch_, apex, window_.width_half_minutes,
                            point_noise_ / chosen_.height);
      const Outcome<PlacedWindow> again = place_own(apex);
      if (again) placed_ = *again;
    }
    peak_.baseline = baseline_name(target_.integration.baseline);
    peak_.retention_minutes = apex;
    peak_.start_minutes = placed_.left.minutes;
    peak_.end_minutes = placed_.right.minutes;
    peak_.area = integrate_window(stretch_, placed_);
    peak_.height = signal_near(stretch_, apex) - placed_.baseline_at(apex);
    if (placed_.left.dropped || placed_.right.dropped) peak_.overlap = "drop";
    part_from_neighbours();
  }

  bool is_sharp() const {
    return chosen_.height >= kSharpHeight * point_noise_;
  }

  void part_from_neighbours() {
    parted_ = part_overlap(stretch_, chosen_, placed_, feet(),
                           target_.integration.overlap, peak_.retention_minutes,
                           point_noise_, peak_.reasons);
    if (!parted_) return;
    peak_.overlap = parted_->overlap;
    peak_.retention_minutes = parted_->apex;
    peak_.start_minutes = parted_->window.left.minutes;
    peak_.end_minutes = parted_->window.right.minutes;
    peak_.area = parted_->area;
    peak_.height = parted_->height;
    for (const std::string& word : parted_->reasons) add_reason(word);
  }

  bool by(IntegrationSettings::Response response) const {
    return target_.integration.response == response;
  }

  void state_template() {
    Outcome<TemplateFit> fit =
        fit_template(stretch_, placed_, peak_.retention_minutes, window_,
                     colour_of_noise(noise_, model_));
    if (fit) fit_ = *fit;
    if (fit && fit->shape_passed()) {
      peak_.template_response = fit->response;
      peak_.shape_passed = true;
      // Where the shape fits best scatters as little as any estimate can; the
      // apex alone knows less of a high peak, whose reach is short.
      if (peak_.found && is_sharp()) {
        peak_.retention_minutes = fit->apex_minutes;
      }
      return;
    }
    peak_.area_instead = true;
    add_reason(fit ? "shape-differs" : "template-not-fitted");
  }

  std::optional<WidthAt> width(double fraction) const {
    const bool alone = parted_ && parted_->alone;
    return width_at(
        alone ? *parted_->alone : stretch_, parted_ ? parted_->window : placed_,
        peak_.retention_minutes, peak_.height, fraction, point_noise_);
  }

  void state_shape() {
    if (const auto half = width(0.5)) {
      peak_.width_half_minutes = half->total();
      peak_.plates = plate_number(peak_.retention_minutes, half->total());
      state_resolution();
    }
    if (target_.integration.hold_up_minutes) {
      peak_.capacity_factor = capacity_factor(
          peak_.retention_minutes, *target_.integration.hold_up_minutes);
    }
    if (const auto at_5 = width(0.05)) peak_.tailing = tailing_factor(*at_5);
    if (const auto at_10 = width(0.1)) {
      peak_.asymmetry = asymmetry_factor(*at_10);
    }
    const double half =
        peak_.width_half_minutes.value_or(window_.width_half_minutes);
    if (is_saturated(stretch_.minutes, stretch_.as_detected(),
                     placed_.left.minutes, placed_.right.minutes, peak_.height,
                     half)) {
      add_reason("saturated");
    }
  }

  // To the nearest neighbour, whose width is taken above its own baseline.
  void state_resolution() {
    const double own = peak_.retention_minutes;
    const double least = 0.5 * window_.width_half_minutes;
    const Summit* nearest = nullptr;
    for (const Summit& summit : chosen_.neighbours) {
      const double away = std::abs(summit.minutes - own);
      if (away <= least) continue;
      if (!nearest || away < std::abs(nearest->minutes - own)) {
        nearest = &summit;
      }
    }
    if (nearest == nullptr) return;
    const auto around = place(nearest->minutes);
    if (!around) return;
    const double there = nearest->minutes;
    const double height =
        signal_near(stretch_, there) - around->baseline_at(there);
    const auto half =
        width_at(stretch_, *around, there, height, 0.5, point_noise_);
    if (!half) return;
    peak_.resolution =
        there > own
            ? resolution(own, *peak_.width_half_minutes, there, half->total())
            : resolution(there, half->total(), own, *peak_.width_half_minutes);
  }

  void state_noise() {
    if (!noise_) {
      add_reason("no-noise");
      return;
    }
    peak_.noise = noise_figure(*noise_, target_.noise.measure);
    if (peak_.found) {
      const Outcome<double> ratio =
          signal_to_noise(peak_.height, *noise_, target_.noise.measure);
      if (ratio) {
        peak_.signal_to_noise = *ratio;
      } else {
        add_reason("noise-zero");
      }
    }
    const Outcome<double> spread = predicted_spread();
    if (spread) {
      peak_.response_noise = *spread;
    } else {
      peak_.response_noise_absent = spread.reason();
    }
  }

  // An estimated baseline is no weighted sum of points: it is simulated.
  Outcome<double> predicted_spread() {
    if (!is_estimated(target_.integration.baseline)) {
      return predict_response_noise(response_weights(), model_, *noise_);
    }
    if (noise_->simulated_baseline) {
      peak_.baseline_bias =
          noise_->simulated_baseline->of(target_.integration.response, model_);
    }
    if (!noise_->whole) return NotApplicable{noise_->whole.reason()};
    if (!peak_.baseline_bias) {
      return NotApplicable{"noise-zero: there is no noise to simulate"};
    }
    return peak_.baseline_bias->blank_sd;
  }

  std::vector<double> response_weights() const {
    if (by(IntegrationSettings::Response::Height)) {
      if (parted_) return parted_->height_weights;
      return height_weights(stretch_, placed_, peak_.retention_minutes).values;
    }
    if (peak_.template_response) return fit_->weights;
    if (parted_) return parted_->area_weights;
    return area_weights(stretch_, placed_).values;
  }

  void name_troubles() {
    if (has_gap(stretch_, placed_)) add_reason("gap-in-time");
    if (is_flat(stretch_.as_detected())) add_reason("flat-signal");
    if (has_negative_peak(stretch_, placed_, model_,
                          target_.integration.threshold, peak_.height)) {
      add_reason("negative-peak");
    }
  }

  void gather_reasons() {
    name_troubles();
    for (const std::size_t i : stretch_.spikes) {
      const double t = stretch_.minutes[i];
      if (t >= peak_.start_minutes && t <= peak_.end_minutes) {
        add_reason("spike");
      }
    }
    for (const std::string& word : placed_.reasons) add_reason(word);
    if (!stretch_.baseline_settled) add_reason("baseline-unsettled");
    for (const std::string& word : chosen_.reasons) add_reason(word);
    if (window_.weak) add_reason("weak-template");
    if (noise_) {
      for (const std::string& word : noise_->reasons) add_reason(word);
    }
  }

  void add_reason(const std::string& word) {
    const auto& known = peak_.reasons;
    if (std::find(known.begin(), known.end(), word) == known.end()) {
      peak_.reasons.push_back(word);
    }
  }

  const TargetSettings& target_;
  const WindowTemplate& window_;
  double expected_;
  const Outcome<NoiseEstimate>& noise_;
  std::optional<ManualBounds> manual_;
  NoiseModel model_;
  double point_noise_ = 0.0;
  SmoothedStretch stretch_;
  ChosenApex chosen_;
  std::optional<WindowTemplate> own_;  // with the feet found
  PlacedWindow placed_;
  std::optional<PartedPeak> parted_;
  std::optional<TemplateFit> fit_;
  Peak peak_;
};

// Why nothing can be measured at all; empty: it can.
std::string refusal(const Trace& trace, const TargetSettings& target) {
  if (trace.minutes.empty()) return "no-signal: the trace has no points";
  if (available(target.integration)) return {};
  return "not-available: this version integrates over the template window, "
         "and fits, skims and scales the template with a straight baseline "
         "only";
}

}  // namespace

Outcome<Peak> measure_peak(const Trace& trace, const TargetSettings& target,
                           const WindowTemplate& window, double expected,
                           const Outcome<NoiseEstimate>& noise,
                           const std::string& noise_source,
                           const std::optional<ManualBounds>& manual) {
  return measure_peak_with_working(trace, target, window, expected, noise,
                                   noise_source, manual)
      .peak;
}

WorkedPeak measure_peak_with_working(
    const Trace& trace, const TargetSettings& target,
    const WindowTemplate& window, double expected,
    const Outcome<NoiseEstimate>& noise, const std::string& noise_source,
    const std::optional<ManualBounds>& manual) {
  const std::string reason = refusal(trace, target);
  if (!reason.empty()) return {NotApplicable{reason}, {}};
  const TargetSettings meant =
      manual ? between_bounds(target, *manual) : target;
  Measurement measurement(trace, meant, window,
                          manual ? manual->middle() : expected, noise, manual);
  WorkedPeak worked{measurement.measure(), {}};
  if (worked.peak) {
    Peak& peak = worked.peak.value();
    if (noise) peak.noise_source = noise_source;
    peak.area_instead =
        peak.area_instead ||
        (manual && target.integration.response != meant.integration.response);
  }
  worked.working = measurement.hand_over();
  return worked;
}

}  // namespace loqsmith
