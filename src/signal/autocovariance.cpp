#include "loqsmith/signal/autocovariance.hpp"

#include <cstdint>
#include <cstring>

namespace loqsmith {
namespace {

std::uint64_t eight_bytes(const unsigned char* from) {
  std::uint64_t word = 0;
  std::memcpy(&word, from, sizeof word);
  return word;
}

// How many of the first n pairs `lag` apart are used on both sides, eight at a
// time: the product gathers eight ones and zeros in its highest byte.
std::size_t pairs_used(const std::vector<unsigned char>& used, std::size_t lag,
                       std::size_t n) {
  constexpr std::uint64_t kOnes = 0x0101010101010101u;
  std::size_t pairs = 0;
  std::size_t i = 0;
  for (; i + 8 <= n; i += 8) {
    const std::uint64_t both =
        eight_bytes(&used[i]) & eight_bytes(&used[i + lag]);
    pairs += (both * kOnes) >> 56;
  }
  for (; i < n; ++i) pairs += std::size_t{used[i]} * used[i + lag];
  return pairs;
}

}  // namespace

// Four sums side by side: one alone waits for its own last addition.
double autocovariance(const Residuals& residuals, std::size_t lag) {
  constexpr std::size_t kLanes = 4;
  const std::vector<double>& r = residuals.values;
  const std::size_t n = r.size() > lag ? r.size() - lag : 0;
  double sums[kLanes] = {};
  std::size_t i = 0;
  for (; i + kLanes <= n; i += kLanes) {
    for (std::size_t k = 0; k < kLanes; ++k) {
      sums[k] += r[i + k] * r[i + k + lag];
    }
  }
  for (; i < n; ++i) sums[0] += r[i] * r[i + lag];
  const std::size_t pairs = pairs_used(residuals.used, lag, n);
  const double sum = (sums[0] + sums[1]) + (sums[2] + sums[3]);
  return pairs > 0 ? sum / static_cast<double>(pairs) : 0.0;
}

}  // namespace loqsmith
