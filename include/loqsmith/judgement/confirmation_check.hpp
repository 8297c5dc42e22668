#pragma once

#include <cstddef>

#include "loqsmith/judgement/established_limit_check.hpp"
#include "loqsmith/judgement/rows.hpp"
#include "loqsmith/judgement/settings.hpp"

namespace loqsmith {

/// Half width of the interval in which one more result is expected at 99 %,
/// over the standard deviation of n results:
///
///     t_{0.995, n-1} sqrt(1 + 1/n)
///
/// 3.963 for 7 results.
///
/// Source: US EPA 815-R-05-006 (2004); S. D. Winslow et al., Environ. Sci.
/// Technol. 40 (2006) 281; from memory.
///
/// @param n  at least 2
double half_range_factor(std::size_t n);

/// mean +- factor x standard deviation.
struct PredictionInterval {
  double lower = 0.0;
  double upper = 0.0;
};
PredictionInterval half_range_interval(double mean, double sd, double factor);

/// Whether the quantitation limit stands up to spikes: precision, recovery and
/// the prediction interval of one more result, all in percent of what was
/// added; ends included.
///
/// What counts: the low spikes of the level nearest to the governing
/// quantitation limit in the vial (by ratio, the lower of two), if that is
/// within a factor of two of it and has at least 4 spikes; levels with fewer do
/// not count. All of them count, seen or not, signed.
///
/// Where there is nothing to judge one row says why. Where the method does not
/// ask, the result is empty.
///
/// Source: precision and recovery as ICH Q2(R2) (2023) asks to confirm a
/// quantitation limit; the interval as half_range_factor(); from memory.
LimitCheck check_confirmation(const AnalyteRules& settings,
                              const CalibrationSet& set);

}  // namespace loqsmith
