#include <gtest/gtest.h>

#include <limits>
#include <string>
#include <vector>

#include "loqsmith/formats/base64.hpp"
#include "loqsmith/formats/binary_numbers.hpp"
#include "loqsmith/formats/inflate.hpp"
#include "support/mzml_builder.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

TEST(Base64, DecodesThePublishedVectors) {
  // RFC 4648, section 10.
  const std::vector<std::pair<std::string, std::string>> vectors{
      {"", ""},
      {"Zg==", "f"},
      {"Zm8=", "fo"},
      {"Zm9v", "foo"},
      {"Zm9vYg==", "foob"},
      {"Zm9vYmE=", "fooba"},
      {"Zm9vYmFy", "foobar"}};
  for (const auto& [text, bytes] : vectors) {
    const auto decoded = decode_base64(text);
    ASSERT_TRUE(decoded) << text << decoded.reason();
    EXPECT_EQ(decoded->bytes, bytes);
    EXPECT_EQ(decoded->characters, text.size());
  }
}

TEST(Base64, StepsOverWhiteSpaceAnywhere) {
  for (std::size_t at = 0; at <= 12; ++at) {
    std::string text = "Zm9vYmFyYQ==";
    text.insert(at, " \t\r\n");
    const auto decoded = decode_base64(text);
    ASSERT_TRUE(decoded) << at;
    EXPECT_EQ(decoded->bytes, "foobara");
    EXPECT_EQ(decoded->characters, 12U);
  }
}

TEST(Base64, TakesBackWhatWasEncoded) {
  std::string bytes;
  for (int i = 0; i < 1000; ++i) {
    const auto decoded = decode_base64(test::base64(bytes));
    ASSERT_TRUE(decoded);
    ASSERT_EQ(decoded->bytes, bytes);
    bytes += static_cast<char>(static_cast<unsigned char>(i * 37 % 256));
  }
}

TEST(Base64, RefusesWhatIsNoBase64) {
  for (const std::string text :
       {"Zg=", "Zg", "Z", "Zm9", "Zm9vZ===", "=", "====", "Zg==Zg==", "Zg=g",
        "Zh==", "Zm9=", "Zm9-", "Zm9_", "Zm9v\f", "Zm.9v",
        "Zm9vY\xE9==", "Zm9v====", "Zg==="}) {
    EXPECT_FALSE(decode_base64(text)) << text;
  }
}

TEST(Inflate, TakesBackWhatWasCompressed) {
  for (const std::size_t size : {0U, 1U, 100U, 100000U}) {
    std::string bytes;
    for (std::size_t i = 0; i < size; ++i) {
      bytes += static_cast<char>(i * i % 251 % 128);
    }
    const auto inflated = inflate_zlib(test::zlib_compressed(bytes), size);
    ASSERT_TRUE(inflated) << inflated.reason();
    EXPECT_EQ(*inflated, bytes);
  }
}

TEST(Inflate, AcceptsTheBestRatioOfDeflate) {
  const std::string bytes(8U << 20U, '\0');
  EXPECT_TRUE(inflate_zlib(test::zlib_compressed(bytes), bytes.size()));
}

struct BadStream {
  std::string bytes;
  std::size_t wanted;
  std::string says;
};

TEST(Inflate, SaysWhatIsWrongWithAStream) {
  const std::string bytes = "twelve bytes";
  const std::string good = test::zlib_compressed(bytes);
  std::string wrong_sum = good;
  wrong_sum.back() = static_cast<char>(wrong_sum.back() ^ 1);
  const std::vector<BadStream> streams{
      {"", 12, "header"},
      {"x", 12, "header"},
      {good.substr(2), 12, "header"},     // raw deflate
      {"\x1F\x8B" + good, 12, "header"},  // gzip
      {good.substr(0, good.size() - 1), 12, "damaged"},
      {good.substr(0, 6), 12, "damaged"},
      {wrong_sum, 12, "damaged"},
      {good + "!", 12, "1 bytes behind"},
      {good, 11, "more than 11"},
      {good, 4, "more than 4"},
      {good, 13, "fewer than 13"},
      {good, std::size_t{1} << 40U, "cannot hold"},
  };
  for (const BadStream& stream : streams) {
    const auto result = inflate_zlib(stream.bytes, stream.wanted);
    ASSERT_FALSE(result) << stream.says;
    EXPECT_NE(result.reason().find(stream.says), std::string::npos)
        << result.reason() << " instead of " << stream.says;
  }
}

TEST(BinaryNumbers, WidenEachTypeExactly) {
  const std::vector<double> values{0.0, -1.0, 3.0, 65536.0};
  for (const auto& [accession, type] :
       {std::pair{"MS:1000519", NumberType::Int32},
        std::pair{"MS:1000521", NumberType::Float32},
        std::pair{"MS:1000522", NumberType::Int64},
        std::pair{"MS:1000523", NumberType::Float64}}) {
    const std::string bytes = test::packed(values, accession);
    EXPECT_EQ(bytes.size(), 4 * width_of(type));
    const auto widened = widen(bytes, type);
    ASSERT_TRUE(widened);
    EXPECT_EQ(*widened, values) << number_type_name(type);
  }
}

TEST(BinaryNumbers, KeepNegativeZeroAndDenormals) {
  const double tiny = std::numeric_limits<double>::denorm_min();
  const auto widened =
      widen(test::packed({-0.0, tiny}, "MS:1000523"), NumberType::Float64);
  ASSERT_TRUE(widened);
  EXPECT_TRUE(test::same_bits((*widened)[0], -0.0));
  EXPECT_TRUE(test::same_bits((*widened)[1], tiny));
}

TEST(BinaryNumbers, RefuseIntegersThatADoubleCannotHold) {
  const double last = 9007199254740992.0;  // 2^53
  EXPECT_TRUE(
      widen(test::packed({last, -last}, "MS:1000522"), NumberType::Int64));
  for (const double beyond : {last + 2.0, -last - 2.0}) {
    const auto widened =
        widen(test::packed({0.0, beyond}, "MS:1000522"), NumberType::Int64);
    ASSERT_FALSE(widened);
    EXPECT_NE(widened.reason().find("index 1"), std::string::npos);
  }
}

}  // namespace
}  // namespace loqsmith
