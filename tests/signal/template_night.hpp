#pragma once

#include <cmath>
#include <string>
#include <vector>

#include "loqsmith/signal/typical_noise.hpp"
#include "signal_support.hpp"

namespace loqsmith::test {

/// A simulated night with response="template": standards teach window and
/// shape, blanks the noise that the weights follow; each injection is sampled
/// at its own fraction of a step and takes its noise from one of ten blanks.
class TemplateNight {
 public:
  TemplateNight(const SimulatedTrace& detector, const std::string& name,
                double tau = 0.0)
      : detector_(detector), tau_(tau), stream_(name), target_(target_at(5.0)) {
    target_.integration.response = IntegrationSettings::Response::Template;
    std::vector<TeacherPeak> seen;
    for (int i = 0; i < 5; ++i) {
      const auto peak = observe_teacher(trace_of(50.0 * (i + 2)), target_,
                                        i + 1, Role::Standard);
      if (peak) seen.push_back(*peak);
    }
    window_ = *learn_template(seen);
    std::vector<NoiseModel> models;
    for (int i = 0; i < 10; ++i) {
      blanks_.push_back(measure_noise(
          trace_of(0.0), 5.0, window_.width_half_minutes, target_.noise));
      models.push_back(*blanks_.back()->whole);
    }
    window_.weights_noise = typical_noise(models);
    expected_ = window_.drift.front().second;
  }

  /// A peak of this area (0: a blank) at its expected time.
  Peak measure(double area) {
    const Trace trace = trace_of(area);
    return measured(trace, blank_noise());
  }

  /// The same peak without noise, weighed by the same template.
  Peak measure_clean(double area) {
    SimulatedTrace wanted = wanted_for(area);
    wanted.white_noise = 0.0;
    wanted.creeping_noise = 0.0;
    return measured(simulate_trace(wanted, stream_), no_noise());
  }

  Peak measured(const Trace& trace, const Outcome<NoiseEstimate>& noise) const {
    return *measure_peak(trace, target_, window_, expected_, noise, "blank 1");
  }

  Trace trace_of(double area) {
    return simulate_trace(wanted_for(area), stream_);
  }

  /// That of one blank after the other.
  const Outcome<NoiseEstimate>& blank_noise() {
    next_blank_ = (next_blank_ + 1) % blanks_.size();
    return blanks_[next_blank_];
  }

  /// The detector with a peak, sampled at a fraction of its own.
  SimulatedTrace wanted_for(double area) {
    SimulatedTrace wanted = detector_;
    wanted.peaks.clear();
    if (area > 0.0) wanted.peaks = {{5.0, kSigma, area, tau_}};
    wanted.start_minutes += wanted.step_minutes * stream_.uniform();
    return wanted;
  }

  const WindowTemplate& window() const { return window_; }
  WindowTemplate& window() { return window_; }
  const TargetSettings& target() const { return target_; }
  RandomStream& stream() { return stream_; }
  double tau() const { return tau_; }
  const SimulatedTrace& detector() const { return detector_; }

  static constexpr double kSigma = 0.05;

 private:
  SimulatedTrace detector_;
  double tau_;
  RandomStream stream_;
  TargetSettings target_;
  WindowTemplate window_;
  std::vector<Outcome<NoiseEstimate>> blanks_;
  std::size_t next_blank_ = 0;
  double expected_ = 5.0;
};

inline SimulatedTrace template_detector(double white, double creeping) {
  SimulatedTrace detector;
  detector.end_minutes = 14.0;
  detector.offset = 30.0;
  detector.drift_per_minute = 2.0;
  detector.white_noise = white;
  detector.creeping_noise = creeping;
  detector.creep = 0.8;
  return detector;
}

/// Area of a peak of this height.
inline double area_of_height(double height) {
  return height * TemplateNight::kSigma * std::sqrt(2.0 * 3.14159265358979324);
}

}  // namespace loqsmith::test
