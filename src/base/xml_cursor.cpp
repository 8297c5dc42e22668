#include "loqsmith/base/xml_cursor.hpp"

#include <algorithm>
#include <charconv>
#include <cstdint>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/base/xml_characters.hpp"

namespace loqsmith {
namespace {

std::string hex_byte(char c) {
  constexpr std::string_view kHex = "0123456789ABCDEF";
  const auto byte = static_cast<unsigned char>(c);
  return std::string("0x") + kHex[byte >> 4U] + kHex[byte & 0xFU];
}

bool is_built_in_entity(std::string_view name) {
  return name == "lt" || name == "gt" || name == "amp" || name == "apos" ||
         name == "quot";
}

bool is_plain(char c) {
  const auto byte = static_cast<unsigned char>(c);
  return byte >= 0x20U && byte < 0x80U;
}

// "#65" or "#x41": a legal character by its number.
bool is_legal_number(std::string_view reference) {
  reference.remove_prefix(1);
  const bool hex = !reference.empty() && reference.front() == 'x';
  if (hex) reference.remove_prefix(1);
  std::uint32_t value = 0;
  const char* end = reference.data() + reference.size();
  const auto [stop, error] =
      std::from_chars(reference.data(), end, value, hex ? 16 : 10);
  return error == std::errc{} && stop == end && is_xml_character(value);
}

}  // namespace

void XmlCursor::fail(std::size_t offset, const std::string& found,
                     const std::string& expected,
                     const std::string& mend) const {
  const TextPlace place = line_column(bytes_, offset);
  throw InputError(
      InputProblem{file_, place.line, place.column, found, expected, mend});
}

void XmlCursor::fail_incomplete(const std::string& expected) const {
  fail(bytes_.size(), "the end of the file", expected,
       "the document is incomplete: it was cut off or is still being written");
}

void XmlCursor::fail_here(const std::string& expected) const {
  if (at_end()) fail_incomplete(expected);
  fail(offset_, in_quotes(bytes_.substr(offset_, 12)), expected);
}

bool XmlCursor::skip(std::string_view text) {
  if (!looking_at(text)) return false;
  advance(text.size());
  return true;
}

bool XmlCursor::skip_blanks() {
  const std::size_t start = offset_;
  while (!at_end() && is_xml_blank(bytes_[offset_])) ++offset_;
  return offset_ > start;
}

void XmlCursor::require(std::string_view text, const std::string& what) {
  // A document that was cut inside the mark is incomplete, not wrong.
  const std::string_view rest = bytes_.substr(std::min(offset_, bytes_.size()));
  if (rest.size() < text.size() && text.starts_with(rest)) {
    fail_incomplete(what);
  }
  if (!skip(text)) fail_here(what);
}

std::string_view XmlCursor::take_name(const std::string& what) {
  const std::size_t start = offset_;
  while (!at_end()) {
    const auto first = static_cast<unsigned char>(peek());
    const CodePoint c = first < 0x80U ? CodePoint{first, 1}
                                      : decode_utf8(bytes_.substr(offset_, 4));
    if (c.length == 0 || (ascii_ && c.length > 1)) take_character();
    if (!(offset_ == start ? is_xml_name_start(c.value)
                           : is_xml_name_character(c.value))) {
      break;
    }
    offset_ += c.length;
    if (offset_ - start > limits_.name_bytes) {
      fail(start,
           "a name of more than " + std::to_string(limits_.name_bytes) +
               " bytes",
           what);
    }
  }
  if (at_end()) fail_incomplete("the end of " + what);
  if (offset_ == start) fail_here(what);
  return since(start);
}

void XmlCursor::take_reference() {
  constexpr std::string_view kLetters =
      "#0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz";
  const std::size_t start = offset_;
  const std::size_t end = bytes_.find_first_not_of(kLetters, start + 1);
  if (end == std::string_view::npos) {
    fail_incomplete("the end of a reference");
  }
  const std::string_view name = bytes_.substr(start + 1, end - start - 1);
  const bool legal =
      name.starts_with('#') ? is_legal_number(name) : is_built_in_entity(name);
  if (!legal || bytes_[end] != ';') {
    fail(start, in_quotes(bytes_.substr(start, end - start + 1)),
         "one of &lt; &gt; &amp; &apos; &quot; or a reference to a legal "
         "character");
  }
  offset_ = end + 1;
}

void XmlCursor::take_character() {
  const CodePoint c = decode_utf8(bytes_.substr(offset_, 4));
  if (c.length == 0 || (ascii_ && c.length > 1)) {
    fail(offset_, "the byte " + hex_byte(bytes_[offset_]),
         ascii_ ? "US-ASCII, as the declaration says" : "well-formed UTF-8",
         "save the file as UTF-8, or declare the encoding it has");
  }
  if (!is_xml_character(c.value)) {
    fail(offset_, "the forbidden character " + hex_byte(bytes_[offset_]),
         "text without control characters");
  }
  offset_ += c.length;
}

void XmlCursor::take_text() {
  const std::size_t start = offset_;
  while (true) {
    offset_ = next_special(bytes_, offset_);
    if (offset_ - start > limits_.text_bytes) {
      fail(start,
           "more than " + std::to_string(limits_.text_bytes) + " bytes of text",
           "a shorter text");
    }
    if (at_end() || peek() == '<') return;
    if (peek() == '&') {
      take_reference();
    } else if (looking_at("]]>")) {
      fail(offset_, "\"]]>\" in text", "\"]]&gt;\"");
    } else {
      take_character();
    }
  }
}

void XmlCursor::require_legal(std::string_view text, std::size_t offset) {
  const std::size_t end = offset + text.size();
  const std::string_view upto = bytes_.substr(0, end);
  offset_ = next_special(upto, offset);
  while (offset_ < end) {
    take_character();
    offset_ = next_special(upto, offset_);
  }
}

std::string_view XmlCursor::take_until(std::string_view mark,
                                       const std::string& what) {
  const std::size_t start = offset_;
  const std::size_t end = bytes_.find(mark, start);
  const std::string_view text = bytes_.substr(start, end - start);
  if (text.size() > limits_.text_bytes) {
    fail(start, "more than " + std::to_string(limits_.text_bytes) + " bytes",
         "a shorter text");
  }
  if (end == std::string_view::npos) fail_incomplete(what);
  require_legal(text, start);
  offset_ = end + mark.size();
  return text;
}

std::string_view XmlCursor::take_attribute_value() {
  const char quote = peek();
  if (quote != '"' && quote != '\'') fail_here("a value in quotes");
  advance(1);
  const std::size_t start = offset_;
  while (!at_end() && peek() != quote) {
    if (peek() == '<') fail(offset_, "\"<\" in a value", "\"&lt;\"");
    if (peek() == '&') {
      take_reference();
    } else if (is_plain(peek())) {
      advance(1);
    } else {
      take_character();
    }
    if (offset_ - start > limits_.attribute_bytes) {
      fail(start,
           "a value of more than " + std::to_string(limits_.attribute_bytes) +
               " bytes",
           "a shorter value");
    }
  }
  if (at_end()) fail_incomplete("the closing quote of a value");
  advance(1);
  return bytes_.substr(start, offset_ - 1 - start);
}

}  // namespace loqsmith
