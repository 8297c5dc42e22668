#include <optional>
#include <set>
#include <string>

#include "loqsmith/sheets/method_rules.hpp"
#include "loqsmith/sheets/method_section.hpp"

namespace loqsmith {
namespace {

const MethodElement* below(const MethodElement* element,
                           std::string_view child) {
  return element == nullptr ? nullptr : element->child(child);
}

/// What the check needs and the limits lack; empty: nothing.
std::string lacking(const MethodElement* own, const MethodElement* shared,
                    const MethodElement& limits) {
  const MethodElement& written = own != nullptr ? *own : *shared;
  const Section section(*written.rule, own, shared);
  if (limits.child("established") == nullptr) return "established";
  const std::optional<std::string> procedure = section.given("procedure");
  if (!procedure || limits.child(*procedure) != nullptr) return {};
  return *procedure;
}

}  // namespace

// A check that could never be made is a mistake in the method.
void check_established_limit_rule(MethodDocument& document) {
  const MethodElement& method = document.root;
  const MethodElement* shared =
      below(method.child("acceptance"), "established-limit");
  std::set<std::size_t> said;
  for (const MethodElement* analyte : method.at_path("analytes/analyte")) {
    const MethodElement* own =
        below(analyte->child("acceptance"), "established-limit");
    const MethodElement* limits = analyte->child("limits");
    if (limits == nullptr) limits = method.child("limits");
    if (limits == nullptr || (own == nullptr && shared == nullptr)) continue;
    const std::string wanted = lacking(own, shared, *limits);
    const std::size_t place = (own != nullptr ? own : shared)->offset;
    // Analytes that share the check share the mistake.
    if (wanted.empty() || !said.insert(place).second) continue;
    document.add(place,
                 "<established-limit> without <" + wanted + "> in the limits",
                 "both <established> and the procedure that is compared",
                 "add <" + wanted + "> to the limits");
  }
}

}  // namespace loqsmith
