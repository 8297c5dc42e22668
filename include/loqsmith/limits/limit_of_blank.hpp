#pragma once

#include <cstddef>
#include <span>
#include <vector>

#include "loqsmith/base/outcome.hpp"

namespace loqsmith {

/// The factor that takes a standard deviation with few degrees of freedom to a
/// quantile of the normal distribution:
///
///     c_p = z_p / (1 - 1 / (4 nu))
///
/// nu: number of results less number of samples, at least 1.
///
/// Source: CLSI EP17-A2 (2012), classical approach; from memory.
double corrected_normal_factor(double p, double degrees_of_freedom);

/// Limit of blank: mean + c_p s over all blank results, at least 2, p = 1 -
/// alpha, nu = results - samples.
double limit_of_blank(std::span<const double> blanks, std::size_t samples,
                      double alpha);

/// Limit of blank by ranks: the blank result of rank 0.5 + (1 - alpha) n,
/// ascending, between neighbours in proportion.
/// @return not applicable: the rank exceeds n.
Outcome<double> limit_of_blank_by_rank(std::vector<double> blanks,
                                       double alpha);

/// Standard deviation within samples, pooled over those with 2 results or more.
struct PooledSpread {
  double sd = 0.0;
  std::size_t results = 0;
  std::size_t samples = 0;

  std::size_t degrees_of_freedom() const { return results - samples; }
};
PooledSpread pooled_spread(const std::vector<std::vector<double>>& samples);

/// Limit of detection: limit of blank + c_p s within low samples, p = 1 - beta.
/// At least 1 degree of freedom.
double limit_of_detection(double limit_of_blank, const PooledSpread& low,
                          double beta);

}  // namespace loqsmith
