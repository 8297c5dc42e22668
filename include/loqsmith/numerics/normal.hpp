#pragma once

namespace loqsmith {

/// Density of the standard normal distribution.
double normal_density(double z);

/// Probability of a standard normal value at or below z; full relative
/// precision in the lower tail.
double normal_cdf(double z);

/// The z below which a standard normal value lies with probability p.
///
/// Start: Abramowitz and Stegun (1964), formula 26.2.23 (error below 4.5e-4;
/// from memory), then Halley steps on the distribution function itself, each
/// of which triples the digits.
///
/// @param p  above 0 and below 1
double normal_quantile(double p);

}  // namespace loqsmith
