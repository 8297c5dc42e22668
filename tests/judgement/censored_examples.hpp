#pragma once

#include <vector>

#include "loqsmith/judgement/censored_value.hpp"

namespace loqsmith::test {

inline CensoredValue measured(double value) {
  return {value, Censoring::Measured};
}
inline CensoredValue below(double limit) { return {limit, Censoring::Below}; }
inline CensoredValue above(double end) { return {end, Censoring::Above}; }

/// Arsenic in a stream of Oahu, ug/L, three limits of detection: D. R. Helsel,
/// Statistics for Censored Environmental Data, 2nd edition (2012); from memory.
inline std::vector<CensoredValue> arsenic() {
  return {below(1),      below(1),      measured(1.7), below(1),
          below(1),      below(2),      measured(3.2), below(2),
          below(2),      measured(2.8), below(2),      below(2),
          below(2),      below(2),      below(2),      measured(0.7),
          below(0.9),    measured(0.5), measured(0.5), measured(0.9),
          measured(0.5), measured(0.7), measured(0.6), measured(1.5)};
}

/// Invented; results below several limits and above two ends of the range.
inline std::vector<CensoredValue> both_sides() {
  return {below(0.2),    measured(0.2),  measured(0.31), below(0.5),
          below(0.5),    measured(0.62), measured(0.8),  measured(1.1),
          measured(1.1), measured(1.9),  measured(2.7),  measured(3.4),
          above(5.0),    measured(5.0),  measured(7.5),  above(10.0)};
}

}  // namespace loqsmith::test
