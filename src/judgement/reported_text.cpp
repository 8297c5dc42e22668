#include "loqsmith/judgement/reported_text.hpp"

#include "loqsmith/base/rounding.hpp"

namespace loqsmith {
namespace {

std::string printed(double value, const ReportingSettings& settings,
                    RoundingRule rule) {
  return settings.decimals
             ? round_to_decimals(value, *settings.decimals, rule)
             : round_to_significant(value, settings.significant_digits, rule);
}

RoundingRule rule_of(const ReportingSettings& settings) {
  switch (settings.rounding) {
    case ReportingSettings::Rounding::HalfEven:
      return RoundingRule::HalfEven;
    case ReportingSettings::Rounding::HalfUp:
      return RoundingRule::HalfUp;
  }
  return RoundingRule::HalfEven;
}

std::string number(std::optional<double> value,
                   const ReportingSettings& settings) {
  return value ? printed(*value, settings, rule_of(settings)) : kWithheldText;
}

std::string below(std::optional<double> limit,
                  const ReportingSettings& settings) {
  return limit ? "< " + printed(*limit, settings, RoundingRule::Up)
               : kWithheldText;
}

std::string above(std::optional<double> highest,
                  const ReportingSettings& settings) {
  return highest ? "> " + printed(*highest, settings, RoundingRule::Down)
                 : kWithheldText;
}

}  // namespace

std::string reported_text(Status status, const ReportedNumbers& numbers,
                          const ReportingSettings& settings) {
  switch (status) {
    case Status::NotDetected:
      return below(
          settings.below_detection == ReportingSettings::BelowDetection::Limit
              ? numbers.detection_limit
              : numbers.quantitation_limit,
          settings);
    case Status::Estimated:
      if (settings.below_quantitation ==
          ReportingSettings::BelowQuantitation::Limit) {
        return below(numbers.quantitation_limit, settings);
      }
      return number(numbers.result, settings);
    case Status::Reportable:
      return number(numbers.result, settings);
    case Status::AboveRange:
      return above(numbers.highest, settings);
    case Status::Withheld:
      return kWithheldText;
  }
  return kWithheldText;
}

}  // namespace loqsmith
