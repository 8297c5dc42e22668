#pragma once

#include <span>

namespace loqsmith {

// Sums are taken in the order given, so that the same values give the same
// bits. All functions want finite values.

/// Sum with a running compensation of what rounding loses.
///
/// Source: A. Neumaier, Z. Angew. Math. Mech. 54 (1974) 39; from memory.
double compensated_sum(std::span<const double> values);

/// Arithmetic mean, corrected by the mean of the residuals. At least 1 value.
double mean(std::span<const double> values);

/// Standard deviation with n - 1 degrees of freedom, in two passes: the mean
/// first, then squares of differences, less what rounding of the mean adds.
/// At least 2 values.
double standard_deviation(std::span<const double> values);

/// Middle value; mean of the two middle ones where n is even. At least 1 value.
double median(std::span<const double> values);

/// Standard deviation of a normal sample from the median of the absolute
/// deviations from the median: 1.4826 times it (1 over the upper quartile of
/// the standard normal). Not moved by up to half of the values. At least 1
/// value; zero where more than half are equal.
double robust_deviation(std::span<const double> values);

/// 1 / 0.6744897501960817: from a median absolute deviation to a standard
/// deviation of normal values.
inline constexpr double kDeviationPerMedianDeviation = 1.482602218505602;

}  // namespace loqsmith
