#include "loqsmith/base/xml_characters.hpp"

#include <gtest/gtest.h>

#include <cstddef>
#include <string>

namespace loqsmith {
namespace {

TEST(XmlCharacters, FindsTheNextSpecialByteWhereverItStands) {
  for (const char special :
       {'<', '&', ']', '\0', '\n', '\x1F', '\x80', '\xFF'}) {
    for (std::size_t at = 0; at < 40; ++at) {
      std::string text(40, '~');
      text[at] = special;
      EXPECT_EQ(next_special(text, 0), at);
      EXPECT_EQ(next_special(text, at + 1), text.size());
    }
  }
}

// The list of well-formed sequences, walked over all code points by an encoder
// of its own.
TEST(XmlCharacters, DecodesEveryCodePoint) {
  for (char32_t c = 0; c <= 0x10FFFF; ++c) {
    if (c >= 0xD800 && c <= 0xDFFF) continue;
    std::string bytes;
    const auto add = [&](char32_t value) {
      bytes += static_cast<char>(static_cast<unsigned char>(value));
    };
    if (c < 0x80) {
      add(c);
    } else if (c < 0x800) {
      add(0xC0 + c / 64);
      add(0x80 + c % 64);
    } else if (c < 0x10000) {
      add(0xE0 + c / 4096);
      add(0x80 + c / 64 % 64);
      add(0x80 + c % 64);
    } else {
      add(0xF0 + c / 262144);
      add(0x80 + c / 4096 % 64);
      add(0x80 + c / 64 % 64);
      add(0x80 + c % 64);
    }
    const CodePoint found = decode_utf8(bytes);
    ASSERT_EQ(found.value, c);
    ASSERT_EQ(found.length, bytes.size());
  }
}

}  // namespace
}  // namespace loqsmith
