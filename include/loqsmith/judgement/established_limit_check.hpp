#pragma once

#include <cstddef>
#include <string>
#include <vector>

#include "loqsmith/judgement/rows.hpp"
#include "loqsmith/judgement/settings.hpp"

namespace loqsmith {

/// What a check of the limits found in one calibration set.
struct LimitCheck {
  bool failed = false;
  std::vector<CheckRow> rows;
};

/// Holds tonight's limits by one procedure against the established ones:
/// tonight's over established within the ratio, ends included. One row for the
/// detection and one for the quantitation limit, where the procedure gives
/// them.
///
/// With `spike-replicates` a further row: less than 3 % of its blanks above the
/// established detection limit; not checked below 34 blanks, of which a single
/// one would decide.
///
/// Where nothing can be compared (no calibration, nothing established, no
/// estimate, one graded not valid) one row says why. Where the method does not
/// ask, the result is empty.
///
/// Source of ratio and share: US EPA 40 CFR 136 Appendix B, Revision 2 (2016),
/// II 4, where both are to hold over the blanks and spikes of two years; from
/// memory.
LimitCheck check_established_limit(const AnalyteRules& settings,
                                   const CalibrationSet& set);

/// Less than 3 of 100; no blanks at all: false.
bool few_blanks_above(std::size_t above, std::size_t blanks);

}  // namespace loqsmith
