#pragma once

#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"

namespace loqsmith {

/// The low spikes of one level.
///
/// Their spread is taken of the concentrations in the sample, where the amount
/// was added, and divided back to the vial by the mean factor of dilution and
/// preparation: spikes that were prepared a little differently stay one level.
struct SpikeLevel {
  double nominal = 0.0;             ///< in the vial at the mean factor
  double mean_factor = 1.0;         ///< sample over vial
  std::vector<SpikeResult> spikes;  ///< in run order, at least 1
  std::vector<double> found;        ///< in the vial at the mean factor, signed

  std::size_t n() const { return found.size(); }
};

/// The low spikes by their amount in the sample, ascending. Spikes without any
/// of the analyte are none of its spikes.
std::vector<SpikeLevel> spike_levels(const std::vector<SpikeResult>& spikes);

/// A level with its moments.
struct SpikeSample {
  SpikeLevel level;  ///< at least 3 spikes, not all equal
  double mean = 0.0;
  double sd = 0.0;  ///< n - 1 degrees of freedom

  double degrees_of_freedom() const {
    return static_cast<double>(level.n()) - 1.0;
  }
};

/// The level to rest a limit on: the lowest one with at least `wanted` spikes,
/// otherwise the one with most spikes (the lower of two).
/// @return not applicable: no level with 3 spikes ("few-spikes"), all found
///         the same ("spikes-all-equal").
Outcome<SpikeSample> usable_spikes(const LimitEvidence& evidence,
                                   std::size_t wanted);

/// few-spikes: below the number that the procedure asks for (not valid).
void judge_spike_number(LimitEstimate& estimate, const SpikeSample& sample,
                        std::size_t wanted);

/// spike-level: nominal amount over the detection limit outside low..high
/// (caution); below 1 not valid.
void judge_spike_level(LimitEstimate& estimate, double nominal, double low,
                       double high);

/// spike-not-seen: some spike without a peak in the window, or found at or
/// below zero; the amount is too small to study the spread of a peak (not
/// valid).
void judge_spikes_seen(LimitEstimate& estimate, const SpikeLevel& level);

/// own-bounds: spikes over their found feet where they have a peak, over the
/// template where they have none (caution).
void judge_spike_bounds(LimitEstimate& estimate, const LimitEvidence& evidence);

}  // namespace loqsmith
