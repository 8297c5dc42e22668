#pragma once

#include <optional>
#include <span>

#include "loqsmith/numerics/maximise_likelihood.hpp"

namespace loqsmith {

/// Likelihood of responses under the two-component model, at parameters
/// (intercept, slope, ln additive_sd, ln proportional_sd).
///
/// @param x  concentrations, zero or above
/// @param y  responses, as many
/// @return nothing where the slope is not above zero or a number overflows.
std::optional<LikelihoodAt> two_component_likelihood(
    std::span<const double> x, std::span<const double> y,
    std::span<const double> parameters);

}  // namespace loqsmith
