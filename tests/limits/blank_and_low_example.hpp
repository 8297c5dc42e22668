#pragma once

#include <vector>

namespace loqsmith::test {

// Five blank samples and five low samples, twelve results each, made with a
// seeded random stream.

inline const std::vector<std::vector<double>> kBlankSamples = {
    {0.26, 0.19, 0.29, 0.21, 0.01, 0.45, 0.18, 0.48, 0.19, 0.36, 0.48, 0.39},
    {0.31, 0.32, 0.26, 0.45, 0.36, 0.29, 0.31, 0.37, 0.21, 0.21, 0.33, 0.44},
    {0.38, 0.30, 0.37, 0.32, 0.30, 0.14, 0.18, 0.42, 0.32, 0.31, 0.44, 0.31},
    {0.35, 0.48, 0.43, 0.31, 0.12, 0.44, 0.64, 0.35, 0.05, 0.33, 0.26, 0.32},
    {0.24, 0.20, 0.17, 0.34, 0.19, 0.35, 0.17, 0.35, 0.40, 0.27, 0.02, 0.26}};

inline const std::vector<std::vector<double>> kLowSamples = {
    {0.95, 0.81, 0.92, 0.79, 0.79, 1.25, 0.78, 1.06, 0.69, 0.81, 0.77, 0.83},
    {1.22, 0.98, 1.05, 0.97, 0.71, 0.81, 1.04, 1.16, 0.69, 0.90, 1.07, 1.02},
    {1.03, 1.10, 0.83, 0.78, 0.80, 0.77, 0.78, 0.84, 0.87, 0.83, 1.04, 1.09},
    {0.86, 0.99, 0.82, 0.85, 0.83, 0.84, 0.80, 0.94, 0.85, 0.66, 1.15, 1.13},
    {0.95, 0.96, 0.86, 1.04, 0.90, 1.06, 0.72, 0.78, 0.71, 0.78, 0.87, 0.99}};

inline std::vector<double> together(
    const std::vector<std::vector<double>>& samples) {
  std::vector<double> all;
  for (const std::vector<double>& sample : samples)
    all.insert(all.end(), sample.begin(), sample.end());
  return all;
}

}  // namespace loqsmith::test
