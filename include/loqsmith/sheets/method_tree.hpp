#pragma once

#include <cstddef>
#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/sheets/problems.hpp"
#include "loqsmith/sheets/vocabulary.hpp"

namespace loqsmith {

/// An attribute that the vocabulary knows.
struct MethodAttribute {
  const AttributeRule* rule = nullptr;
  std::string text;
  std::size_t offset = 0;  ///< of its name in the document
  bool valid = false;      ///< its value fits the rule
};

/// An element that the vocabulary knows, with everything known in it.
struct MethodElement {
  const ElementRule* rule = nullptr;
  std::size_t offset = 0;  ///< of its '<'
  std::vector<MethodAttribute> attributes;
  std::vector<MethodElement> children;
  std::string text;

  const MethodAttribute* attribute(std::string_view name) const;
  const MethodElement* child(std::string_view name) const;  ///< the first

  /// All elements at a path of names, "analytes/analyte", in document order.
  std::vector<const MethodElement*> at_path(std::string_view path) const;
};

/// The document and what is wrong with it.
struct MethodDocument {
  std::string_view xml;
  SheetProblems problems;
  bool has_root = false;
  MethodElement root;

  void add(std::size_t offset, std::string found, std::string expected,
           std::string mend);
};

/// Reads a method and holds every element, attribute and value against the
/// vocabulary; what stands in the wrong place is reported and left out.
MethodDocument read_method_tree(std::string_view xml, const std::string& file);

}  // namespace loqsmith
