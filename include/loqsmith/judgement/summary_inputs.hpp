#pragma once

#include <vector>

#include "loqsmith/chromatogram/sequence.hpp"
#include "loqsmith/judgement/group_summaries.hpp"
#include "loqsmith/judgement/rows.hpp"
#include "loqsmith/judgement/settings.hpp"

namespace loqsmith {

/// What goes into the summaries of one analyte: one value for each sample of a
/// group, from the results of role "sample" alone.
///
/// A result counts as it is printed: a number with its full precision, also an
/// estimated one (it was measured, if with less precision); below the limit
/// that its text names, unrounded, also an estimated one where the method
/// prints "< LOQ"; above the end of the range.
///
/// Of several injections of a sample (same name and group):
/// - numbers: those of the least diluted injections that gave one, their mean
///   where there are several;
/// - none, but above the range: above the farthest end; where another injection
///   lies below a limit they contradict each other and the sample is withheld;
/// - only below limits: below the smallest of them;
/// - only withheld: withheld.
std::vector<SummaryInput> summary_inputs(const AnalyteJudgement& analyte,
                                         const Sequence& sequence,
                                         const UnitSettings& units,
                                         const ReportingSettings& reporting);

}  // namespace loqsmith
