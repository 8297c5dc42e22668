#pragma once

#include <vector>

#include "loqsmith/judgement/measured_analyte.hpp"
#include "loqsmith/judgement/rows.hpp"

namespace loqsmith {

/// What is checked of every analyte without being asked for: `trace-missing`
/// (no chromatogram, or more than one, fits the method's trace) and
/// `saturation` (a flat top). One row for each finding, one passing row for
/// each check that found nothing.
std::vector<CheckRow> check_traces(const MeasuredAnalyte& analyte);

}  // namespace loqsmith
