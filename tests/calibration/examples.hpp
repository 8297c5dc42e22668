#pragma once

#include <string>
#include <utility>
#include <vector>

#include "loqsmith/calibration/fit_calibration.hpp"

namespace loqsmith::test {

using Weight = CalibrationSettings::Weight;
using Model = CalibrationSettings::Model;
using Intercept = CalibrationSettings::Intercept;

inline StandardPoint standard(int injection, double concentration,
                              double response) {
  StandardPoint point;
  point.injection = injection;
  point.level = "L" + std::to_string(injection);
  point.concentration = concentration;
  point.response = response;
  return point;
}

inline std::vector<StandardPoint> standards(
    const std::vector<std::pair<double, double>>& pairs) {
  std::vector<StandardPoint> points;
  int injection = 0;
  for (const auto& [concentration, response] : pairs)
    points.push_back(standard(++injection, concentration, response));
  return points;
}

/// Fluorescence of fluorescein, pg/mL: Miller and Miller, Statistics and
/// Chemometrics for Analytical Chemistry, regression chapter (data and printed
/// values from memory).
inline std::vector<StandardPoint> fluorescence() {
  return standards({{0, 2.1},
                    {2, 5.0},
                    {4, 9.0},
                    {6, 12.6},
                    {8, 17.3},
                    {10, 21.0},
                    {12, 24.7}});
}

/// Seven levels over two decades, made for these tests.
inline std::vector<StandardPoint> seven_levels() {
  return standards({{1, 10.8},
                    {2, 20.1},
                    {5, 52.5},
                    {10, 98.0},
                    {20, 205},
                    {50, 492},
                    {100, 1010}});
}

}  // namespace loqsmith::test
