#pragma once

namespace loqsmith {

/// Relative difference of two results, percent of their mean:
///
///     200 |a - b| / (a + b)
///
/// @param a, b  both > 0, in the same unit
///
/// Source: US EPA SW-846 method 8000D, relative percent difference; from
/// memory.
double relative_difference_percent(double a, double b);

}  // namespace loqsmith
