#pragma once

#include <string_view>

#include "loqsmith/formats/schema_element.hpp"

namespace loqsmith {

inline constexpr std::string_view kAnimlNamespace =
    "urn:org:astm:animl:schema:core:draft:0.90";
inline constexpr std::string_view kAnimlVersion = "0.90";

/// The rule for an element's local name; nullptr for a name unknown to AnIML.
const SchemaElement* animl_rule(std::string_view name);

/// True for the elements whose content no reader of traces needs: templates
/// (which are no data), audit trail, signatures.
bool is_stepped_over(std::string_view name);

}  // namespace loqsmith
