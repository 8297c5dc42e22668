#pragma once

#include <cmath>
#include <vector>

#include "calibration/examples.hpp"
#include "limits/evidence_builders.hpp"

namespace loqsmith::test {

/// Evidence with that calibration, where it can be fitted.
inline LimitEvidence fitted(const std::vector<StandardPoint>& points,
                            const CalibrationSettings& settings = {}) {
  LimitEvidence evidence;
  const auto calibration = fit_calibration(points, settings);
  if (calibration) evidence.calibration = *calibration;
  return evidence;
}

inline ProcedureSettings with_levels(const std::string& name, double alpha,
                                     double beta, int replicates = 1) {
  ProcedureSettings settings = procedure(name);
  settings.alpha = alpha;
  settings.beta = beta;
  settings.replicates = replicates;
  return settings;
}

/// Blanks near the limit, nA: Harris, Quantitative Chemical Analysis,
/// detection-limit example (data from memory); slope 0.229 nA per micromole.
inline std::vector<double> low_current_blanks() {
  return {1.4, 2.2, 1.7, 0.9, 0.4, 1.5, 0.7};
}
constexpr double kLowCurrentSlope = 0.229;

/// Six levels in four replicates with a standard deviation that grows with the
/// concentration; figures made for the formulas of ISO 11843-2, whose results
/// were computed independently.
inline std::vector<StandardPoint> growing_scatter() {
  return standards({{0, 1.02},  {0, 0.95},  {0, 1.1},   {0, 0.93}, {1, 3.05},
                    {1, 2.88},  {1, 3.21},  {1, 2.94},  {2, 5.12}, {2, 4.8},
                    {2, 5.25},  {2, 4.91},  {4, 9.3},   {4, 8.72}, {4, 9.05},
                    {4, 8.61},  {8, 17.6},  {8, 16.4},  {8, 17.1}, {8, 16.8},
                    {16, 34.5}, {16, 31.9}, {16, 33.6}, {16, 32.2}});
}

}  // namespace loqsmith::test
