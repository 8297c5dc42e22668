#include <charconv>
#include <cstdint>

#include "loqsmith/base/xml_scan.hpp"

namespace loqsmith {
namespace {

void append_utf8(std::string& text, std::uint32_t c) {
  const auto tail = [&](unsigned shift) {
    text += static_cast<char>(0x80U | ((c >> shift) & 0x3FU));
  };
  if (c < 0x80U) {
    text += static_cast<char>(c);
  } else if (c < 0x800U) {
    text += static_cast<char>(0xC0U | (c >> 6U));
    tail(0);
  } else if (c < 0x10000U) {
    text += static_cast<char>(0xE0U | (c >> 12U));
    tail(6);
    tail(0);
  } else {
    text += static_cast<char>(0xF0U | (c >> 18U));
    tail(12);
    tail(6);
    tail(0);
  }
}

// `name` is what stands between '&' and ';' and passed the scan.
void append_reference(std::string& text, std::string_view name) {
  if (name.starts_with('#')) {
    name.remove_prefix(1);
    const bool hex = name.starts_with('x');
    if (hex) name.remove_prefix(1);
    std::uint32_t value = 0;
    std::from_chars(name.data(), name.data() + name.size(), value,
                    hex ? 16 : 10);
    append_utf8(text, value);
  } else if (name == "lt") {
    text += '<';
  } else if (name == "gt") {
    text += '>';
  } else if (name == "amp") {
    text += '&';
  } else if (name == "apos") {
    text += '\'';
  } else if (name == "quot") {
    text += '"';
  }
}

// XML 1.0, 2.11 (line ends) and 3.3.3 (attribute values), from memory.
std::string expand(std::string_view raw, bool attribute) {
  std::string text;
  text.reserve(raw.size());
  for (std::size_t i = 0; i < raw.size(); ++i) {
    const char c = raw[i];
    if (c == '&') {
      const std::size_t end = raw.find(';', i);
      if (end == std::string_view::npos) return text;
      append_reference(text, raw.substr(i + 1, end - i - 1));
      i = end;
    } else if (c == '\r') {
      if (i + 1 < raw.size() && raw[i + 1] == '\n') ++i;
      text += attribute ? ' ' : '\n';
    } else if (attribute && (c == '\t' || c == '\n')) {
      text += ' ';
    } else {
      text += c;
    }
  }
  return text;
}

}  // namespace

std::string xml_value(std::string_view raw) { return expand(raw, true); }

std::string xml_text(std::string_view raw) { return expand(raw, false); }

}  // namespace loqsmith
