#include "loqsmith/base/xml_declaration.hpp"

#include <algorithm>
#include <array>
#include <string_view>

#include "loqsmith/base/text.hpp"
#include "loqsmith/base/xml_characters.hpp"

namespace loqsmith {
namespace {

using namespace std::string_view_literals;

constexpr std::string_view kByteOrderMark = "\xEF\xBB\xBF";

// First bytes of documents in two or four bytes a character (XML 1.0, appendix
// F, from memory).
constexpr std::array kWideBeginnings{"\xFE\xFF"sv, "\xFF\xFE"sv, "\0<"sv,
                                     "<\0"sv, "\0\0"sv};

std::string lower(std::string_view text) {
  std::string result(text);
  std::transform(result.begin(), result.end(), result.begin(), [](char c) {
    return c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c;
  });
  return result;
}

void refuse_wide_encodings(const XmlCursor& cursor) {
  for (const std::string_view beginning : kWideBeginnings) {
    if (cursor.bytes().starts_with(beginning)) {
      cursor.fail(0, "UTF-16 or UTF-32", "UTF-8", "save the file as UTF-8");
    }
  }
}

// The value behind `name` and an equals sign, white space before it taken.
std::string_view take_pseudo_attribute(XmlCursor& cursor,
                                       std::string_view name) {
  cursor.require(name, std::string(name));
  cursor.skip_blanks();
  cursor.require("=", "\"=\"");
  cursor.skip_blanks();
  return cursor.take_attribute_value();
}

void take_version(XmlCursor& cursor) {
  if (!cursor.skip_blanks()) cursor.fail_here("a blank and the version");
  const std::size_t start = cursor.offset();
  const std::string_view version = take_pseudo_attribute(cursor, "version");
  if (version != "1.0") {
    cursor.fail(start, "XML version " + in_quotes(version), "XML version 1.0");
  }
}

XmlEncoding encoding_named(const XmlCursor& cursor, std::string_view written,
                           std::size_t offset, bool marked) {
  const std::string name = lower(written);
  if (name == "utf-8") return XmlEncoding::Utf8;
  const bool known = name == "us-ascii" || name == "iso-8859-1";
  if (known && !marked) {
    return name == "us-ascii" ? XmlEncoding::Ascii : XmlEncoding::Latin1;
  }
  cursor.fail(offset, "the encoding " + in_quotes(written),
              marked ? "UTF-8, as the byte order mark says"
                     : "UTF-8, US-ASCII or ISO-8859-1",
              "save the file as UTF-8");
}

void take_standalone(XmlCursor& cursor) {
  const std::size_t start = cursor.offset();
  const std::string_view value = take_pseudo_attribute(cursor, "standalone");
  if (value != "yes" && value != "no") {
    cursor.fail(start, in_quotes(value), "standalone \"yes\" or \"no\"");
  }
}

}  // namespace

XmlDeclaration take_xml_declaration(XmlCursor& cursor) {
  if (cursor.at_end()) cursor.fail_incomplete("an XML document");
  refuse_wide_encodings(cursor);
  const bool marked = cursor.skip(kByteOrderMark);
  XmlDeclaration declaration;
  const std::size_t start = cursor.offset();
  if (!cursor.skip("<?xml") || !is_xml_blank(cursor.peek())) {
    cursor.rewind(start);
    return declaration;
  }
  take_version(cursor);
  bool blank = cursor.skip_blanks();
  if (blank && cursor.peek() == 'e') {
    declaration.encoding_begin = cursor.offset();
    const std::string_view name = take_pseudo_attribute(cursor, "encoding");
    declaration.encoding_end = cursor.offset();
    declaration.encoding =
        encoding_named(cursor, name, declaration.encoding_begin, marked);
    blank = cursor.skip_blanks();
  }
  if (blank && cursor.peek() == 's') {
    take_standalone(cursor);
    cursor.skip_blanks();
  }
  cursor.require("?>", "\"?>\" at the declaration's end");
  if (declaration.encoding == XmlEncoding::Ascii) cursor.only_ascii();
  return declaration;
}

std::string_view xml_as_utf8(std::string_view bytes, const std::string& name,
                             std::string& storage) {
  const XmlLimits limits;
  XmlCursor cursor(bytes, name, limits);
  const XmlDeclaration declaration = take_xml_declaration(cursor);
  if (declaration.encoding != XmlEncoding::Latin1) return bytes;
  storage.clear();
  storage.reserve(bytes.size() + bytes.size() / 16);
  for (const char c : bytes) {
    const auto byte = static_cast<unsigned char>(c);
    if (byte < 0x80U) {
      storage += c;
    } else {
      storage += static_cast<char>(0xC0U | (byte >> 6U));
      storage += static_cast<char>(0x80U | (byte & 0x3FU));
    }
  }
  std::fill(
      storage.begin() + static_cast<std::ptrdiff_t>(declaration.encoding_begin),
      storage.begin() + static_cast<std::ptrdiff_t>(declaration.encoding_end),
      ' ');
  return storage;
}

}  // namespace loqsmith
