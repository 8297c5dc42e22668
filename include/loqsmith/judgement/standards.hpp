#pragma once

#include <vector>

#include "loqsmith/calibration/calibration.hpp"
#include "loqsmith/judgement/measured_analyte.hpp"
#include "loqsmith/judgement/rows.hpp"

namespace loqsmith {

struct OfferedStandards {
  std::vector<StandardPoint> points;  ///< in run order
  std::vector<UnmeasuredStandard> unmeasured;
};

/// The standards of one analyte as they are offered to the fit. A standard
/// whose level does not contain the analyte is not one of its standards.
///
/// Not used in the fit, with the reason as first word of the note:
/// - "excluded-by-amendment": people left it out;
/// - "saturated", "internal-standard-saturated": the response is too small;
/// - "peak-not-found" above concentration zero: what nobody can see in a
///   standard must not count as the lowest level, for the quantitation limit
///   may rest on it. A standard of concentration zero needs no peak; its
///   signed response counts.
OfferedStandards offer_standards(const MeasuredAnalyte& analyte);

/// One injection of known amount (its `nominal` is there), by the same rules:
/// as a point, or among the unmeasured ones.
void offer_standard(OfferedStandards& offered, const InjectionResponse& one);

}  // namespace loqsmith
