#pragma once

#include <optional>
#include <string>

#include "loqsmith/judgement/settings.hpp"

namespace loqsmith {

/// Printed for a withheld result. A word and not an empty cell, which whoever
/// copies the column could take for "not analysed" or for zero.
inline constexpr const char* kWithheldText = "withheld";

/// One result's numbers, all in the sample's unit.
struct ReportedNumbers {
  std::optional<double> result;
  std::optional<double> detection_limit;
  std::optional<double> quantitation_limit;
  std::optional<double> highest;  ///< end of the accepted range
};

/// The text that may leave the laboratory.
///
/// - reportable, estimated: the result by the method's digits and rule
///   (estimated with below-quantitation="limit": "< " the quantitation limit);
/// - not detected: "< " the detection or quantitation limit, as below-detection
///   says. The limit is rounded up, so that no amount is excluded that the
///   limit does not exclude;
/// - above range: "> " the highest accepted standard in the sample, rounded
///   down: the result is known to exceed that much, not more;
/// - withheld: kWithheldText, also where a needed number is missing.
std::string reported_text(Status status, const ReportedNumbers& numbers,
                          const ReportingSettings& settings);

}  // namespace loqsmith
