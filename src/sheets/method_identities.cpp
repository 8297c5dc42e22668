#include <map>
#include <set>
#include <string>
#include <vector>

#include "loqsmith/base/text.hpp"
#include "loqsmith/base/xml_scan.hpp"
#include "loqsmith/sheets/method_rules.hpp"

namespace loqsmith {
namespace {

template <class Visit>
void visit_elements(const MethodElement& element, const Visit& visit) {
  visit(element);
  for (const MethodElement& child : element.children) {
    visit_elements(child, visit);
  }
}

std::string written(const MethodAttribute& attribute) {
  return std::string(attribute.rule->name) + '=' + in_quotes(attribute.text);
}

std::vector<const MethodAttribute*> members(const IdentityRule& rule,
                                            const MethodElement& scope) {
  std::vector<const MethodAttribute*> found;
  for (const std::string_view path : rule.paths) {
    for (const MethodElement* element : scope.at_path(path)) {
      const MethodAttribute* attribute = element->attribute(rule.attribute);
      if (attribute != nullptr && attribute->valid) found.push_back(attribute);
    }
  }
  return found;
}

void check_unique(MethodDocument& document, const IdentityRule& rule,
                  const MethodElement& scope) {
  std::map<std::string, const MethodAttribute*> first;
  for (const MethodAttribute* attribute : members(rule, scope)) {
    const auto [place, is_new] = first.emplace(attribute->text, attribute);
    if (is_new) continue;
    const std::size_t line =
        line_column(document.xml, place->second->offset).line;
    document.add(attribute->offset, written(*attribute) + " a second time",
                 "each " + std::string(rule.attribute) + " once",
                 "it stands in line " + std::to_string(line) + " already");
  }
}

const IdentityRule& unique_rule(std::string_view name) {
  for (const IdentityRule& rule : method_identities()) {
    if (rule.name == name) return rule;
  }
  throw std::logic_error("no such identity: " + std::string(name));
}

void check_reference(MethodDocument& document, const IdentityRule& rule,
                     const MethodElement& scope) {
  const IdentityRule& target = unique_rule(rule.refers);
  std::vector<std::string> known;
  for (const MethodAttribute* one : members(target, scope)) {
    known.push_back(one->text);
  }
  const std::set<std::string> ids(known.begin(), known.end());
  for (const MethodAttribute* attribute : members(rule, scope)) {
    if (ids.contains(attribute->text)) continue;
    const std::string near = nearest_name(attribute->text, known);
    document.add(attribute->offset, written(*attribute),
                 "the " + std::string(target.attribute) + " of one of <" +
                     join(split(target.paths.front(), '/'), "> <") + '>',
                 near.empty() ? "add it there or correct the name"
                              : "did you mean \"" + near + "\"?");
  }
}

std::string all_names(const GroupRule& rule) {
  return join({rule.attributes.begin(), rule.attributes.end()}, ", ");
}

void check_group(MethodDocument& document, const GroupRule& rule,
                 const MethodElement& element) {
  std::vector<const MethodAttribute*> present;
  for (const std::string_view name : rule.attributes) {
    if (const auto* attribute = element.attribute(name)) {
      present.push_back(attribute);
    }
  }
  const std::size_t offset =
      present.empty() ? element.offset : present.back()->offset;
  switch (rule.kind) {
    case GroupRule::Kind::AtMostOne:
      if (present.size() <= 1) return;
      document.add(
          offset,
          written(*present.back()) + " beside " + written(*present.front()),
          "only one of " + all_names(rule), "leave one out");
      return;
    case GroupRule::Kind::AllOrNone:
      if (present.empty() || present.size() == rule.attributes.size()) return;
      document.add(offset, written(*present.back()) + " alone",
                   "all of " + all_names(rule) + " or none",
                   "add what is missing");
      return;
    case GroupRule::Kind::AtLeastOne:
      if (!present.empty()) return;
      document.add(offset,
                   '<' + std::string(element.rule->name) + "> without any",
                   "one of " + all_names(rule), "add one");
      return;
  }
}

}  // namespace

void check_identities(MethodDocument& document) {
  for (const IdentityRule& rule : method_identities()) {
    visit_elements(document.root, [&](const MethodElement& element) {
      if (element.rule->key != rule.scope) return;
      switch (rule.kind) {
        case IdentityRule::Kind::Unique:
          return check_unique(document, rule, element);
        case IdentityRule::Kind::Reference:
          return check_reference(document, rule, element);
      }
    });
  }
}

void check_groups(MethodDocument& document) {
  for (const GroupRule& rule : method_groups()) {
    visit_elements(document.root, [&](const MethodElement& element) {
      if (element.rule->key == rule.element) {
        check_group(document, rule, element);
      }
    });
  }
}

}  // namespace loqsmith
