#pragma once

#include <span>

#include "loqsmith/signal/noise_model.hpp"
#include "loqsmith/signal/place_window.hpp"
#include "loqsmith/signal/summits.hpp"

namespace loqsmith {

/// The smallest change between successive points: the digit of the converter,
/// or as good as nothing for a signal that is not digitised; zero for a
/// constant one.
double smallest_step(std::span<const double> signal);

/// Standard deviation of a height (a difference of two signals) that rounding
/// to the smallest step leaves, step over the square root of 6: what stands for
/// the noise of a signal that shows none.
double rounding_noise(std::span<const double> signal);

/// True where points are missing between the first and the last point of the
/// baseline: a step of more than 3 typical ones.
bool has_gap(const SmoothedStretch& stretch, const PlacedWindow& window);

/// True where the smoothed signal falls below the baseline between the feet by
/// `multiple` standard deviations of that depth, and by more than 5 % of the
/// height (a straight baseline below a tall peak is not that good).
///
/// @param height  of the peak above the baseline, signed
bool has_negative_peak(const SmoothedStretch& stretch,
                       const PlacedWindow& window, const NoiseModel& noise,
                       double multiple, double height);

/// True where every point of the stretch has the same signal.
bool is_flat(std::span<const double> signal);

/// True where the stretch holds all times from one to another, up to a typical
/// step at either end.
bool covers(const SmoothedStretch& stretch, double from_minutes,
            double to_minutes);

}  // namespace loqsmith
