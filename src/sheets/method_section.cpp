#include "loqsmith/sheets/method_section.hpp"

#include <algorithm>

namespace loqsmith {
namespace {

std::optional<std::string> written(const MethodElement* element,
                                   std::string_view name) {
  if (element == nullptr) return std::nullopt;
  const MethodAttribute* attribute = element->attribute(name);
  if (attribute == nullptr || !attribute->valid) return std::nullopt;
  return attribute->text;
}

}  // namespace

// Whether the element gives an attribute that excludes `name`.
bool Section::displaces(const MethodElement* element,
                        std::string_view name) const {
  for (const GroupRule& group : method_groups()) {
    const auto& members = group.attributes;
    if (group.kind != GroupRule::Kind::AtMostOne ||
        group.element != rule_.key ||
        std::find(members.begin(), members.end(), name) == members.end()) {
      continue;
    }
    for (const std::string_view other : members) {
      if (other != name && written(element, other)) return true;
    }
  }
  return false;
}

std::optional<std::string> Section::given(std::string_view name) const {
  if (auto own = written(own_, name)) return own;
  if (displaces(own_, name)) return std::nullopt;
  return written(shared_, name);
}

std::optional<std::string> Section::text(std::string_view name) const {
  if (auto found = given(name)) return found;
  const AttributeRule* rule = rule_.attribute(name);
  if (rule == nullptr || rule->default_text.empty()) return std::nullopt;
  if (displaces(own_, name) || displaces(shared_, name)) return std::nullopt;
  return std::string(rule->default_text);
}

std::string Section::value(std::string_view name) const {
  const auto found = text(name);
  if (!found) throw std::logic_error("no value for " + std::string(name));
  return *found;
}

std::optional<double> Section::optional_number(std::string_view name) const {
  const auto found = text(name);
  return found ? std::optional<double>(number_of(*found)) : std::nullopt;
}

void Section::note_defaults(const std::string& element,
                            std::vector<DefaultUsed>& defaults) const {
  for (const AttributeRule& rule : rule_.attributes) {
    const auto held = text(rule.name);
    if (held && !given(rule.name)) {
      defaults.push_back({element, std::string(rule.name), *held});
    }
  }
}

}  // namespace loqsmith
