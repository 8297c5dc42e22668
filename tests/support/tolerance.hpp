#pragma once

#include <gtest/gtest.h>

#include <cstddef>

namespace loqsmith::test {

// The only four ways in which a test compares numbers. NaN fails them all;
// failures print decimal and hexadecimal.

/// The same 64 bits (so 0.0 and -0.0 differ).
testing::AssertionResult same_bits(double found, double wanted);

/// Equal when both are rounded to `digits` significant digits of `wanted`:
/// |found - wanted| <= 0.5 units of that digit. For published figures.
testing::AssertionResult agrees_to_digits(double found, double wanted,
                                          int digits);

/// Within `condition` times the machine epsilon, relative to `wanted` (to
/// `scale` where given): for answers exact by construction.
testing::AssertionResult within_condition(double found, double wanted,
                                          double condition, double scale = 0.0);

/// The mean of n values of standard deviation `sd` lies within `z` (3) standard
/// errors of `wanted`: for simulations with a fixed seed.
testing::AssertionResult within_sampling_error(double mean, double sd,
                                               std::size_t n, double wanted,
                                               double z = 3.0);

}  // namespace loqsmith::test
