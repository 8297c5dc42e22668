#pragma once

#include <string>

#include "loqsmith/signal/measure_peak.hpp"
#include "signal_support.hpp"

namespace loqsmith::test {

/// A detector with a peak shape: one standard teaches the window, blanks and
/// samples are measured over it, the noise comes from other blanks.
class SimulatedNight {
 public:
  SimulatedNight(const SimulatedTrace& detector, const SimulatedPeak& unit,
                 const std::string& name)
      : detector_(detector),
        unit_(unit),
        target_(target_at(unit.minutes)),
        stream_(name) {
    SimulatedTrace calm = quiet();
    calm.white_noise = 1.0;
    calm.peaks = {scaled(600.0)};
    window_ = *taught_by(simulate_trace(calm, stream_), target_);
    expected_ = window_.drift.front().second;
    const Peak one = without_noise(1.0);
    unit_area_ = one.area;
    unit_height_ = one.height;
    renew_noise();
  }

  /// A peak of so many units in the next trace; 0: a blank.
  Peak measure(double units) {
    if (++measured_ % 50 == 0) renew_noise();
    SimulatedTrace wanted = detector_;
    if (units > 0.0) wanted.peaks = {scaled(units)};
    return *measure_peak(simulate_trace(wanted, stream_), target_, window_,
                         expected_, noise_, "blank 1");
  }

  /// The same without any noise: what is to come out.
  Peak without_noise(double units) const {
    SimulatedTrace wanted = quiet();
    wanted.peaks = {scaled(units)};
    return *measure_peak(simulate_trace(wanted, "clean"), target_, window_,
                         expected_, no_noise(), "");
  }

  double unit_area() const { return unit_area_; }
  double unit_height() const { return unit_height_; }
  const WindowTemplate& window() const { return window_; }

 private:
  SimulatedPeak scaled(double units) const {
    SimulatedPeak peak = unit_;
    peak.area *= units;
    return peak;
  }

  SimulatedTrace quiet() const {
    SimulatedTrace wanted = detector_;
    wanted.white_noise = 0.0;
    wanted.creeping_noise = 0.0;
    wanted.flicker_noise = 0.0;
    wanted.ripple = 0.0;
    return wanted;
  }

  void renew_noise() {
    noise_ = measure_noise(simulate_trace(detector_, stream_), expected_,
                           window_.width_half_minutes, target_.noise);
  }

  SimulatedTrace detector_;
  SimulatedPeak unit_;
  TargetSettings target_;
  RandomStream stream_;
  WindowTemplate window_;
  Outcome<NoiseEstimate> noise_ = no_noise();
  double expected_ = 0.0;
  double unit_area_ = 0.0;
  double unit_height_ = 0.0;
  int measured_ = 0;
};

/// 24 points across the half width of a Gaussian of 0.05 minutes.
inline SimulatedTrace plain_detector() {
  SimulatedTrace detector;
  detector.start_minutes = 3.0;
  detector.end_minutes = 7.0;
  detector.step_minutes = 0.005;
  detector.offset = 30.0;
  detector.drift_per_minute = 2.0;
  return detector;
}

inline SimulatedTrace white_detector() {
  SimulatedTrace detector = plain_detector();
  detector.white_noise = 1.0;
  return detector;
}

/// Creeping noise over five points, with some white noise.
inline SimulatedTrace markov_detector() {
  SimulatedTrace detector = plain_detector();
  detector.white_noise = 0.5;
  detector.creeping_noise = 0.87;
  detector.creep = 0.8;
  return detector;
}

inline SimulatedTrace flicker_detector() {
  SimulatedTrace detector = plain_detector();
  detector.flicker_noise = 1.0;
  return detector;
}

/// White noise on a pump's slow ripple.
inline SimulatedTrace rippled_detector() {
  SimulatedTrace detector = white_detector();
  detector.ripple = 0.3;
  detector.ripple_minutes = 0.9;
  return detector;
}

}  // namespace loqsmith::test
