#pragma once

#include <cstddef>
#include <string_view>

namespace loqsmith {

/// One code point of a text and the bytes that it takes.
struct CodePoint {
  char32_t value = 0;
  std::size_t length = 0;  ///< 0: no well-formed UTF-8 stands here
};

/// The code point at the front of a text that is not empty (Unicode Standard,
/// table 3-7: no surrogates, no overlong forms, nothing above U+10FFFF).
CodePoint decode_utf8(std::string_view text);

/// Production Char of XML 1.0: tab, line feed, carriage return and everything
/// from U+0020 but surrogates, U+FFFE and U+FFFF.
bool is_xml_character(char32_t c);

/// NameStartChar and NameChar of XML 1.0 (fifth edition), ':' included.
bool is_xml_name_start(char32_t c);
bool is_xml_name_character(char32_t c);

constexpr bool is_xml_blank(char c) {
  return c == ' ' || c == '\t' || c == '\r' || c == '\n';
}

/// First byte in [from, text.size()) that a scan must look at: a control
/// character (tab and line ends too), '&', '<', ']' or a byte above 0x7F;
/// text.size() if there is none. Eight bytes a step.
std::size_t next_special(std::string_view text, std::size_t from);

}  // namespace loqsmith
