#pragma once

#include <optional>
#include <string>

#include "loqsmith/judgement/settings.hpp"
#include "loqsmith/record/published_run.hpp"

namespace loqsmith {

/// The analyte's `<reporting>`; the defaults where the method does not know it.
ReportingSettings reporting_of(const Method& method,
                               const std::string& analyte);

/// A limit as reported texts print it: rounded up, to the method's significant
/// digits (where it counts decimals, those of a sample's unit, to three).
std::string limit_text(double limit, const ReportingSettings& reporting);

/// The same as an element whose value is the very text of limits.csv; a dash
/// where there is none.
std::string html_limit(const std::optional<double>& limit,
                       const ReportingSettings& reporting);

/// "not valid", "valid, with a note".
std::string grade_words(Grade grade);

/// The shape that stands for the grade, whatever the colour.
std::string grade_mark(Grade grade);

}  // namespace loqsmith
