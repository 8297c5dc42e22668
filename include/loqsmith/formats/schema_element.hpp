#pragma once

#include <cstddef>
#include <string_view>
#include <vector>

namespace loqsmith {

/// One place in the order of an element's children.
struct SchemaChild {
  std::string_view name;
  bool many = false;
};

/// What a schema allows in one element.
struct SchemaElement {
  std::string_view name;
  std::vector<std::string_view> attributes;
  std::vector<SchemaChild> children;  ///< in the order that the schema wants
  bool holds_text = false;

  bool allows_attribute(std::string_view attribute) const;
  /// Place of a child in the order; children.size() for a stranger.
  std::size_t place_of(std::string_view child) const;
};

/// A rule as the tables of a schema have it: attributes and children separated
/// by blanks. Among the children, '*' behind a name means any number, '#' that
/// the element holds text, '@' a group of mzML's parameters.
struct RuleText {
  std::string_view name;
  std::string_view attributes;
  std::string_view children;
};
SchemaElement schema_element(const RuleText& text);

}  // namespace loqsmith
