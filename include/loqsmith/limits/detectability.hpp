#pragma once

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

/// What turns the standard deviation of a blank's reading into the critical
/// value and into the minimum detectable value.
struct Detectability {
  double t = 0.0;      ///< quantile of Student's t for 1 - alpha
  double delta = 0.0;  ///< detectable_noncentrality(alpha, beta, df)
};

/// @param degrees_of_freedom  at least 1
/// @return not applicable where detectable_noncentrality is not
Outcome<Detectability> detectability_of(const ProcedureSettings& procedure,
                                        double degrees_of_freedom);

/// A found concentration 10 times its own standard deviation is quantified.
inline constexpr double kQuantitationFactor = 10.0;

/// Levels, measurements averaged, both multiples and kQuantitationFactor.
void add_detectability_terms(LimitEstimate& estimate,
                             const ProcedureSettings& procedure,
                             const Detectability& multiples);

}  // namespace loqsmith
