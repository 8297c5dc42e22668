#pragma once

#include <vector>

#include "loqsmith/calibration/replicate_groups.hpp"

namespace loqsmith::test {

/// Diameters of gears from ten batches of ten: NIST/SEMATECH e-Handbook of
/// Statistical Methods, GEAR.DAT.
inline std::vector<ReplicateGroup> gear_batches() {
  const std::vector<std::vector<double>> batches{
      {1.006, 0.996, 0.998, 1.000, 0.992, 0.993, 1.002, 0.999, 0.994, 1.000},
      {0.998, 1.006, 1.000, 1.002, 0.997, 0.998, 0.996, 1.000, 1.006, 0.988},
      {0.991, 0.987, 0.997, 0.999, 0.995, 0.994, 1.000, 0.999, 0.996, 0.996},
      {1.005, 1.002, 0.994, 1.000, 0.995, 0.994, 0.998, 0.996, 1.002, 0.996},
      {0.998, 0.998, 0.982, 0.990, 1.002, 0.984, 0.996, 0.993, 0.980, 0.996},
      {1.009, 1.013, 1.009, 0.997, 0.988, 1.002, 0.995, 0.998, 0.981, 0.996},
      {0.990, 1.004, 0.996, 1.001, 0.998, 1.000, 1.018, 1.010, 0.996, 1.002},
      {0.998, 1.000, 1.006, 1.000, 1.002, 0.996, 0.998, 0.996, 1.002, 1.006},
      {1.002, 0.998, 0.996, 0.995, 0.996, 1.004, 1.004, 0.998, 0.999, 0.991},
      {0.991, 0.995, 0.984, 0.994, 0.997, 0.997, 0.991, 0.998, 1.004, 0.997}};
  std::vector<ReplicateGroup> groups;
  for (const auto& batch : batches)
    groups.push_back({static_cast<double>(groups.size() + 1), batch,
                      std::vector<int>(batch.size(), 0)});
  return groups;
}

}  // namespace loqsmith::test
