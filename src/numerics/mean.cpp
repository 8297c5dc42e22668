#include "loqsmith/numerics/mean.hpp"

#include <algorithm>
#include <cmath>
#include <vector>

namespace loqsmith {

double compensated_sum(std::span<const double> values) {
  double sum = 0.0;
  double lost = 0.0;
  for (const double value : values) {
    const double next = sum + value;
    lost += std::abs(sum) >= std::abs(value) ? (sum - next) + value
                                             : (value - next) + sum;
    sum = next;
  }
  return sum + lost;
}

double mean(std::span<const double> values) {
  const double n = static_cast<double>(values.size());
  const double first = compensated_sum(values) / n;
  double residual = 0.0;
  for (const double value : values) residual += value - first;
  return first + residual / n;
}

double standard_deviation(std::span<const double> values) {
  const double n = static_cast<double>(values.size());
  const double center = mean(values);
  double squares = 0.0;
  double residual = 0.0;
  for (const double value : values) {
    const double difference = value - center;
    squares += difference * difference;
    residual += difference;
  }
  // What is left of the residuals' sum is the rounding of the mean.
  const double corrected = squares - residual * residual / n;
  return std::sqrt(std::max(corrected, 0.0) / (n - 1.0));
}

double median(std::span<const double> values) {
  std::vector<double> parted(values.begin(), values.end());
  const auto middle =
      parted.begin() + static_cast<std::ptrdiff_t>(parted.size() / 2);
  std::nth_element(parted.begin(), middle, parted.end());
  if (parted.size() % 2 == 1) return *middle;
  const double below = *std::max_element(parted.begin(), middle);
  return below + 0.5 * (*middle - below);
}

double robust_deviation(std::span<const double> values) {
  const double center = median(values);
  std::vector<double> distances;
  distances.reserve(values.size());
  for (const double value : values) {
    distances.push_back(std::abs(value - center));
  }
  return kDeviationPerMedianDeviation * median(distances);
}

}  // namespace loqsmith
