#pragma once

#include <cstdint>
#include <random>
#include <string_view>

namespace loqsmith::test {

/// Normal deviates that are the same on every machine: mt19937_64 (its output
/// is fixed by the C++ standard), seeded from a name, through our own inverse
/// of the normal distribution (std::normal_distribution differs by library).
class RandomStream {
 public:
  explicit RandomStream(std::string_view name);

  double uniform();  ///< within (0, 1), both ends excluded
  double normal();   ///< mean 0, standard deviation 1

 private:
  std::mt19937_64 engine_;
};

/// Quantile of the standard normal distribution for 0 < p < 1, to about 16
/// digits.
///
/// Source: M. J. Wichura, Applied Statistics 37 (1988) 477, algorithm AS 241,
/// routine PPND16; from memory.
double normal_quantile(double p);

}  // namespace loqsmith::test
