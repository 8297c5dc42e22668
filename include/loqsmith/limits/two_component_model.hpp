#pragma once

#include <array>
#include <span>

#include "loqsmith/base/outcome.hpp"

namespace loqsmith {

/// Responses whose error is additive near zero and proportional far above:
///
///     y = intercept + slope x exp(eta) + epsilon
///
/// eta normal with mean 0 and standard deviation `proportional_sd`, epsilon
/// normal with mean 0 and `additive_sd`. So
///
///     var y = additive_sd^2 + slope^2 x^2 V,  V = exp(s^2) (exp(s^2) - 1)
///
/// with s the proportional_sd: the relative standard deviation of a
/// concentration falls towards sqrt(V), and never below it.
struct TwoComponentModel {
  double intercept = 0.0;        ///< response
  double slope = 0.0;            ///< response/concentration, above zero
  double additive_sd = 0.0;      ///< response, above zero
  double proportional_sd = 0.0;  ///< of ln of the concentration, above zero
  double log_likelihood = 0.0;   ///< by maximum likelihood only
  bool by_moments = false;       ///< not by maximum likelihood
  /// No proportional error shows: its standard deviation is held at
  /// kNoProportionalError, and it has no part in the covariance.
  bool additive_only = false;
  /// Of (intercept, slope, ln additive_sd, ln proportional_sd), from the
  /// observed information; zero by moments.
  std::array<std::array<double, 4>, 4> covariance{};

  double relative_variance() const;  ///< V
  double additive_concentration_sd() const { return additive_sd / slope; }
};

inline constexpr double kNoProportionalError = 1e-3;

/// Estimates from moments: additive_sd pooled over the replicates of levels
/// up to 10 times the lowest above zero, proportional_sd pooled over those of
/// ln(y - intercept) at levels from a tenth of the highest, the line weighted
/// by the variances that these predict, each in turn.
///
/// @param x  concentrations, zero or above, ascending
/// @param y  responses, as many
/// @return not applicable: no replicates at either end, replicates all equal,
///         no line, slope not positive.
Outcome<TwoComponentModel> two_component_by_moments(std::span<const double> x,
                                                    std::span<const double> y);

/// Maximum likelihood, from the moments on. The likelihood of a response is
/// the integral of N(y; intercept + slope x exp(eta), additive_sd)
/// N(eta; 0, proportional_sd) over eta, by the trapezium rule about its mode;
/// first and second derivatives come from the same points (the means and the
/// covariance of the derivatives for known eta; Louis 1982).
///
/// @return not applicable: as the moments; or no peak of the likelihood
///         ("not-converged", "no-maximum").
///
/// Source: D. M. Rocke and S. Lorenzato, Technometrics 37 (1995) 176;
/// T. A. Louis, J. R. Stat. Soc. B 44 (1982) 226, from memory.
Outcome<TwoComponentModel> fit_two_component(std::span<const double> x,
                                             std::span<const double> y);

}  // namespace loqsmith
