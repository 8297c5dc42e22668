#include "loqsmith/record/limit_text.hpp"

#include <algorithm>
#include <cmath>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/rounding.hpp"
#include "loqsmith/record/html.hpp"

namespace loqsmith {
namespace {

constexpr int kDigitsInstead = 3;

// Beyond these, plain decimals would be long.
constexpr double kSmall = 1e-4;
constexpr double kLarge = 1e7;

}  // namespace

ReportingSettings reporting_of(const Method& method,
                               const std::string& analyte) {
  for (const AnalyteSettings& settings : method.analytes) {
    if (settings.target.id == analyte) return settings.reporting;
  }
  return {};
}

std::string limit_text(double limit, const ReportingSettings& reporting) {
  const int digits = reporting.decimals
                         ? kDigitsInstead
                         : std::max(1, reporting.significant_digits);
  const std::string plain =
      round_to_significant(limit, digits, RoundingRule::Up);
  const double size = std::abs(limit);
  if (size >= kSmall && size < kLarge) return plain;
  const auto rounded = parse_number(plain);
  return power_number(rounded.value_or(limit), digits);
}

std::string html_limit(const std::optional<double>& limit,
                       const ReportingSettings& reporting) {
  if (!limit || !std::isfinite(*limit)) return html_number(limit);
  return "<data value=\"" + shortest(*limit) + "\">" +
         limit_text(*limit, reporting) + "</data>";
}

std::string grade_words(Grade grade) {
  switch (grade) {
    case Grade::Valid:
      return "valid";
    case Grade::Note:
      return "valid, with a note";
    case Grade::Caution:
      return "caution";
    case Grade::NotValid:
      return "not valid";
    case Grade::NotApplicable:
      return "not applicable";
  }
  return {};
}

std::string grade_mark(Grade grade) {
  return "<svg class=\"mark\" aria-hidden=\"true\"><use href=\"#grade-" +
         grade_name(grade) + "\"/></svg>";
}

}  // namespace loqsmith
