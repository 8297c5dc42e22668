#pragma once

#include <cstddef>
#include <string>

#include "loqsmith/base/xml_cursor.hpp"

namespace loqsmith {

enum class XmlEncoding { Utf8, Ascii, Latin1 };

/// What stands before the first markup of a document.
struct XmlDeclaration {
  XmlEncoding encoding = XmlEncoding::Utf8;
  std::size_t encoding_begin = 0;  ///< of `encoding="..."`; 0: not written
  std::size_t encoding_end = 0;
};

/// Takes byte order mark and XML declaration, both optional. Names of encodings
/// are read in any letter case, quotes of either kind.
/// @throws InputError as xml_as_utf8 says
XmlDeclaration take_xml_declaration(XmlCursor& cursor);

}  // namespace loqsmith
