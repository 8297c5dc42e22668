#pragma once

#include <span>
#include <vector>

namespace loqsmith {

/// In which order the windows are clipped: from the widest down, or from the
/// narrowest up as first published.
enum class SnipOrder { Decreasing, Increasing };

/// Peaks clipped off: for each p of 1 ... m every point takes the lower of
/// itself and the chord from p steps before it to p steps after it,
///
///     v[i] <- min(v[i], (v[i-p] + v[i+p]) / 2)
///
/// all from the values before that p. Points within p steps of either end stay.
///
/// On uneven times a step is the middle distance h between points: the chord
/// runs from the last point at least p h before to the first point at least p h
/// after, and is taken at the point's own time. On even times these are the
/// published points and their mean; a straight line in time stays as it is on
/// any.
///
/// @param minutes  strictly increasing
/// @param m        widest window to either side, in steps, at least 1
///
/// Source: C. G. Ryan et al., Nucl. Instrum. Methods B 34 (1988) 396
/// (increasing); M. Morhac et al., Nucl. Instrum. Methods A 401 (1997) 113
/// (decreasing); from memory.
std::vector<double> snip_baseline(std::span<const double> minutes,
                                  std::span<const double> signal, int m,
                                  SnipOrder order = SnipOrder::Decreasing);

/// The same on v = ln(ln(sqrt(y + 1) + 1) + 1), for counts whose peaks span
/// many decades: low peaks are then clipped like high ones. It is neither
/// linear nor free of the offset, so no response that a calibration or a limit
/// rests on may be made with it.
///
/// @param signal  at least 0
std::vector<double> snip_baseline_of_counts(std::span<const double> minutes,
                                            std::span<const double> signal,
                                            int m);

}  // namespace loqsmith
