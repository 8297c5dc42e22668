#pragma once

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/chromatogram/trace.hpp"
#include "loqsmith/signal/learn.hpp"
#include "loqsmith/signal/noise.hpp"
#include "loqsmith/signal/noise_model.hpp"
#include "loqsmith/signal/settings.hpp"

namespace loqsmith {

/// The part of the trace that one target needs: its window of times, the feet,
/// and neighbours beside them.
Trace surroundings(const Trace& trace, const TargetSettings& target,
                   const WindowTemplate& window, double expected);

/// The noise as it was measured, but never less than this very trace shows
/// from point to point: a sample may be noisier than the blank.
NoiseModel noise_of_this_trace(const Trace& near,
                               const Outcome<NoiseEstimate>& noise);

/// The whole trace's noise tells the colour better than a stretch around the
/// peak; how large it is here, the trace at hand says.
NoiseModel colour_of_noise(const Outcome<NoiseEstimate>& noise,
                           const NoiseModel& here);

}  // namespace loqsmith
