#include "loqsmith/sheets/method_run_checks.hpp"

namespace loqsmith {
namespace {

BlankMaximum blank_maximum(const Section& section) {
  using Kind = BlankMaximum::Kind;
  const std::string text = section.value("maximum");
  if (text == "detection-limit") return {Kind::DetectionLimit};
  if (text == "quantitation-limit") return {Kind::QuantitationLimit};
  return {Kind::Number, section.number("maximum")};
}

SuitabilityAcceptance suitability_check(const Section& section) {
  return {check_action(section),
          section.optional_number("tailing"),
          section.optional_number("plates"),
          section.optional_number("resolution"),
          section.optional_number("area-rsd"),
          section.optional_number("signal-to-noise")};
}

}  // namespace

CheckAction check_action(const Section& section) {
  return section.pick<CheckAction>(
      "action",
      {{"withhold", CheckAction::Withhold}, {"flag", CheckAction::Flag}});
}

PercentRange percent_range(const Section& section, std::string_view name) {
  const auto [low, high] = pair_of(section.value(name));
  return {low, high};
}

void read_run_checks(const AcceptanceChild& child,
                     AcceptanceSettings& settings) {
  if (const auto found = child("solvent-blank")) {
    settings.solvent_blank = {check_action(*found), blank_maximum(*found)};
  }
  if (const auto found = child("method-blank")) {
    settings.method_blank = {check_action(*found), blank_maximum(*found),
                             found->number("sample-ratio")};
  }
  if (const auto found = child("internal-standard")) {
    settings.internal_standard = {check_action(*found),
                                  percent_range(*found, "area")};
  }
  if (const auto found = child("retention-time")) {
    settings.retention_time = {check_action(*found), found->number("shift")};
  }
  if (const auto found = child("suitability")) {
    settings.suitability = suitability_check(*found);
  }
  if (const auto found = child("second-trace")) {
    settings.second_trace = {check_action(*found)};
  }
  if (const auto found = child("carry-over")) {
    settings.carry_over = {check_action(*found), found->number("maximum")};
  }
}

}  // namespace loqsmith
