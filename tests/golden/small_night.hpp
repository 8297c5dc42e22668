#pragma once

#include <filesystem>
#include <string>
#include <utility>
#include <vector>

namespace loqsmith::test {

/// One injection of a night made for a single test: one analyte "zinol" on one
/// trace "uv", a Gaussian peak at 3 minutes, and at 4.5 minutes that of an
/// internal standard.
struct SmallInjection {
  std::string sample;
  std::string role;
  std::string level = {};
  std::string parent = {};
  double dilution = 1.0;
  double area = 0.0;  ///< true, signal unit x minute; 0: no peak
  double internal_standard_area = 0.0;
  double internal_standard_dilution = 1.0;
  std::string prep = {};
  double second_area = 0.0;  ///< on the trace "fl", where there is one
  double shift_minutes = 0.0;  ///< of the analyte's peak alone
};

struct SmallNight {
  std::string method;
  double noise_sd = 0.0;  ///< of a point, white, its own in each injection
  std::vector<std::pair<std::string, double>> levels;
  std::vector<SmallInjection> injections;
  bool has_second_trace = false;  ///< "fl" beside "uv"

  /// Writes the folder with its sheets and one mzML file an injection.
  void write(const std::filesystem::path& folder) const;
};

}  // namespace loqsmith::test
