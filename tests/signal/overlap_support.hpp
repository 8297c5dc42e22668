#pragma once

#include <string>
#include <vector>

#include "loqsmith/signal/learn.hpp"
#include "loqsmith/signal/measure_peak.hpp"
#include "signal_support.hpp"
#include "support/simulator.hpp"

namespace loqsmith::test {

/// Two peaks of one shape around 5 minutes, the first of them the target's.
struct Pair {
  double sigma = 0.05;
  double tau = 0.02;
  double first_height = 100.0;
  double second_height = 100.0;
  double resolution = 1.0;  ///< by widths at half height
  double noise = 1.0;
};

/// Height of a peak of unit area and its width at half height, from the
/// simulator's own shape on a fine grid.
struct UnitShape {
  double height = 0.0;
  double width_half = 0.0;
  double apex = 0.0;  ///< after mu
};

inline UnitShape unit_shape(double sigma, double tau) {
  UnitShape shape;
  const double step = 1e-4 * sigma;
  const auto f = [&](double t) {
    return modified_gaussian(t, 0.0, sigma, tau);
  };
  for (double t = -1.0 * sigma; t < sigma + tau; t += step) {
    if (f(t) > shape.height) {
      shape.height = f(t);
      shape.apex = t;
    }
  }
  double left = shape.apex;
  while (f(left) > 0.5 * shape.height) left -= step;
  double right = shape.apex;
  while (f(right) > 0.5 * shape.height) right += step;
  shape.width_half = right - left;
  return shape;
}

inline double distance_of(const Pair& pair, const UnitShape& shape) {
  return pair.resolution * 2.0 * shape.width_half / 1.18;
}

/// The pair's trace without noise; a height of zero leaves a peak out.
inline SimulatedTrace trace_of(const Pair& pair) {
  const UnitShape shape = unit_shape(pair.sigma, pair.tau);
  SimulatedTrace wanted;
  wanted.end_minutes = 14.0;
  wanted.offset = 20.0;
  wanted.drift_per_minute = 2.0;
  wanted.white_noise = pair.noise;
  const double first = 5.0 - shape.apex;
  wanted.peaks = {
      {first, pair.sigma, pair.first_height / shape.height, pair.tau},
      {first + distance_of(pair, shape), pair.sigma,
       pair.second_height / shape.height, pair.tau}};
  return wanted;
}

/// Where the pair's second peak has its apex.
inline double second_apex(const Pair& pair) {
  return 5.0 + distance_of(pair, unit_shape(pair.sigma, pair.tau));
}

inline TargetSettings target_with(IntegrationSettings::Overlap overlap,
                                  double minutes) {
  TargetSettings target = target_at(minutes, 0.06);
  target.integration.overlap = overlap;
  return target;
}

/// What one high standard of the first peak alone teaches.
inline WindowTemplate taught_alone(Pair pair,
                                   IntegrationSettings::Overlap overlap) {
  pair.first_height = 2000.0;
  pair.second_height = 0.0;
  return *taught_by(simulate_trace(trace_of(pair), "the standard"),
                    target_with(overlap, 5.0));
}

inline Outcome<NoiseEstimate> noise_of_blank(Pair pair, double width_half) {
  pair.first_height = 0.0;
  pair.second_height = 0.0;
  return measure_noise(simulate_trace(trace_of(pair), "the blank"), 5.0,
                       width_half, {});
}

}  // namespace loqsmith::test
