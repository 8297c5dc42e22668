#include <tuple>

#include "loqsmith/sheets/method_run_checks.hpp"
#include "loqsmith/sheets/method_section.hpp"
#include "loqsmith/sheets/method_settings.hpp"

namespace loqsmith {
namespace {

CalibrationAcceptance calibration_check(const Section& section) {
  CalibrationAcceptance check;
  check.action = check_action(section);
  check.minimum_levels = section.whole("minimum-levels");
  check.minimum_r2 = section.optional_number("minimum-r2");
  check.maximum_relative_standard_error =
      section.optional_number("maximum-relative-standard-error");
  check.back_calculation_percent = section.optional_number("back-calculation");
  check.back_calculation_lowest_percent =
      section.optional_number("back-calculation-lowest");
  check.minimum_accepted_percent = section.number("minimum-accepted");
  return check;
}

CheckStandardAcceptance check_standard_check(const Section& section) {
  using Governs = CheckStandardAcceptance::Governs;
  CheckStandardAcceptance check;
  check.action = check_action(section);
  check.recovery = percent_range(section, "recovery");
  check.governs = section.pick<Governs>(
      "governs", {{"both", Governs::Both}, {"forward", Governs::Forward}});
  return check;
}

RecoveryAcceptance recovery_check(const Section& section) {
  return {check_action(section), percent_range(section, "recovery")};
}

FortifiedAcceptance fortified_check(const Section& section) {
  FortifiedAcceptance check;
  check.action = check_action(section);
  if (section.text("recovery")) {
    check.recovery = percent_range(section, "recovery");
  }
  check.relative_difference = section.optional_number("relative-difference");
  check.native_ratio = section.number("native-ratio");
  return check;
}

EstablishedLimitAcceptance established_limit_check(const Section& section) {
  EstablishedLimitAcceptance check;
  check.action = check_action(section);
  check.procedure = section.value("procedure");
  std::tie(check.ratio_low, check.ratio_high) = pair_of(section.value("ratio"));
  return check;
}

ConfirmationAcceptance confirmation_check(const Section& section) {
  ConfirmationAcceptance check;
  check.action = check_action(section);
  check.maximum_rsd = section.number("maximum-rsd");
  check.recovery = percent_range(section, "recovery");
  check.prediction = percent_range(section, "prediction");
  return check;
}

ClosenessAcceptance closeness_check(const Section& section) {
  ClosenessAcceptance check;
  check.action = check_action(section);
  check.replicates = section.number("replicates");
  return check;
}

const MethodElement* child_of(const MethodElement* element,
                              std::string_view name) {
  return element == nullptr ? nullptr : element->child(name);
}

void set_letters(const MethodElement* reporting, ReportingSettings& settings) {
  if (reporting == nullptr) return;
  for (const MethodElement& letter : reporting->children) {
    const Section section(*letter.rule, &letter);
    settings.letters[section.value("status")] = section.value("code");
  }
}

}  // namespace

AcceptanceSettings acceptance_settings(const MethodElement* own,
                                       const MethodElement* shared) {
  AcceptanceSettings settings;
  const auto section = [&](std::string_view name) {
    const MethodElement* own_check = child_of(own, name);
    const MethodElement* shared_check = child_of(shared, name);
    std::optional<Section> found;
    if (own_check != nullptr || shared_check != nullptr) {
      found.emplace(*(own_check ? own_check : shared_check)->rule, own_check,
                    shared_check);
    }
    return found;
  };
  if (const auto found = section("calibration")) {
    settings.calibration = calibration_check(*found);
  }
  if (const auto found = section("check-standard")) {
    settings.check_standard = check_standard_check(*found);
  }
  if (const auto found = section("second-source")) {
    settings.second_source = recovery_check(*found);
  }
  if (const auto found = section("control")) {
    settings.control = recovery_check(*found);
  }
  if (const auto found = section("fortified")) {
    settings.fortified = fortified_check(*found);
  }
  if (const auto found = section("duplicate")) {
    settings.duplicate = {check_action(*found),
                          found->number("relative-difference")};
  }
  if (const auto found = section("surrogate")) {
    settings.surrogate = recovery_check(*found);
  }
  if (const auto found = section("established-limit")) {
    settings.established_limit = established_limit_check(*found);
  }
  if (const auto found = section("confirmation")) {
    settings.confirmation = confirmation_check(*found);
  }
  if (const auto found = section("closeness")) {
    settings.closeness = closeness_check(*found);
  }
  read_run_checks(section, settings);
  return settings;
}

ReportingSettings reporting_settings(const MethodElement* own,
                                     const MethodElement* shared) {
  using S = ReportingSettings;
  const Section section(element_rule("reporting"), own, shared);
  S settings;
  if (const auto digits = section.text("significant-digits")) {
    settings.significant_digits = whole_of(*digits);
  }
  if (const auto decimals = section.text("decimals")) {
    settings.decimals = whole_of(*decimals);
  }
  settings.rounding = section.pick<S::Rounding>(
      "rounding",
      {{"half-even", S::Rounding::HalfEven}, {"half-up", S::Rounding::HalfUp}});
  settings.below_detection = section.pick<S::BelowDetection>(
      "below-detection", {{"limit", S::BelowDetection::Limit},
                          {"quantitation", S::BelowDetection::Quantitation}});
  settings.below_quantitation = section.pick<S::BelowQuantitation>(
      "below-quantitation", {{"estimate", S::BelowQuantitation::Estimate},
                             {"limit", S::BelowQuantitation::Limit}});
  settings.reporting_limit = section.optional_number("reporting-limit");
  settings.relative_uncertainty =
      section.optional_number("relative-uncertainty");
  set_letters(shared, settings);
  set_letters(own, settings);
  return settings;
}

UnitSettings unit_settings(const MethodElement& units) {
  const Section section(*units.rule, &units);
  UnitSettings settings;
  settings.concentration = section.value("concentration");
  settings.result = section.value("result");
  settings.factor = section.number("factor");
  settings.sample_amount = section.text("sample-amount").value_or("");
  settings.final_volume = section.text("final-volume").value_or("");
  return settings;
}

}  // namespace loqsmith
