#include "loqsmith/numerics/mean.hpp"

#include <algorithm>
#include <cmath>

namespace loqsmith {

// What the addition of two numbers loses does not depend on which is larger, if
// it is taken from both (Knuth's six operations): no branch.
double compensated_sum(std::span<const double> values) {
  double sum = 0.0;
  double lost = 0.0;
  for (const double value : values) {
    const double next = sum + value;
    const double gained = next - sum;
    lost += (sum - (next - gained)) + (value - gained);
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

}  // namespace loqsmith
