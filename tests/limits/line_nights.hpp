#pragma once

#include <cmath>
#include <cstddef>
#include <functional>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "calibration/examples.hpp"
#include "limits/evidence_builders.hpp"
#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/numerics/normal.hpp"
#include "loqsmith/numerics/random.hpp"

namespace loqsmith::test {

/// What is true in simulated nights: y = 20 + 4 x, a response scatters by
/// 1 + growth x.
struct TrueLine {
  double intercept = 20.0;
  double slope = 4.0;
  double growth = 0.0;
  std::vector<double> levels;
  int replicates = 1;  ///< standards a level
  int blanks = 0;

  double sd_at(double x) const { return 1.0 + growth * x; }
  double response(double x, RandomStream& random) const {
    return intercept + slope * x + sd_at(x) * random.normal();
  }
};

/// Standards and blanks of one night with the fitted line.
inline LimitEvidence drawn_night(const TrueLine& truth, RandomStream& random) {
  std::vector<std::pair<double, double>> pairs;
  for (double level : truth.levels)
    for (int i = 0; i < truth.replicates; ++i)
      pairs.emplace_back(level, truth.response(level, random));
  LimitEvidence evidence;
  const auto line = fit_calibration(standards(pairs), {});
  if (line) evidence.calibration = *line;
  std::vector<double> blanks;
  for (int i = 0; i < truth.blanks; ++i)
    blanks.push_back(truth.response(0.0, random));
  evidence.blanks = blanks_of(blanks);
  return evidence;
}

/// Mean and standard deviation over nights.
struct OverNights {
  std::vector<double> values;

  void add(double value) { values.push_back(value); }
  double mean_value() const { return mean(values); }
  double sd() const { return standard_deviation(values); }
};

/// Probability, given the night, that the mean of m responses at x is read at
/// or above the threshold (concentration).
inline double chance_above(const TrueLine& truth, const Calibration& line,
                           double threshold, double x, int m = 1) {
  const double response = line.intercept + line.slope * threshold;
  return normal_cdf((truth.intercept + truth.slope * x - response) *
                    std::sqrt(static_cast<double>(m)) / truth.sd_at(x));
}

}  // namespace loqsmith::test
