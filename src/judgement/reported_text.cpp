#include "loqsmith/judgement/reported_text.hpp"

#include <algorithm>
#include <cmath>

#include "loqsmith/base/rounding.hpp"

namespace loqsmith {
namespace {

using Kind = ReportedValue::Kind;

constexpr int kUncertaintyDigits = 2;

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

std::string with_uncertainty(double value, double uncertainty,
                             RoundingRule rule) {
  const int place = place_of_last_digit(uncertainty, kUncertaintyDigits, rule);
  return round_to_place(value, place, rule) + " +/- " +
         round_to_place(uncertainty, place, rule);
}

ReportedValue below(std::optional<double> limit,
                    const ReportingSettings& settings) {
  if (!limit) return {};
  return {Kind::Below, std::max(*limit, settings.reporting_limit.value_or(0.0)),
          std::nullopt};
}

ReportedValue number(std::optional<double> value,
                     const ReportingSettings& settings) {
  if (!value) return {};
  if (settings.reporting_limit && *value < *settings.reporting_limit) {
    return {Kind::Below, *settings.reporting_limit, std::nullopt};
  }
  return {Kind::Number, *value, std::nullopt};
}

ReportedValue quantified(std::optional<double> value,
                         const ReportingSettings& settings) {
  ReportedValue reported = number(value, settings);
  if (reported.kind != Kind::Number || !settings.relative_uncertainty) {
    return reported;
  }
  const double uncertainty =
      std::abs(reported.value) * *settings.relative_uncertainty / 100.0;
  if (uncertainty > 0.0) reported.uncertainty = uncertainty;
  return reported;
}

}  // namespace

ReportedValue reported_value(Status status, const ReportedNumbers& numbers,
                             const ReportingSettings& settings) {
  using S = ReportingSettings;
  switch (status) {
    case Status::NotDetected:
      return below(settings.below_detection == S::BelowDetection::Limit
                       ? numbers.detection_limit
                       : numbers.quantitation_limit,
                   settings);
    case Status::Estimated:
      return settings.below_quantitation == S::BelowQuantitation::Limit
                 ? below(numbers.quantitation_limit, settings)
                 : number(numbers.result, settings);
    case Status::Reportable:
      return quantified(numbers.result, settings);
    case Status::AboveRange:
      if (!numbers.highest) return {};
      return {Kind::Above, *numbers.highest, std::nullopt};
    case Status::Withheld:
      return {};
  }
  return {};
}

std::string reported_text(Status status, const ReportedNumbers& numbers,
                          const ReportingSettings& settings) {
  const ReportedValue reported = reported_value(status, numbers, settings);
  switch (reported.kind) {
    case Kind::Number:
      return reported.uncertainty
                 ? with_uncertainty(reported.value, *reported.uncertainty,
                                    rule_of(settings))
                 : printed(reported.value, settings, rule_of(settings));
    case Kind::Below:
      return "< " + printed(reported.value, settings, RoundingRule::Up);
    case Kind::Above:
      return "> " + printed(reported.value, settings, RoundingRule::Down);
    case Kind::Withheld:
      return kWithheldText;
  }
  return kWithheldText;
}

}  // namespace loqsmith
