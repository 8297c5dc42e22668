#pragma once

#include <cstddef>
#include <string_view>
#include <vector>

#include "loqsmith/formats/schema_element.hpp"

namespace loqsmith {

inline constexpr std::string_view kMzmlNamespace =
    "http://psi.hupo.org/ms/mzml";

/// The rule for an element's local name; nullptr for a name unknown to mzML.
const SchemaElement* mzml_rule(std::string_view name);

/// Which element's id an attribute refers to ("dataProcessingRef" means a
/// "dataProcessing"); empty for an attribute that is no reference.
std::string_view mzml_reference_target(std::string_view attribute);

}  // namespace loqsmith
