#include "loqsmith/signal/autocovariance.hpp"

namespace loqsmith {

// Four sums side by side: one alone waits for its own last addition.
double autocovariance(const Residuals& residuals, std::size_t lag) {
  constexpr std::size_t kLanes = 4;
  const std::vector<double>& r = residuals.values;
  const std::vector<unsigned char>& used = residuals.used;
  const std::size_t n = r.size() > lag ? r.size() - lag : 0;
  double sums[kLanes] = {};
  std::size_t pairs = 0;
  std::size_t i = 0;
  for (; i + kLanes <= n; i += kLanes) {
    for (std::size_t k = 0; k < kLanes; ++k) {
      sums[k] += r[i + k] * r[i + k + lag];
    }
  }
  for (; i < n; ++i) sums[0] += r[i] * r[i + lag];
  for (i = 0; i < n; ++i) pairs += std::size_t{used[i]} * used[i + lag];
  const double sum = (sums[0] + sums[1]) + (sums[2] + sums[3]);
  return pairs > 0 ? sum / static_cast<double>(pairs) : 0.0;
}

}  // namespace loqsmith
