#pragma once

#include <iosfwd>

namespace loqsmith {

/// Writes schemas/method.xsd from the vocabulary: XML Schema 1.0 with every
/// element, attribute, word, range, default, unique id and reference. What XSD
/// 1.0 cannot say stands in schemas/README.md.
///
/// Source: XML Schema parts 1 and 2 (second edition, 2004), from memory.
void write_method_schema(std::ostream& out);

}  // namespace loqsmith
