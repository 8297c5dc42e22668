#pragma once

#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/calibration/calibration.hpp"

namespace loqsmith {

/// A standard that the tests point at. Only the method or an amendment can
/// leave it out; the curve without it is for comparison.
struct SuggestedExclusion {
  int injection = 0;
  std::string level;
  double concentration = 0.0;
  std::string why;  ///< the test with its figures
  Outcome<Calibration> without = NotApplicable{"not computed"};
};

/// Standards in run order that Grubbs' test among the replicates of their
/// level, or the deleted residual from the curve, calls outlying at 0.01. Each
/// comparison leaves out that one standard alone.
std::vector<SuggestedExclusion> suggest_exclusions(
    const Calibration& calibration);

}  // namespace loqsmith
