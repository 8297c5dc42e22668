#pragma once

#include <string>
#include <vector>

#include "loqsmith/calibration/calibration.hpp"
#include "loqsmith/judgement/measured_analyte.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/governing.hpp"

namespace loqsmith {

/// What one calibration set knows of its low end.
struct SetEvidence {
  LimitEvidence evidence;
  /// What it took from other sets: "blanks-of-all-sets", "spikes-of-all-sets".
  std::vector<std::string> notes;
};

/// Evidence for the limits of one set among several.
///
/// - Blanks of a kind are those that the set judges, where at least
///   `minimum_blanks` of them count; otherwise all blanks of that kind in the
///   night: blanks seldom stand in every part of it, and what they show is the
///   scatter near zero, to which the set's own slope is applied.
/// - Low spikes likewise, at least 7 or all. They are concentrations, each
///   found by the curve of its own set.
/// - Heights, noise near the lowest standard and the curve are the set's own.
///
/// @param night    all injections of the analyte
/// @param members  those of the set
/// @param spikes   low spikes of all sets, in run order
SetEvidence evidence_of_set(const MeasuredAnalyte& night,
                            const MeasuredAnalyte& members,
                            const Calibration& calibration,
                            const std::vector<SpikeResult>& spikes);

/// Adds what was taken from other sets to the notes of the governing limits.
void add_notes(LimitsOfAnalyte& limits, const std::vector<std::string>& notes);

}  // namespace loqsmith
