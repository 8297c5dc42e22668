#pragma once

#include <string>
#include <vector>

#include "loqsmith/judgement/measured_analyte.hpp"

namespace loqsmith {

/// The injections that one calibration set stands for.
struct SetMembers {
  /// "1", "2" in run order; a bracket "1+2" after the two blocks it joins.
  std::string name;
  /// Its standards and every other injection that is judged by it.
  MeasuredAnalyte analyte;
  /// Bracketing: the standards after the samples; empty where none follow.
  std::vector<int> closing;
  /// Bracketing: first and last injection of its standards.
  int opens = 0;
  int closes = 0;
};

/// Whether an injection of this role ends a block of standards: those whose
/// result is what the night is run for or stands for it (samples, duplicates,
/// fortified ones, controls, low spikes, added standards). Blanks,
/// conditioning, check standards and second sources between standards do not.
bool ends_a_block(Role role);

/// Divides the injections of an analyte among calibration sets, as `sets` of
/// its calibration says.
///
/// A *block* is a run of standards whose levels contain the analyte, between
/// which no injection ends the block. Standards of concentration zero make no
/// block of their own: without one above zero beside them they belong to the
/// block before (the first block where there is none).
///
/// - one: all standards and all injections make the set "1".
/// - latest: each block is a set. An injection is judged by the latest block
///   that began before it; what comes before the first block by the first.
/// - bracketing: each block with the next one is a set, so that a block inside
///   the night belongs to two. An injection is judged by the bracket whose
///   first block is the latest that began before it; what comes before the
///   first block by the first bracket, what comes after the last by the last.
///   A night with one block has the set "1", which closes nothing.
///
/// Always at least one set; each injection other than a standard is in exactly
/// one.
std::vector<SetMembers> divide_into_sets(const MeasuredAnalyte& night);

}  // namespace loqsmith
