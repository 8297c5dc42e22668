#include "loqsmith/limits/drawn_truth.hpp"

#include <cmath>

#include "loqsmith/limits/bootstrap_ratio_bounds.hpp"

namespace loqsmith {

double drawn_spread(RandomStream& random, double sd,
                    std::size_t degrees_of_freedom) {
  const double chi_square =
      drawn_chi_square(random, static_cast<int>(degrees_of_freedom));
  return sd * std::sqrt(static_cast<double>(degrees_of_freedom) / chi_square);
}

NormalPopulation drawn_population(RandomStream& random, double mean, double sd,
                                  std::size_t n) {
  NormalPopulation truth;
  truth.sd = drawn_spread(random, sd, n - 1);
  truth.mean =
      mean - random.normal() * truth.sd / std::sqrt(static_cast<double>(n));
  return truth;
}

void set_detection_bounds(
    LimitEstimate& estimate, std::string_view stream,
    const std::function<std::optional<double>(RandomStream&)>& true_limit,
    const std::string& coverage) {
  if (!estimate.detection) return;
  const double limit = *estimate.detection;
  // The quantitation limit has bounds of its own kind.
  const std::optional<double> quantitation = estimate.quantitation;
  estimate.quantitation.reset();
  set_bootstrap_bounds(
      estimate, stream,
      [&](RandomStream& random) {
        const std::optional<double> truth = true_limit(random);
        DrawnRatios ratios;
        if (truth && *truth > 0.0) ratios.detection = limit / *truth;
        return ratios;
      },
      coverage);
  estimate.quantitation = quantitation;
}

}  // namespace loqsmith
