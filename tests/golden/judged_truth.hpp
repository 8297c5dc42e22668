#pragma once

#include <filesystem>
#include <string>
#include <vector>

#include "generator/simulated_night.hpp"

namespace loqsmith::test {

/// A published sample result beside what is true.
struct JudgedResult {
  std::string key;      ///< "17/atrazine"
  double truth = 0.0;   ///< result, in the sample
  double result = 0.0;  ///< as published, full precision
  double detection_limit = 0.0;
  double quantitation_limit = 0.0;
  double highest = 0.0;      ///< highest accepted standard, in this sample
  double response_sd = 0.0;  ///< of a response at the true amount, as a result
  std::string status;

  /// The status that truth and the published limits give.
  std::string expected_status() const;
  /// True where no limit is within 3 standard deviations of the truth.
  bool clear_of_limits() const;
};

/// All results of role sample of a published run.
///
/// The standard deviation at zero is that of the published results of all
/// injections that truly hold nothing, about their mean; the part that grows
/// with the amount is the simulated night's own.
std::vector<JudgedResult> judged_results(const std::filesystem::path& run,
                                         const std::filesystem::path& truth,
                                         const SimulatedNight& night);

}  // namespace loqsmith::test
