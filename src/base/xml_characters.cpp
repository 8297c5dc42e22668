#include "loqsmith/base/xml_characters.hpp"

#include <array>
#include <cstdint>
#include <cstring>

namespace loqsmith {
namespace {

struct Range {
  char32_t first;
  char32_t last;
};

// NameStartChar beyond ASCII.
constexpr std::array<Range, 12> kNameStart{{{0xC0, 0xD6},
                                            {0xD8, 0xF6},
                                            {0xF8, 0x2FF},
                                            {0x370, 0x37D},
                                            {0x37F, 0x1FFF},
                                            {0x200C, 0x200D},
                                            {0x2070, 0x218F},
                                            {0x2C00, 0x2FEF},
                                            {0x3001, 0xD7FF},
                                            {0xF900, 0xFDCF},
                                            {0xFDF0, 0xFFFD},
                                            {0x10000, 0xEFFFF}}};

constexpr std::uint64_t kOnes = 0x0101010101010101U;
constexpr std::uint64_t kHighBits = 0x8080808080808080U;

// High bit of a byte that equals c; a borrow may mark a byte above a true
// match, never one where there is no match at all.
constexpr std::uint64_t equal_bytes(std::uint64_t word, char c) {
  const std::uint64_t difference =
      word ^ (kOnes * static_cast<unsigned char>(c));
  return (difference - kOnes) & ~difference & kHighBits;
}

constexpr bool has_special(std::uint64_t word) {
  const std::uint64_t control = (word - kOnes * 0x20U) & ~word & kHighBits;
  return (control | (word & kHighBits) | equal_bytes(word, '<') |
          equal_bytes(word, '&') | equal_bytes(word, ']')) != 0;
}

constexpr bool is_special(unsigned char c) {
  return c < 0x20U || c >= 0x80U || c == '<' || c == '&' || c == ']';
}

}  // namespace

CodePoint decode_utf8(std::string_view text) {
  const auto byte = [&](std::size_t i) {
    return i < text.size() ? static_cast<unsigned char>(text[i]) : 0U;
  };
  const auto tail = [&](std::size_t i) { return (byte(i) & 0xC0U) == 0x80U; };
  const auto bits = [&](std::size_t i) {
    return static_cast<char32_t>(byte(i) & 0x3FU);
  };
  const unsigned first = byte(0);
  if (first < 0x80U) return {first, 1};
  if (first >= 0xC2U && first <= 0xDFU && tail(1)) {
    return {((first & 0x1FU) << 6U) | bits(1), 2};
  }
  if (first >= 0xE0U && first <= 0xEFU && tail(1) && tail(2) &&
      !(first == 0xE0U && byte(1) < 0xA0U) &&
      !(first == 0xEDU && byte(1) > 0x9FU)) {
    return {((first & 0xFU) << 12U) | (bits(1) << 6U) | bits(2), 3};
  }
  if (first >= 0xF0U && first <= 0xF4U && tail(1) && tail(2) && tail(3) &&
      !(first == 0xF0U && byte(1) < 0x90U) &&
      !(first == 0xF4U && byte(1) > 0x8FU)) {
    return {
        ((first & 0x7U) << 18U) | (bits(1) << 12U) | (bits(2) << 6U) | bits(3),
        4};
  }
  return {};
}

bool is_xml_character(char32_t c) {
  if (c < 0x20U) return c == '\t' || c == '\n' || c == '\r';
  return (c < 0xD800U || c > 0xDFFFU) && c != 0xFFFEU && c != 0xFFFFU &&
         c <= 0x10FFFFU;
}

bool is_xml_name_start(char32_t c) {
  if (c < 0x80U) {
    return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || c == '_' ||
           c == ':';
  }
  for (const Range& range : kNameStart) {
    if (c >= range.first && c <= range.last) return true;
  }
  return false;
}

bool is_xml_name_character(char32_t c) {
  return is_xml_name_start(c) || c == '-' || c == '.' ||
         (c >= '0' && c <= '9') || c == 0xB7U || (c >= 0x300U && c <= 0x36FU) ||
         c == 0x203FU || c == 0x2040U;
}

std::size_t next_special(std::string_view text, std::size_t from) {
  while (from < text.size()) {
    while (from + sizeof(std::uint64_t) <= text.size()) {
      std::uint64_t word = 0;
      std::memcpy(&word, text.data() + from, sizeof word);
      if (has_special(word)) break;
      from += sizeof word;
    }
    if (from < text.size()) {
      if (is_special(static_cast<unsigned char>(text[from]))) return from;
      ++from;
    }
  }
  return text.size();
}

}  // namespace loqsmith
