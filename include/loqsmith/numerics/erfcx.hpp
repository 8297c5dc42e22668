#pragma once

namespace loqsmith {

/// Scaled complementary error function:
///
///     erfcx(z) = exp(z^2) erfc(z)
///
/// which falls like 1 / (z sqrt(pi)) where erfc itself is long below the
/// smallest double. Relative error below 1e-14.
///
/// Above 25 the asymptotic series (Abramowitz and Stegun, 1964, formula
/// 7.1.23; from memory), below it the product, whose exponential is taken of
/// z^2 to twice the digits of a double.
///
/// @param z  -26 or more (below, the value leaves the range of a double)
double erfcx(double z);

}  // namespace loqsmith
