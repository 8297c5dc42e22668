#pragma once

#include <cstddef>
#include <string_view>
#include <vector>

namespace loqsmith {

inline constexpr std::string_view kMzmlNamespace =
    "http://psi.hupo.org/ms/mzml";

/// One place in the order of an element's children.
struct MzmlChild {
  std::string_view name;
  bool many = false;
};

/// What mzML 1.1 allows in one element.
struct MzmlRule {
  std::string_view name;
  std::vector<std::string_view> attributes;
  std::vector<MzmlChild> children;  ///< in the order that the schema wants
  bool holds_text = false;

  bool allows_attribute(std::string_view attribute) const;
  /// Place of a child in the order; children.size() for a stranger.
  std::size_t place_of(std::string_view child) const;
};

/// The rule for an element's local name; nullptr for a name unknown to mzML.
const MzmlRule* mzml_rule(std::string_view name);

/// Which element's id an attribute refers to ("dataProcessingRef" means a
/// "dataProcessing"); empty for an attribute that is no reference.
std::string_view mzml_reference_target(std::string_view attribute);

}  // namespace loqsmith
