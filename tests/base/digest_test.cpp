#include "loqsmith/base/digest.hpp"

#include <gtest/gtest.h>

namespace loqsmith {
namespace {

// NIST, Examples with Intermediate Values, SHA-256 and SHA-1 (FIPS 180-4).
constexpr const char* kTwoBlocks =
    "abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq";

TEST(Sha256, AgreesWithTheStandardsExamples) {
  EXPECT_EQ(sha256_hex("abc"),
            "ba7816bf8f01cfea414140de5dae2223"
            "b00361a396177a9cb410ff61f20015ad");
  EXPECT_EQ(sha256_hex(kTwoBlocks),
            "248d6a61d20638b8e5c026930c3e6039"
            "a33ce45964ff2167f6ecedd419db06c1");
  EXPECT_EQ(sha256_hex(""),
            "e3b0c44298fc1c149afbf4c8996fb924"
            "27ae41e4649b934ca495991b7852b855");
}

TEST(Sha1, AgreesWithTheStandardsExamples) {
  EXPECT_EQ(sha1_hex("abc"), "a9993e364706816aba3e25717850c26c9cd0d89d");
  EXPECT_EQ(sha1_hex(kTwoBlocks), "84983e441c3bd26ebaae4aa1f95129e5e54670f1");
}

TEST(Sha256, IsTheSameWhateverThePieces) {
  const std::string text(1000, 'q');
  for (const std::size_t piece : {1U, 7U, 63U, 64U, 65U, 999U}) {
    Sha256 digest;
    for (std::size_t at = 0; at < text.size(); at += piece) {
      digest.add(std::string_view(text).substr(at, piece));
    }
    EXPECT_EQ(digest.finish_hex(), sha256_hex(text)) << piece;
  }
}

}  // namespace
}  // namespace loqsmith
