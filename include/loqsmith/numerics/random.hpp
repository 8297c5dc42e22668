#pragma once

#include <cstdint>
#include <random>
#include <string_view>

namespace loqsmith {

/// A stream of pseudo-random numbers, the same on every machine: the 64-bit
/// Mersenne twister, whose output the C++ standard fixes, with conversions of
/// our own, because the standard's distributions differ between libraries.
class RandomStream {
 public:
  /// The seed is made from a name (FNV-1a, 64 bits): "blanks, run 3".
  explicit RandomStream(std::string_view name);

  /// Above 0 and below 1, in steps of 2^-52, never either end.
  double uniform();

  /// Standard normal, by inversion of uniform().
  double normal();

 private:
  std::mt19937_64 engine_;
};

/// FNV-1a hash of a text; 64 bits.
std::uint64_t seed_from_text(std::string_view text);

}  // namespace loqsmith
