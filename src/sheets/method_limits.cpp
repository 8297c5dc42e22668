#include <optional>
#include <string>
#include <string_view>
#include <tuple>

#include "loqsmith/base/text.hpp"
#include "loqsmith/sheets/method_section.hpp"
#include "loqsmith/sheets/method_settings.hpp"

namespace loqsmith {
namespace {

BlankKind blank_kind(const Section& section) {
  return section.pick<BlankKind>("blanks",
                                 {{"solvent", BlankKind::Solvent},
                                  {"method", BlankKind::Method},
                                  {"zero-standard", BlankKind::ZeroStandard},
                                  {"all", BlankKind::All}});
}

// The setters below leave a field alone where the procedure does not have it.

void set_number(const Section& section, std::string_view name, double& field) {
  if (const auto value = section.optional_number(name)) field = *value;
}

void set_whole(const Section& section, std::string_view name, int& field) {
  if (const auto text = section.text(name)) field = whole_of(*text);
}

void set_flag(const Section& section, std::string_view name,
              std::string_view word, bool& field) {
  if (const auto text = section.text(name)) field = *text == word;
}

void set_pair(const Section& section, std::string_view name, double& low,
              double& high) {
  if (const auto text = section.text(name)) {
    std::tie(low, high) = pair_of(*text);
  }
}

void set_up_to(const Section& section, std::optional<double>& field) {
  const auto text = section.text("up-to");
  if (!text) return;
  field = trim(*text) == "all" ? std::nullopt
                               : std::optional<double>(number_of(*text));
}

ProcedureSettings procedure_settings(const MethodElement& element) {
  const Section section(*element.rule, &element);
  ProcedureSettings settings;
  settings.name = std::string(element.rule->name);
  if (section.text("blanks")) settings.blanks = blank_kind(section);
  set_number(section, "detection-factor", settings.detection_factor);
  set_number(section, "quantitation-factor", settings.quantitation_factor);
  set_flag(section, "offset", "blank-mean", settings.offset_blank_mean);
  set_up_to(section, settings.up_to);
  set_number(section, "detection-ratio", settings.detection_ratio);
  set_number(section, "quantitation-ratio", settings.quantitation_ratio);
  set_number(section, "confidence", settings.confidence);
  set_pair(section, "spike-ratio", settings.spike_ratio_low,
           settings.spike_ratio_high);
  set_number(section, "alpha", settings.alpha);
  set_number(section, "beta", settings.beta);
  set_number(section, "k", settings.k);
  set_whole(section, "replicates", settings.replicates);
  set_whole(section, "blank-replicates", settings.blank_replicates);
  set_flag(section, "variance", "linear", settings.variance_linear);
  set_flag(section, "way", "blank", settings.way_blank);
  set_flag(section, "ranks", "yes", settings.ranks);
  set_number(section, "relative-deviation", settings.relative_deviation);
  set_pair(section, "acceptance", settings.acceptance_low,
           settings.acceptance_high);
  settings.detection = section.optional_number("detection");
  settings.quantitation = section.optional_number("quantitation");
  settings.source = section.text("source").value_or("");
  return settings;
}

}  // namespace

std::string governing_of(const MethodElement& limits) {
  const Section section(*limits.rule, &limits);
  if (const auto given = section.given("governing")) return *given;
  return limits.child("established") != nullptr ? "established"
                                                : section.value("governing");
}

LimitSettings limit_settings(const MethodElement& limits) {
  using S = LimitSettings;
  const Section section(*limits.rule, &limits);
  S settings;
  settings.governing = governing_of(limits);
  settings.decision = section.pick<S::Decision>(
      "decision", {{"detection-limit", S::Decision::DetectionLimit},
                   {"critical-value", S::Decision::CriticalValue}});
  settings.floor_at_lowest_standard =
      section.value("quantitation-floor") == "lowest-standard";
  settings.blanks = blank_kind(section);
  settings.minimum_blanks = section.whole("minimum");
  for (const MethodElement& element : limits.children) {
    settings.procedures.push_back(procedure_settings(element));
  }
  return settings;
}

}  // namespace loqsmith
