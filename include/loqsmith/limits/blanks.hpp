#pragma once

#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

/// The blanks that a procedure rests on, with their moments.
struct BlankSample {
  std::vector<BlankResponse> blanks;  ///< in run order, at least 3
  double mean = 0.0;                  ///< response
  double sd = 0.0;                    ///< response, n - 1 degrees of freedom
  std::size_t left_out = 0;           ///< after-high

  std::size_t n() const { return blanks.size(); }
  double degrees_of_freedom() const {
    return static_cast<double>(blanks.size()) - 1.0;
  }
};

/// "solvent blank", "method blank", "zero standard", "blank".
std::string blank_kind_words(BlankKind kind);

/// Blanks of the kind; those right after a high injection are left out unless
/// the carry-over check is present and passed.
/// @return not applicable: fewer than 3 left; all gave the same response (a
///         thresholded or rounded detector has no spread to speak of).
Outcome<BlankSample> usable_blanks(const LimitEvidence& evidence,
                                   BlankKind kind);

/// The kind that a procedure names, or that of <limits>.
BlankKind blank_kind_of(const LimitSettings& settings,
                        const ProcedureSettings& procedure);

/// Probability that one more blank of the same population gives a response at
/// or above the threshold:
///
///     P(t_{n-1} >= (threshold - mean) / (s sqrt(1 + 1/n)))
///
/// for normal blanks; the spread and the mean are both estimated.
double false_positive_rate(const BlankSample& sample, double threshold);

/// Findings about the blanks themselves: too few of them, integration over
/// found feet, what an estimated baseline does to them, one far from the
/// others, values that are not normal (Shapiro and Wilk, 1 %; where no single
/// one lies far off), a drift over the run. Nothing is ever deleted.
void judge_blanks(LimitEstimate& estimate, const BlankSample& sample,
                  const LimitEvidence& evidence, const LimitSettings& settings);

}  // namespace loqsmith
