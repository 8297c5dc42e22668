#pragma once

#include <cstddef>
#include <functional>
#include <optional>
#include <string>
#include <string_view>

#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/numerics/random.hpp"

namespace loqsmith {

/// Mean and standard deviation of a normal population.
struct NormalPopulation {
  double mean = 0.0;
  double sd = 0.0;
};

/// One population from which a sample of n values with this mean and standard
/// deviation may have come:
///
///     sigma = s sqrt((n - 1) / chi2_{n-1}),  mu = mean - z sigma / sqrt(n)
///
/// Source: S. Weerahandi, J. Am. Stat. Assoc. 88 (1993) 899, generalised
/// pivotal quantities; from memory.
///
/// @param n  at least 2
NormalPopulation drawn_population(RandomStream& random, double mean, double sd,
                                  std::size_t n);

/// s sqrt(nu / chi2_nu), nu at least 1.
double drawn_spread(RandomStream& random, double sd,
                    std::size_t degrees_of_freedom);

/// Fills the bounds of the detection limit alone, from limits that may be the
/// true one (nothing: it does not exist in that draw); see
/// set_bootstrap_bounds().
void set_detection_bounds(
    LimitEstimate& estimate, std::string_view stream,
    const std::function<std::optional<double>(RandomStream&)>& true_limit,
    const std::string& coverage = "");

}  // namespace loqsmith
