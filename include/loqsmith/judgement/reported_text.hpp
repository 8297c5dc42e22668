#pragma once

#include <optional>
#include <string>

#include "loqsmith/judgement/settings.hpp"

namespace loqsmith {

/// Printed for a withheld result. A word and not an empty cell, which whoever
/// copies the column could take for "not analysed" or for zero.
inline constexpr const char* kWithheldText = "withheld";

/// One result's numbers, all in the sample's unit.
struct ReportedNumbers {
  std::optional<double> result;
  std::optional<double> detection_limit;
  std::optional<double> quantitation_limit;
  std::optional<double> highest;  ///< end of the accepted range
};

/// What of a result leaves the laboratory, before it is rounded for print.
struct ReportedValue {
  enum class Kind { Number, Below, Above, Withheld };

  Kind kind = Kind::Withheld;
  double value = 0.0;  ///< number, limit or end of the range
  /// Expanded uncertainty where the method states one: result x
  /// relative-uncertainty / 100.
  std::optional<double> uncertainty;
};

/// - reportable: the number, with the method's own uncertainty where it states
///   one (a relative one holds from the quantitation limit up);
/// - estimated: the number (with below-quantitation="limit": below the
///   quantitation limit);
/// - not detected: below the detection or quantitation limit, as
///   below-detection says;
/// - above range: above the highest accepted standard in the sample;
/// - withheld: nothing, also where a needed number is missing.
///
/// With a reporting limit a number below it, unrounded, becomes "below the
/// reporting limit", and no limit below it is printed: a sample's own limit
/// counts where it is the larger one (a diluted sample).
ReportedValue reported_value(Status status, const ReportedNumbers& numbers,
                             const ReportingSettings& settings);

/// The text that may leave the laboratory: "12.4", "< 0.120", "> 500",
/// "withheld", "6.21 +/- 0.62".
///
/// - Numbers by the method's digits and rule. No exponent, which a spreadsheet
///   would make something else of: zeros fill up to the point, "12400".
/// - A limit is rounded up, so that no amount is excluded that the limit does
///   not exclude; the end of the range down: the result is known to exceed
///   that much, not more.
/// - An uncertainty is rounded first, to two significant digits, and the result
///   to the same place, whatever the method's digits (JCGM 100:2008, 7.2.6;
///   from memory).
std::string reported_text(Status status, const ReportedNumbers& numbers,
                          const ReportingSettings& settings);

}  // namespace loqsmith
