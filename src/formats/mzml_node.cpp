#include "loqsmith/formats/mzml_node.hpp"

namespace loqsmith {
namespace {

std::string value_or_empty(const MzmlNode& node, std::string_view name) {
  const std::string* value = node.attribute(name);
  return value == nullptr ? std::string() : *value;
}

}  // namespace

const std::string* MzmlNode::attribute(std::string_view wanted) const {
  for (const auto& [known, value] : attributes) {
    if (known == wanted) return &value;
  }
  return nullptr;
}

const MzmlNode* MzmlNode::child(std::string_view wanted) const {
  for (const MzmlNode& node : children) {
    if (node.name == wanted) return &node;
  }
  return nullptr;
}

CvParam cv_param(const MzmlNode& node) {
  return {
      value_or_empty(node, "accession"),     value_or_empty(node, "value"),
      value_or_empty(node, "unitAccession"), value_or_empty(node, "unitName"),
      value_or_empty(node, "unitCvRef"),     node.offset};
}

}  // namespace loqsmith
