#pragma once

#include <cstddef>

namespace loqsmith {

/// Largest relative standard deviation, percent, of n injections of a reference
/// solution for the assay of a substance whose content may reach 100 % + B:
///
///     K B sqrt(n) / t_{0.95, n-1},   K = 0.6 / sqrt(2) x t_{0.95, 5} / sqrt(6)
///
/// K is 0.349: 0.6 % is allowed of six injections where B is 1.0 %.
///
/// Source: European Pharmacopoeia 2.2.46 and USP <621>, system repeatability;
/// from memory.
///
/// @param excess_percent  B, upper limit of the content minus 100 %, > 0
/// @param n               injections, at least 2 (the table has 3 to 6)
double largest_repeatability(double excess_percent, std::size_t n);

/// How many injections a largest relative standard deviation is stated for: 5
/// up to 2.0 %, otherwise 6.
///
/// Source: USP <621>, system repeatability; from memory.
std::size_t injections_for_repeatability(double rsd_percent);

/// What n injections may show where `rsd_percent` is stated for the full
/// number: fewer ones are allowed less, in the proportion of the formula above;
/// more are allowed the same.
///
/// @param n  at least 2
double repeatability_of(double rsd_percent, std::size_t n);

}  // namespace loqsmith
