#pragma once

#include <span>

namespace loqsmith {

// Sums are taken in the order given, so that the same values give the same
// bits. All functions want finite values.

/// Sum with a running compensation of what rounding loses.
///
/// Source: A. Neumaier, Z. Angew. Math. Mech. 54 (1974) 39; from memory. What
/// an addition loses: D. E. Knuth, The Art of Computer Programming, vol.
/// 2, 4.2.2; from memory.
double compensated_sum(std::span<const double> values);

/// Arithmetic mean, corrected by the mean of the residuals. At least 1 value.
double mean(std::span<const double> values);

/// Standard deviation with n - 1 degrees of freedom, in two passes: the mean
/// first, then squares of differences, less what rounding of the mean adds.
/// At least 2 values.
double standard_deviation(std::span<const double> values);

/// Middle value; mean of the two middle ones where n is even. At least 1 value.
double median(std::span<const double> values);

/// The same; the values lose their order.
double median_in_place(std::span<double> values);

/// 1 / 0.6744897501960817: from a median absolute deviation to a standard
/// deviation of normal values.
inline constexpr double kDeviationPerMedianDeviation = 1.482602218505602;

}  // namespace loqsmith
