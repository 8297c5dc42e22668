#include "loqsmith/signal/typical_noise.hpp"

#include "loqsmith/numerics/mean.hpp"

namespace loqsmith {

NoiseModel typical_noise(const std::vector<NoiseModel>& models) {
  std::vector<double> variances;
  std::vector<double> shares;
  std::vector<double> correlations;
  for (const NoiseModel& model : models) {
    if (!(model.variance() > 0.0)) continue;
    variances.push_back(model.variance());
    shares.push_back(model.creeping_variance / model.variance());
    if (model.creeping_variance > 0.0) {
      correlations.push_back(model.correlation);
    }
  }
  if (variances.empty()) return {};
  const double variance = median(variances);
  const double share = correlations.empty() ? 0.0 : median(shares);
  if (!(share > 0.0)) return {variance, 0.0, 0.0};
  return {(1.0 - share) * variance, share * variance, median(correlations)};
}

}  // namespace loqsmith
