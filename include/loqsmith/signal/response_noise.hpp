#pragma once

#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/signal/noise.hpp"

namespace loqsmith {

/// Standard deviation, at zero amount and without replicates, of a response
/// that is a weighted sum of successive points (an area over its window with
/// its baseline, a height, a fitted template):
///
///     sqrt( sum_i sum_j g_i g_j R(|i - j|) )
///
/// with the noise model R of the whole trace that the noise was measured in,
/// raised where the trace at hand is clearly noisier from point to point: more
/// than 1.3 times, which a stretch as short as that around one peak does not
/// show by chance.
///
/// It is the instrument's noise alone: injection, preparation and what the
/// blank contains do not enter.
///
/// @param weights  g, the baseline's points included
/// @param here     noise around the peak in the trace at hand
/// @return not applicable: the reason of the whole trace's model
///         ("noise-trace-short: ...").
///
/// Source: ISO 11843-7:2018, standard deviation of a measured area or height
/// from the noise's covariance; from memory, the sum itself is propagation of
/// variances.
Outcome<double> predict_response_noise(const std::vector<double>& weights,
                                       const NoiseModel& here,
                                       const NoiseEstimate& noise);

}  // namespace loqsmith
