#include "loqsmith/sheets/method_rules.hpp"

#include <algorithm>
#include <array>
#include <string>

#include "loqsmith/base/text.hpp"
#include "loqsmith/sheets/method_section.hpp"
#include "loqsmith/sheets/method_settings.hpp"

namespace loqsmith {
namespace {

constexpr std::array<std::string_view, 4> kHaveCriticalValue{
    "critical-and-detectable", "din-32645", "prediction-band",
    "blank-and-low-level"};

bool has_critical_value(std::string_view procedure) {
  return std::find(kHaveCriticalValue.begin(), kHaveCriticalValue.end(),
                   procedure) != kHaveCriticalValue.end();
}

std::size_t place_of(const MethodElement& element, std::string_view attribute) {
  const MethodAttribute* found = element.attribute(attribute);
  return found == nullptr ? element.offset : found->offset;
}

void check_units(MethodDocument& document) {
  const MethodElement* units = document.root.child("units");
  if (units == nullptr || units->attribute("factor") != nullptr) return;
  const Section section(*units->rule, units);
  const auto concentration = section.given("concentration");
  const auto result = section.given("result");
  if (!concentration || !result || *concentration == *result) return;
  document.add(place_of(*units, "result"),
               "units " + in_quotes(*concentration) + " and " +
                   in_quotes(*result) + " without a factor",
               "the attribute factor, since the units differ",
               "add factor=\"...\": result = vial concentration x factor");
}

void check_governing(MethodDocument& document, const MethodElement& limits) {
  const std::string governing = governing_of(limits);
  if (governing == "first" || governing == "largest" ||
      limits.child(governing) != nullptr) {
    return;
  }
  std::vector<std::string> present{"first", "largest"};
  for (const MethodElement& procedure : limits.children) {
    present.emplace_back(procedure.rule->name);
  }
  document.add(place_of(limits, "governing"),
               "governing=" + in_quotes(governing),
               "one of " + join(present, ", "),
               "add <" + governing + "> to the limits or name another one");
}

// Somebody who wants the critical value must have a procedure that gives one.
void check_decision(MethodDocument& document, const MethodElement& limits) {
  const Section section(*limits.rule, &limits);
  if (section.given("decision") != "critical-value") return;
  const std::string governing = governing_of(limits);
  const auto& all = limits.children;
  const bool any = std::any_of(all.begin(), all.end(), [](const auto& one) {
    return has_critical_value(one.rule->name);
  });
  const bool fits =
      governing == "largest" ? any
      : governing == "first"
          ? !all.empty() && has_critical_value(all.front().rule->name)
          : has_critical_value(governing);
  if (fits) return;
  document.add(place_of(limits, "decision"), "decision=\"critical-value\"",
               "\"detection-limit\", since the governing procedure has no "
               "critical value",
               "let a procedure govern that has one");
}

void check_limits(MethodDocument& document, const MethodElement& limits) {
  if (limits.children.empty()) {
    document.add(limits.offset, "<limits> without a procedure",
                 "at least one limit procedure",
                 "add one, for instance <blank-deviation/>");
    return;
  }
  check_governing(document, limits);
  check_decision(document, limits);
}

void check_smoothing(MethodDocument& document, const MethodElement* own,
                     const MethodElement* shared) {
  const Section section(element_rule("integration"), own, shared);
  const int points = section.whole("smoothing-points");
  const int order = section.whole("smoothing-order");
  if (points <= 1 || order < points) return;
  const MethodElement& written = own != nullptr ? *own : *shared;
  document.add(place_of(written, "smoothing-order"),
               "smoothing-order " + std::to_string(order) + " with " +
                   std::to_string(points) + " smoothing-points",
               "an order below the number of points",
               "raise smoothing-points or lower smoothing-order");
}

// What is fitted or skimmed brings a straight baseline of its own.
void check_baseline(MethodDocument& document, const MethodElement* own,
                    const MethodElement* shared) {
  const Section section(element_rule("integration"), own, shared);
  const std::string baseline = section.value("baseline");
  if (baseline == "valley") return;
  const MethodElement& written = own != nullptr ? *own : *shared;
  const auto refuse = [&](const char* attribute) {
    const std::string both =
        std::string(attribute) + " " + in_quotes(section.value(attribute));
    document.add(
        place_of(written, "baseline"),
        "baseline " + in_quotes(baseline) + " with " + both,
        "baseline \"valley\", since " + both +
            " has a straight baseline of its own",
        std::string("choose baseline \"valley\" or another ") + attribute);
  };
  if (section.value("response") == "template") refuse("response");
  if (section.value("overlap") != "drop") refuse("overlap");
}

// The learned shape is that of the whole template window.
void check_bounds(MethodDocument& document, const MethodElement* own,
                  const MethodElement* shared) {
  const Section section(element_rule("integration"), own, shared);
  if (section.value("bounds") != "own") return;
  if (section.value("response") != "template") return;
  const MethodElement& written = own != nullptr ? *own : *shared;
  document.add(place_of(written, "bounds"),
               "bounds \"own\" with response \"template\"",
               "bounds \"template\", since the learned shape spans it",
               "choose bounds \"template\" or another response");
}

}  // namespace

void check_method_rules(MethodDocument& document) {
  if (!document.has_root) return;
  check_identities(document);
  check_groups(document);
  check_units(document);
  check_established_limit_rule(document);
  const MethodElement& method = document.root;
  const MethodElement* limits = method.child("limits");
  const MethodElement* integration = method.child("integration");
  if (limits != nullptr) check_limits(document, *limits);
  if (integration != nullptr) {
    check_smoothing(document, nullptr, integration);
    check_baseline(document, nullptr, integration);
    check_bounds(document, nullptr, integration);
  }
  for (const MethodElement* analyte : method.at_path("analytes/analyte")) {
    if (const MethodElement* own = analyte->child("limits")) {
      check_limits(document, *own);
    } else if (limits == nullptr) {
      document.add(analyte->offset, "<analyte> without limits",
                   "<limits> of the method or of this analyte",
                   "add <limits> with at least one procedure");
    }
    if (const MethodElement* own = analyte->child("integration")) {
      check_smoothing(document, own, integration);
      check_baseline(document, own, integration);
      check_bounds(document, own, integration);
    }
  }
}

}  // namespace loqsmith
