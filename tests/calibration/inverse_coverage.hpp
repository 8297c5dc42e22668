#pragma once

#include <gtest/gtest.h>

#include <cmath>
#include <vector>

#include "calibration/examples.hpp"
#include "loqsmith/calibration/inverse.hpp"
#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/numerics/random.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {

// How often intervals of inverse predictions cover the truth, by simulation.

inline constexpr double kSlope = 10.0;

/// Standard deviation of a response, two components.
struct Noise {
  double additive = 0.0;
  double proportional = 0.0;
  double sd_at(double x) const {
    return std::hypot(additive, proportional * kSlope * x);
  }
};

struct Design {
  std::vector<double> levels;
  int replicates = 1;
  CalibrationSettings settings;
  Noise noise;
  int blanks = 0;
  double intercept = 3.0;
  double curvature = 0.0;
};

inline double truth(const Design& design, double x) {
  return design.intercept + kSlope * x + design.curvature * x * x;
}

inline double response(const Design& design, double x, RandomStream& random) {
  return truth(design, x) + design.noise.sd_at(x) * random.normal();
}

inline Outcome<Calibration> simulated(const Design& design,
                                      RandomStream& random) {
  std::vector<StandardPoint> points;
  for (double x : design.levels)
    for (int i = 0; i < design.replicates; ++i)
      points.push_back(standard(static_cast<int>(points.size()) + 1, x,
                                response(design, x, random)));
  Outcome<Calibration> fit = fit_calibration(points, design.settings);
  if (design.blanks == 0 || !fit) return fit;
  std::vector<double> blanks;
  for (int i = 0; i < design.blanks; ++i)
    blanks.push_back(response(design, 0.0, random));
  fit.value().blanks =
      BlankSpread{standard_deviation(blanks), design.blanks - 1.0};
  return fit;
}

/// Share of nights whose interval covers each of `at`, mean of m responses.
inline std::vector<double> coverage(const char* seed, const Design& design,
                                    const std::vector<double>& at, int nights,
                                    int m = 1) {
  RandomStream random(seed);
  std::vector<double> covered(at.size(), 0.0);
  for (int night = 0; night < nights; ++night) {
    const auto curve = simulated(design, random);
    for (std::size_t i = 0; i < at.size(); ++i) {
      double sum = 0.0;
      for (int k = 0; k < m; ++k) sum += response(design, at[i], random);
      if (!curve) continue;
      const auto found = concentration_from_response(*curve, sum / m, m);
      if (found && found->interval && found->interval->lower <= at[i] &&
          at[i] <= found->interval->upper)
        covered[i] += 1.0;
    }
  }
  for (double& share : covered) share /= nights;
  return covered;
}

inline void expect_95_percent(const std::vector<double>& covered, int nights) {
  for (double share : covered)
    EXPECT_TRUE(within_sampling_error(share, std::sqrt(0.95 * 0.05),
                                      static_cast<std::size_t>(nights), 0.95));
}

}  // namespace loqsmith::test
