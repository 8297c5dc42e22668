#include "loqsmith/limits/limit_of_blank.hpp"

#include <algorithm>
#include <cmath>

#include "loqsmith/limits/words.hpp"
#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/numerics/normal.hpp"

namespace loqsmith {

double corrected_normal_factor(double p, double degrees_of_freedom) {
  return normal_quantile(p) / (1.0 - 1.0 / (4.0 * degrees_of_freedom));
}

double limit_of_blank(std::span<const double> blanks, std::size_t samples,
                      double alpha) {
  const double df = static_cast<double>(blanks.size() - samples);
  return mean(blanks) +
         corrected_normal_factor(1.0 - alpha, df) * standard_deviation(blanks);
}

Outcome<double> limit_of_blank_by_rank(std::vector<double> blanks,
                                       double alpha) {
  const double n = static_cast<double>(blanks.size());
  const double rank = 0.5 + (1.0 - alpha) * n;
  if (!(rank <= n))
    return NotApplicable{"few-blanks-for-ranks: the limit of blank has rank " +
                         figure(rank) + " of " +
                         counted(blanks.size(), "blank")};
  std::sort(blanks.begin(), blanks.end());
  // Rank 1 is the first; half a rank lies between two.
  const double place = std::max(rank - 1.0, 0.0);
  const auto below = static_cast<std::size_t>(place);
  const std::size_t above = std::min(below + 1, blanks.size() - 1);
  const double share = place - std::floor(place);
  return (1.0 - share) * blanks[below] + share * blanks[above];
}

PooledSpread pooled_spread(const std::vector<std::vector<double>>& samples) {
  PooledSpread pooled;
  double squares = 0.0;
  for (const std::vector<double>& sample : samples) {
    if (sample.size() < 2) continue;
    const double sd = standard_deviation(sample);
    squares += static_cast<double>(sample.size() - 1) * sd * sd;
    pooled.results += sample.size();
    ++pooled.samples;
  }
  if (pooled.samples > 0)
    pooled.sd =
        std::sqrt(squares / static_cast<double>(pooled.degrees_of_freedom()));
  return pooled;
}

double limit_of_detection(double limit_of_blank, const PooledSpread& low,
                          double beta) {
  const double df = static_cast<double>(low.degrees_of_freedom());
  return limit_of_blank + corrected_normal_factor(1.0 - beta, df) * low.sd;
}

}  // namespace loqsmith
