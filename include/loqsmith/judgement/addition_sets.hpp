#pragma once

#include <string>
#include <vector>

#include "loqsmith/judgement/judge_set.hpp"
#include "loqsmith/judgement/measured_analyte.hpp"
#include "loqsmith/judgement/rows.hpp"
#include "loqsmith/limits/evidence.hpp"

namespace loqsmith {

/// One sample that is determined by standard addition.
struct AdditionMembers {
  std::string name;  ///< of the set: "addition:SAMPLE"
  /// Injections of the sample itself (amount 0 added: `nominal` is 0) and of
  /// its portions with additions, in run order.
  MeasuredAnalyte analyte;
};

/// The standard additions of a night, in the order of their first injection.
///
/// An injection of role added-standard whose level contains the analyte belongs
/// to the sample named as its parent. One whose level does not contain it is
/// no point of this analyte's lines, and a sample without any other is judged
/// by the standards as all are. Added amounts are vial concentrations, so that
/// a line holds only injections of one and the same factor from vial to sample:
/// injections of the sample at another dilution are judged by the standards;
/// additions at another dilution make a line of their own ("addition:SAMPLE
/// x10"), which lacks the sample's own response where nobody injected it.
std::vector<AdditionMembers> find_additions(const MeasuredAnalyte& night);

/// The line through a sample and its additions, and the amount it gives. A
/// point is left out for the same reasons as a standard. All levels count as
/// accepted: the deviation from an added amount says little of the amount
/// found, which lies outside them.
/// @param refused  why there can be none; empty: there may be one
CalibrationSet calibrate_addition(const AdditionMembers& members,
                                  const std::string& refused);

/// What is known of the low end for limits of such a sample. Its concentrations
/// are totals: what was added and what was found in the sample, so that the
/// line goes through zero.
///
/// - Blanks, with their predicted noise and bias, are those of the night, to
///   which this line's slope is applied: what the sample's matrix does to the
///   sensitivity it does to its limits.
/// - Low spikes are those of the night, found by the standards' curves: they
///   are concentrations already and rest on no slope of this line.
/// - Points, heights and noise are the line's own.
/// - The floor of the quantitation limit is the lowest amount added.
LimitEvidence addition_evidence(const MeasuredAnalyte& night,
                                const AdditionMembers& members,
                                const CalibrationSet& set,
                                const std::vector<SpikeResult>& spikes);

/// What holds for the results of a standard addition. Of the method's
/// `calibration` acceptance only minimum-r2 is applied: the other criteria
/// are about levels of standards. Check standards and brackets speak of the
/// standards' curves, not of this line.
SetVerdict check_addition(const AdditionMembers& members,
                          const CalibrationSet& set);

}  // namespace loqsmith
