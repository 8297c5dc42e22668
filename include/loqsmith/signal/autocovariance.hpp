#pragma once

#include <cstddef>
#include <vector>

namespace loqsmith {

/// Residuals of successive points about their baseline, and which of them
/// count; those of points that do not count are zero.
struct Residuals {
  std::vector<double> values;
  std::vector<unsigned char> used;  ///< 1 or 0
  std::size_t count = 0;            ///< of those used
};

/// Mean product of used residuals `lag` points apart; zero where there is no
/// such pair.
double autocovariance(const Residuals& residuals, std::size_t lag);

}  // namespace loqsmith
