#pragma once

#include <optional>

#include "loqsmith/signal/place_window.hpp"
#include "loqsmith/signal/summits.hpp"

namespace loqsmith {

// Definitions of the harmonised pharmacopoeias: Ph. Eur. 2.2.46, USP <621>
// (2022), JP 2.00; from memory. Widths are those of signal minus baseline, by
// linear interpolation between points.

/// Distances from the apex to where the peak has fallen to a fraction of its
/// height.
struct WidthAt {
  double front = 0.0;  ///< minutes, > 0
  double rear = 0.0;   ///< minutes, > 0

  double total() const { return front + rear; }
};

/// The first crossings outwards from the apex. Nothing where the fraction of
/// the height does not reach 3 noise standard deviations, or where a foot (or
/// a neighbour's valley) comes before the crossing.
std::optional<WidthAt> width_at(const SmoothedStretch& stretch,
                                const PlacedWindow& window, double apex,
                                double height, double fraction, double noise);

/// Symmetry factor (tailing): width at 5 % of the height over twice its front
/// part; 1 for a symmetrical peak.
double tailing_factor(const WidthAt& at_5_percent);

/// Asymmetry at 10 % of the height: rear over front.
double asymmetry_factor(const WidthAt& at_10_percent);

/// Apparent number of theoretical plates, 5.54 (t / W)^2 with the width at
/// half height (the factor as the pharmacopoeias round 8 ln 2).
double plate_number(double retention_minutes, double width_half_minutes);

/// Capacity (retention) factor, (t - t0) / t0, with the hold-up time t0 > 0 of
/// a compound that is not retained. Nothing for a peak before it.
///
/// Source: Ph. Eur. 2.2.46, USP <621>: mass distribution ratio; from memory.
std::optional<double> capacity_factor(double retention_minutes,
                                      double hold_up_minutes);

/// Resolution of two peaks, 1.18 (t2 - t1) / (W1 + W2), widths at half height.
double resolution(double first_minutes, double first_width_half,
                  double second_minutes, double second_width_half);

/// How far to either side of an apex a polynomial of order 4 is fitted for its
/// time, in widths at half height. The time scatters as the noise times reach
/// to the power of -1.5, and is off as reach to the power of 4 for a tailing
/// peak: the sum is least where the reach falls as the 5.5th root of the noise.
/// 0.75 at 1 % of noise and above, 0.15 at the least.
///
/// @param noise_share  standard deviation of a point over the height, 0 or more
double apex_reach(double noise_share);

/// The same apex found again with that polynomial, for peaks high enough:
/// strong smoothing shifts the apex of a tailing peak by some hundredths of its
/// width. At least 3.5 points to either side; the apex as given where the
/// polynomial has no maximum within half a width of it.
double sharpened_apex(const SmoothedStretch& stretch, double apex,
                      double width_half_minutes, double noise_share);

}  // namespace loqsmith
