#include "loqsmith/signal/autocovariance.hpp"

namespace loqsmith {

double autocovariance(const Residuals& residuals, std::size_t lag) {
  double sum = 0.0;
  std::size_t pairs = 0;
  for (std::size_t i = 0; i + lag < residuals.values.size(); ++i) {
    if (!residuals.used[i] || !residuals.used[i + lag]) continue;
    sum += residuals.values[i] * residuals.values[i + lag];
    ++pairs;
  }
  return pairs > 0 ? sum / static_cast<double>(pairs) : 0.0;
}

}  // namespace loqsmith
