#pragma once

#include <optional>
#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/calibration/calibration.hpp"

namespace loqsmith {

/// One candidate weight: the sum over the used standards above zero of
/// |back-calculated - nominal| / nominal, in percent.
struct WeightCandidate {
  CalibrationSettings::Weight weight = CalibrationSettings::Weight::None;
  Outcome<double> sum_relative_error_percent = NotApplicable{"not computed"};
};

/// Compares weights on the same standards and model. It advises, the method
/// decides.
struct WeightAdvice {
  std::vector<WeightCandidate> candidates;  ///< none, 1/x, 1/x2, 1/s2
  CalibrationSettings::Weight in_use = CalibrationSettings::Weight::None;
  std::optional<CalibrationSettings::Weight> least;
  /// Unweighted although the standards span more than a factor of ten.
  bool unweighted_over_a_decade = false;
  bool advises_change = false;
  std::string advice;  ///< plain language with figures
};

/// Fits the standards in use with each weight. A change is advised where the
/// curve is unweighted over more than a decade, or where another weight makes
/// the sum at least a fifth smaller: on one sequence sums that differ by less
/// are chance. A mean response factor has its weight by definition: no advice.
///
/// Source: comparison by the sum of relative errors, A. M. Almeida, M. M.
/// Castel-Branco and A. C. Falcao, J. Chromatogr. B 774 (2002) 215; from
/// memory.
WeightAdvice advise_weight(const Calibration& calibration);

}  // namespace loqsmith
