#include "loqsmith/judgement/censored_value.hpp"

#include <algorithm>

namespace loqsmith {

CensoredCounts count_censored(std::span<const CensoredValue> values) {
  CensoredCounts counts;
  for (const CensoredValue& one : values) {
    switch (one.censoring) {
      case Censoring::Measured:
        ++counts.measured;
        break;
      case Censoring::Below:
        ++counts.below;
        break;
      case Censoring::Above:
        ++counts.above;
        break;
    }
  }
  return counts;
}

std::vector<double> measured_values(std::span<const CensoredValue> values) {
  std::vector<double> measured;
  for (const CensoredValue& one : values) {
    if (one.censoring == Censoring::Measured) measured.push_back(one.value);
  }
  std::sort(measured.begin(), measured.end());
  return measured;
}

}  // namespace loqsmith
