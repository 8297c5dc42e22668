#include "loqsmith/formats/schema_element.hpp"

#include <algorithm>

namespace loqsmith {
namespace {

std::vector<std::string_view> words(std::string_view text) {
  std::vector<std::string_view> result;
  while (!text.empty()) {
    const std::size_t end = std::min(text.find(' '), text.size());
    if (end > 0) result.push_back(text.substr(0, end));
    text.remove_prefix(std::min(end + 1, text.size()));
  }
  return result;
}

}  // namespace

SchemaElement schema_element(const RuleText& text) {
  SchemaElement rule;
  rule.name = text.name;
  rule.attributes = words(text.attributes);
  for (std::string_view word : words(text.children)) {
    if (word == "#") {
      rule.holds_text = true;
    } else if (word == "@") {
      rule.children.insert(rule.children.end(),
                           {{"referenceableParamGroupRef", true},
                            {"cvParam", true},
                            {"userParam", true}});
    } else if (word.ends_with('*')) {
      word.remove_suffix(1);
      rule.children.push_back({word, true});
    } else {
      rule.children.push_back({word, false});
    }
  }
  return rule;
}

bool SchemaElement::allows_attribute(std::string_view attribute) const {
  return std::find(attributes.begin(), attributes.end(), attribute) !=
         attributes.end();
}

std::size_t SchemaElement::place_of(std::string_view child) const {
  const auto it = std::find_if(
      children.begin(), children.end(),
      [&](const SchemaChild& known) { return known.name == child; });
  return static_cast<std::size_t>(it - children.begin());
}

}  // namespace loqsmith
