#include "loqsmith/judgement/relative_difference.hpp"

#include <cmath>

namespace loqsmith {

double relative_difference_percent(double a, double b) {
  return 200.0 * std::abs(a - b) / (a + b);
}

}  // namespace loqsmith
