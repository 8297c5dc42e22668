#pragma once

#include <string>

#include "signal_support.hpp"

namespace loqsmith::test {

inline const WindowTemplate kWindow = window_of(0.19, 0.19, 0.1177);

/// A Gaussian of that height and sigma 0.05 in white noise; 0: a blank.
inline SimulatedTrace sample(double height, double noise = 1.0) {
  SimulatedTrace wanted;
  wanted.white_noise = noise;
  if (height > 0.0) wanted.peaks = {gaussian_of_height(5.0, 0.05, height)};
  return wanted;
}

inline Outcome<NoiseEstimate> blank_noise() {
  return measure_noise(simulate_trace(sample(0.0), "the blank"), 5.0, 0.1177,
                       {});
}

inline Outcome<Peak> measured(const Trace& trace,
                              const TargetSettings& target = target_at(5.0),
                              const WindowTemplate& window = kWindow) {
  return measure_peak(trace, target, window, target.retention_minutes,
                      blank_noise(), "blank 2");
}

inline Outcome<Peak> measured(const SimulatedTrace& wanted,
                              const std::string& name) {
  return measured(simulate_trace(wanted, name));
}

}  // namespace loqsmith::test
