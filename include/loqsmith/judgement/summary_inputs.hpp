#pragma once

#include <span>
#include <vector>

#include "loqsmith/judgement/group_summaries.hpp"
#include "loqsmith/judgement/reportable_result.hpp"

namespace loqsmith {

/// What goes into the summaries of groups: one value for each sample and each
/// group that its injections name, from its reportable result.
///
/// A result counts as it is printed: a number with its full precision, also an
/// estimated one (it was measured, if with less precision); below the limit
/// that its text names, unrounded, also an estimated one where the method
/// prints "< LOQ"; above the end of the range. A withheld one has no value.
std::vector<SummaryInput> summary_inputs(std::span<const ReportableRow> rows);

}  // namespace loqsmith
